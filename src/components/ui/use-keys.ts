import { useEffect, useRef } from 'react';
import { createKeyReader, takesTyping } from './keys';

/** Handlers by key name, lower case: { n: openNew, '/': focusSearch, ArrowLeft: nudge }. */
export type KeyHandlers = Record<string, (event: KeyboardEvent) => void>;

/** False when the reader has turned single-letter keys off in the account settings. */
export const keysAreOn = () => document.documentElement.dataset['keys'] !== 'off';

/** Single-key commands of an island. Off inside fields, while a dialog is open, and when turned off in settings. */
export function useKeys(handlers: KeyHandlers) {
  const latest = useRef(handlers);
  useEffect(() => {
    latest.current = handlers;
  });
  useEffect(() => {
    const read = createKeyReader();
    const onKey = (event: KeyboardEvent) => {
      if (event.defaultPrevented || !keysAreOn() || document.querySelector('dialog[open]')) return;
      const typing = event.target instanceof HTMLElement && takesTyping(event.target);
      const press = read(event, typing, event.timeStamp);
      if (press?.kind !== 'key') return;
      const handler = latest.current[press.key];
      if (!handler) return;
      event.preventDefault();
      handler(event);
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, []);
}
