import { useEffect } from 'react';
import { Button } from '@/components/ui/Button';
import { takesTyping } from '@/components/ui/keys';
import type { DraftStore } from './store';
import { useDraft, useSnapshot } from './use-editor';

export function UndoButtons() {
  const store = useDraft();
  const canUndo = useSnapshot(({ history }) => history.past.length > 0);
  const canRedo = useSnapshot(({ history }) => history.future.length > 0);
  if (useSnapshot(({ readOnly }) => readOnly)) return null;
  return (
    <div className="mt-12 flex flex-wrap gap-8">
      <Button size="small" onClick={store.undo} keyName="Ctrl Z" reasonId={canUndo ? undefined : 'no-undo'}>
        Undo
      </Button>
      <Button size="small" onClick={store.redo} keyName="Ctrl ⇧ Z" reasonId={canRedo ? undefined : 'no-redo'}>
        Redo
      </Button>
      <span id="no-undo" className="sr-only">
        Nothing to take back.
      </span>
      <span id="no-redo" className="sr-only">
        Nothing to do again.
      </span>
    </div>
  );
}

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
