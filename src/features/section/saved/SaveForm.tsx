import { type SyntheticEvent, useRef, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { Checkbox } from '@/components/ui/Choice';
import { Field } from '@/components/ui/Field';
import { LONGEST_NAME, type SavedSearchView } from './saved';
import type { Kept } from './saved.api';
import type { Saved } from './use-saved';

interface SaveFormProps {
  /** What would be saved; empty where nothing is asked. */
  readonly query: string;
  readonly saved: Saved;
  readonly mayShare: boolean;
  readonly onSaved: (search: SavedSearchView) => void;
  readonly onClose: () => void;
}

/** Gives what is asked now a name, and where that is taken already, replaces what stood under it. */
export function SaveForm(props: SaveFormProps) {
  const { query, saved, mayShare, onClose } = props;
  const [name, setName] = useState('');
  const [shared, setShared] = useState(false);
  const { refusal, setRefusal, take } = useTaking(props);
  const taken = refusal?.isTaken ? ofName(saved.searches, name) : undefined;
  const save = (event: SyntheticEvent) => {
    event.preventDefault();
    take(() => saved.save({ name, query, shared }));
  };
  return (
    <form
      noValidate
      aria-label="Save this search"
      className="flex flex-wrap items-start gap-x-18 gap-y-8 text-schedule"
      onSubmit={save}
    >
      <div className="w-240 max-md:w-full">
        <Field
          label="Name"
          autoFocus
          autoComplete="off"
          maxLength={LONGEST_NAME}
          value={name}
          error={refusal?.name}
          help="It keeps the filters, order, columns and pins of the page."
          onChange={(event) => {
            setName(event.target.value);
            setRefusal(null);
          }}
        />
      </div>
      {mayShare && (
        <span className="pt-14 max-md:pt-0">
          <Checkbox checked={shared} onChange={(event) => setShared(event.target.checked)}>
            Share it with the practice
          </Checkbox>
        </span>
      )}
      <span className="flex gap-14 pt-14 max-md:pt-0">
        <Button type="submit" size="small">
          Save
        </Button>
        {taken && (
          <Button size="small" onClick={() => take(() => saved.change(taken.id, { query }))}>
            Replace it
          </Button>
        )}
        <Button tone="text" onClick={onClose}>
          Cancel
        </Button>
      </span>
      {refusal?.elsewhere && (
        <p role="alert" className="basis-full font-semibold text-error">
          {refusal.elsewhere}
        </p>
      )}
    </form>
  );
}

/** Asks one thing at a time, and keeps why it was refused. */
function useTaking({ onSaved }: SaveFormProps) {
  const [refusal, setRefusal] = useState<Refusal | null>(null);
  const isBusy = useRef(false);
  const take = async (asking: () => Promise<Kept<SavedSearchView>>) => {
    if (isBusy.current) return;
    isBusy.current = true;
    const kept = await asking();
    isBusy.current = false;
    if (kept.kind === 'kept') onSaved(kept.value);
    else setRefusal(refusalOf(kept));
  };
  return { refusal, setRefusal, take };
}

interface Refusal {
  readonly name?: string;
  readonly elsewhere?: string;
  readonly isTaken: boolean;
}

function refusalOf({ faults, message }: Extract<Kept<unknown>, { kind: 'refused' }>): Refusal {
  const fault = faults.find(({ pointer }) => pointer === '/name');
  return fault
    ? { name: fault.message, isTaken: fault.code === 'duplicate' }
    : { elsewhere: message, isTaken: false };
}

const ofName = (searches: readonly SavedSearchView[], name: string) =>
  searches.find((search) => search.mine && search.name.toLowerCase() === name.trim().toLowerCase());
