import { createKeyReader, takesTyping } from '@/components/ui/keys';
import { keysAreOn } from '@/components/ui/use-keys';

/** N presses the sheet's main action, as it says beside the word. */
export function followKeys() {
  const read = createKeyReader();
  document.addEventListener('keydown', (event) => {
    if (event.defaultPrevented || !keysAreOn() || document.querySelector('dialog[open]')) return;
    const typing = event.target instanceof HTMLElement && takesTyping(event.target);
    const press = read(event, typing, event.timeStamp);
    if (press?.kind !== 'key' || press.key !== 'n') return;
    const action = [...document.querySelectorAll<HTMLAnchorElement>('.title-block a')].find(
      (link) => link.querySelector('kbd')?.textContent === 'N',
    );
    if (!action) return;
    event.preventDefault();
    action.click();
  });
}
