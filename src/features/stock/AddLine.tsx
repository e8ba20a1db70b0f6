import { useState } from 'react';
import { Button } from '@/components/ui/Button';
import { ChoiceField, Field } from '@/components/ui/Field';
import { HoldingForm } from './HoldingForm';
import { type Refused, saidAt } from './refused';
import type { Holding, NewStockLine } from './stock';

const NOTHING: Holding = { lengths_m: [], lead_time_days: null, price_band: null, note: '' };

interface AddLineProps {
  readonly tables: readonly { readonly slug: string; readonly name: string }[];
  readonly onAdd: (line: NewStockLine) => Promise<Refused | null>;
}

/** A line that is added by hand. */
export function AddLine(props: AddLineProps) {
  const [isOpen, setOpen] = useState(false);
  if (isOpen) return <NewLine {...props} onClose={() => setOpen(false)} />;
  return (
    <p className="mt-10">
      <Button onClick={() => setOpen(true)}>Add a line</Button>
    </p>
  );
}

function NewLine({ tables, onAdd, onClose }: AddLineProps & { readonly onClose: () => void }) {
  const [designation, setDesignation] = useState('');
  const [table, setTable] = useState('');
  const [refused, setRefused] = useState<Refused | null>(null);
  const choices = [
    { value: '', label: 'The only one that has it' },
    ...tables.map(({ slug, name }) => ({ value: slug, label: name })),
  ];
  const typed =
    (set: (value: string) => void) =>
    ({ target }: { target: { value: string } }) => {
      set(target.value);
      setRefused(null);
    };
  async function add(held: Holding): Promise<Refused | null> {
    const answered = await onAdd({ designation, ...(table !== '' && { table }), ...held });
    setRefused(answered);
    return answered;
  }
  return (
    <section aria-label="A new line" className="mt-10 border border-rule-strong px-14 py-10">
      <HoldingForm
        title="What the supplier holds of it"
        held={NOTHING}
        saysAt={['/designation', '/table']}
        onClose={onClose}
        onKeep={add}
      >
        <div className="grid max-w-620 grid-cols-2 gap-14 max-md:grid-cols-1">
          <Field
            label="Designation"
            placeholder="IPE 300"
            autoFocus
            autoComplete="off"
            spellCheck={false}
            maxLength={100}
            value={designation}
            error={saidAt(refused, '/designation')}
            onChange={typed(setDesignation)}
          />
          <ChoiceField
            label="Section table"
            choices={choices}
            value={table}
            error={saidAt(refused, '/table')}
            onChange={typed(setTable)}
          />
        </div>
      </HoldingForm>
    </section>
  );
}
