import { useState } from 'react';
import { Button } from '@/components/ui/Button';
import { ChoiceField, Field } from '@/components/ui/Field';
import { HoldingForm } from './LineRow';
import type { Holding, NewStockLine } from './stock';

const NOTHING: Holding = { lengths_m: [], lead_time_days: null, price_band: null, note: '' };

interface AddLineProps {
  readonly tables: readonly { readonly slug: string; readonly name: string }[];
  readonly onAdd: (line: NewStockLine) => Promise<string | null>;
}

/** A line that is added by hand. */
export function AddLine({ tables, onAdd }: AddLineProps) {
  const [isOpen, setOpen] = useState(false);
  const [designation, setDesignation] = useState('');
  const [table, setTable] = useState('');
  const [problem, setProblem] = useState<string | null>(null);
  if (!isOpen)
    return (
      <p className="mt-10">
        <Button onClick={() => setOpen(true)}>Add a line</Button>
      </p>
    );
  const choices = [
    { value: '', label: 'The only one that has it' },
    ...tables.map(({ slug, name }) => ({ value: slug, label: name })),
  ];
  const close = () => {
    setOpen(false);
    setDesignation('');
    setProblem(null);
  };
  async function add(held: Holding): Promise<string | null> {
    const refused = await onAdd({ designation, ...(table !== '' && { table }), ...held });
    setProblem(refused);
    return refused === null ? null : '';
  }
  return (
    <section aria-label="A new line" className="mt-10 border border-rule-strong px-14 py-10">
      <div className="grid max-w-620 grid-cols-2 gap-14 max-md:grid-cols-1">
        <Field
          label="Designation"
          placeholder="IPE 300"
          autoFocus
          autoComplete="off"
          spellCheck={false}
          maxLength={100}
          value={designation}
          error={problem ?? undefined}
          onChange={({ target }) => setDesignation(target.value)}
        />
        <ChoiceField
          label="Section table"
          choices={choices}
          value={table}
          onChange={({ target }) => setTable(target.value)}
        />
      </div>
      <HoldingForm title="What the supplier holds of it" held={NOTHING} onClose={close} onKeep={add} />
    </section>
  );
}
