/** Opens the search; what the dialog itself needs is read at the first press. */
import { takesTyping } from '@/components/ui/keys';
import { keysAreOn } from '@/components/ui/use-keys';

function isSearchKey(event: KeyboardEvent): boolean {
  if (event.altKey || event.isComposing) return false;
  if (event.ctrlKey || event.metaKey) return event.key.toLowerCase() === 'k' && !event.shiftKey;
  const typing = event.target instanceof HTMLElement && takesTyping(event.target);
  return event.key === '/' && !typing && keysAreOn();
}

const dialog = document.querySelector<HTMLDialogElement>('[data-search-dialog]');

async function open(): Promise<void> {
  if (!dialog) return;
  // At once, so that what is typed while the rest is read is not lost, nor Enter; without the rest the form does the same.
  dialog.showModal();
  const reading = new AbortController();
  let isEntered = false;
  const onSubmit = (event: Event) => {
    event.preventDefault();
    isEntered = true;
  };
  dialog.addEventListener('submit', onSubmit, { signal: reading.signal });
  try {
    const { startSearch } = await import('./dialog.client');
    startSearch(dialog, isEntered);
  } finally {
    reading.abort();
  }
}

document.addEventListener('keydown', (event) => {
  if (event.defaultPrevented || !isSearchKey(event) || document.querySelector('dialog[open]')) return;
  event.preventDefault();
  void open();
});
for (const link of document.querySelectorAll('[data-search-open]'))
  link.addEventListener('click', (event) => {
    if (!(event instanceof MouseEvent) || event.ctrlKey || event.metaKey || event.shiftKey) return;
    event.preventDefault();
    void open();
  });
