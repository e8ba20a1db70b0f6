import { ChoiceField, TextField } from '@/components/ui/Field';
import { CHANGE_CLASSES, CONSEQUENCES } from '@/features/review/review';
import { choicesOf } from './choices';
import { useReadOnly } from './fields';
import { useDraft, useSnapshot } from './use-editor';

const NOT_SAID = { value: '', label: 'Not said yet' };

/** What is new in this revision: whoever reviews it, and whoever uses the one before, reads it. */
export function ChangeZone() {
  const store = useDraft();
  const change = useSnapshot((snapshot) => snapshot.change);
  const isReadOnly = useReadOnly();
  return (
    <div className="grid gap-12">
      <TextField
        label="What is new and why"
        rows={3}
        maxLength={2000}
        readOnly={isReadOnly}
        value={change.change_note}
        onChange={(event) => store.setChange({ change_note: event.target.value })}
      />
      <div className="grid gap-12 md:grid-cols-2">
        <ChoiceField
          label="Class of change"
          disabled={isReadOnly}
          choices={[NOT_SAID, ...choicesOf(CHANGE_CLASSES)]}
          value={change.change_class ?? ''}
          onChange={({ target }) =>
            store.setChange({ change_class: CHANGE_CLASSES.find((one) => one === target.value) ?? null })
          }
        />
        <ChoiceField
          label="What is at stake"
          disabled={isReadOnly}
          choices={[NOT_SAID, ...choicesOf(CONSEQUENCES)]}
          value={change.consequence ?? ''}
          onChange={({ target }) =>
            store.setChange({ consequence: CONSEQUENCES.find((one) => one === target.value) ?? null })
          }
        />
      </div>
    </div>
  );
}
