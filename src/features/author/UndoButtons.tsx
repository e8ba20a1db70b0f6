import { Button } from '@/components/ui/Button';
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
