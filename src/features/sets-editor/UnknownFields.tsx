import { Button } from '@/components/ui/Button';
import { useReadOnly } from '@/features/author/fields';
import { useDraft, useSnapshot } from '@/features/author/use-editor';
import { withoutUnknown } from './criteria';

/** A draft begun from an older schema may say what is no field any more: the form has no place to take it out at. */
export function UnknownFields() {
  const store = useDraft();
  const isReadOnly = useReadOnly();
  const count = useSnapshot(({ faults }) => withoutUnknown(faults).length);
  if (count === 0 || isReadOnly) return null;
  return (
    <div className="mt-10">
      <Button size="small" onClick={() => store.edit(...withoutUnknown(store.snapshot.faults))}>
        {count === 1 ? 'Take out the field that is none' : `Take out ${count} fields that are none`}
      </Button>
    </div>
  );
}
