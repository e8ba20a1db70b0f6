/** What a press means to the sheet: one key by its name, or G followed by a zone's letter. */
export type Press = { kind: 'key'; key: string } | { kind: 'zone'; letter: string };

interface KeyLike {
  key: string;
  ctrlKey: boolean;
  metaKey: boolean;
  altKey: boolean;
  isComposing: boolean;
}

const SEQUENCE_MS = 1500; // a G left alone for longer is forgotten

/** Is this element one that takes typing, so that single letters belong to it? */
export function takesTyping(element: {
  tagName: string;
  type?: string | undefined;
  isContentEditable?: boolean | undefined;
}): boolean {
  if (element.isContentEditable) return true;
  const tag = element.tagName.toUpperCase();
  if (tag === 'INPUT')
    return !['checkbox', 'radio', 'button', 'submit', 'range'].includes(element.type ?? 'text');
  return tag === 'TEXTAREA' || tag === 'SELECT';
}

/** Turns key events into presses. `now` is passed in so that the rule about G can be tested. */
export function createKeyReader() {
  let waitingSince: number | undefined;
  return (event: KeyLike, typing: boolean, now: number): Press | undefined => {
    if (typing || event.isComposing || event.ctrlKey || event.metaKey || event.altKey) return undefined;
    const key = event.key.length === 1 ? event.key.toLowerCase() : event.key;
    if (key === 'Shift') return undefined;
    const waiting = waitingSince !== undefined && now - waitingSince < SEQUENCE_MS;
    waitingSince = undefined;
    if (waiting && /^[a-z]$/.test(key)) return { kind: 'zone', letter: key.toUpperCase() };
    if (key === 'g') {
      waitingSince = now;
      return undefined;
    }
    return { kind: 'key', key };
  };
}
