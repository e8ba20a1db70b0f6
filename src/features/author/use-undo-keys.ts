import { useEffect } from 'react';
import { takesTyping } from '@/components/ui/keys';
import type { DraftStore } from './store';

/** Ctrl-Z and Ctrl-Shift-Z take back and do again, in a field too: the draft's history knows what was typed there. */
export function useUndoKeys(store: DraftStore): void {
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      const key = event.key.toLowerCase();
      if (!(event.ctrlKey || event.metaKey) || event.altKey || (key !== 'z' && key !== 'y')) return;
      const { target } = event;
      // A field that is no part of the draft keeps its own.
      const isOther = target instanceof HTMLElement && takesTyping(target) && !target.closest('[data-at]');
      if (isOther || document.querySelector('dialog[open]')) return;
      event.preventDefault();
      if (key === 'y' || event.shiftKey) store.redo();
      else store.undo();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, [store]);
}
