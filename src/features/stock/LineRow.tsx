import { type SyntheticEvent, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { ChoiceField, Field } from '@/components/ui/Field';
import type { UnitSystemName } from '@/engine/quantity';
import { shownName } from '@/features/section/display';
import { paths } from '@/paths';
import { BY_HAND, readHolding } from './cells';
import { type Holding, PRICE_BANDS, type StockLine } from './stock';
import { leadWords, lengthsWords } from './words';

export interface LineActions {
  /** What is wrong, by field; null when it is kept. */
  readonly onChange: (line: StockLine, held: Holding) => Promise<string | null>;
  readonly onRemove: (line: StockLine) => Promise<string | null>;
}

interface LineRowProps extends Partial<LineActions> {
  readonly line: StockLine;
  readonly tableName: string;
  readonly system: UnitSystemName;
}

/** One section of a list, to be read and, by a librarian, changed in its place. */
export function LineRow({ line, tableName, system, onChange, onRemove }: LineRowProps) {
  const [mode, setMode] = useState<'read' | 'edit'>('read');
  const { table, designation, in_library: isKnown } = line;
  if (mode === 'edit' && onChange)
    return (
      <tr>
        <td colSpan={7} className="bg-paper-2">
          <HoldingForm
            title={`${shownName(designation)}, ${tableName}`}
            takesFocus
            held={line}
            onKeep={(held) => onChange(line, held)}
            onClose={() => setMode('read')}
          />
        </td>
      </tr>
    );
  return (
    <tr>
      <th scope="row">
        {isKnown ? (
          <a className="link" href={paths.section(table, designation)}>
            {shownName(designation)}
          </a>
        ) : (
          shownName(designation)
        )}
      </th>
      <td data-label="Table">
        <span>{isKnown ? tableName : `${tableName}: no longer in an issued edition`}</span>
      </td>
      <td data-label="Stock lengths">{lengthsWords(line.lengths_m, system)}</td>
      <td data-label="Lead time">{leadWords(line.lead_time_days)}</td>
      <td data-label="Price band">{line.price_band ?? '–'}</td>
      <td data-label="Note" className="wrap-anywhere">
        {line.note === '' ? '–' : line.note}
      </td>
      {onRemove && (
        <td className="py-0! whitespace-nowrap">
          <RowActions
            designation={designation}
            onChange={() => setMode('edit')}
            onRemove={() => onRemove(line)}
          />
        </td>
      )}
    </tr>
  );
}

interface RowActionsProps {
  readonly designation: string;
  readonly onChange: () => void;
  readonly onRemove: () => Promise<string | null>;
}

function RowActions({ designation, onChange, onRemove }: RowActionsProps) {
  const [isAsked, setAsked] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  return (
    <>
      <span className="inline-flex flex-wrap items-center gap-x-10">
        {isAsked ? (
          <>
            <Button
              tone="text"
              onClick={async () => setProblem(await onRemove())}
              aria-label={`Take out ${designation}`}
            >
              Take out
            </Button>
            <Button tone="text" onClick={() => setAsked(false)}>
              Keep
            </Button>
          </>
        ) : (
          <>
            <Button tone="text" onClick={onChange} aria-label={`Change ${designation}`}>
              Change
            </Button>
            <Button tone="text" onClick={() => setAsked(true)} aria-label={`Remove ${designation}`}>
              Remove
            </Button>
          </>
        )}
      </span>
      {problem && (
        <p role="alert" className="pb-6 font-semibold whitespace-normal text-error">
          {problem}
        </p>
      )}
    </>
  );
}

const BANDS = [{ value: '', label: 'Not said' }, ...PRICE_BANDS.map((value) => ({ value, label: value }))];

interface HoldingFormProps {
  readonly title: string;
  readonly takesFocus?: boolean;
  readonly held: Holding;
  /** What is wrong, empty where it is said elsewhere; null when it is kept. */
  readonly onKeep: (held: Holding) => Promise<string | null>;
  readonly onClose: () => void;
}

const textsOf = ({ lengths_m, lead_time_days, price_band, note }: Holding) => ({
  lengths: lengths_m.join('; '),
  lead_time: lead_time_days === null ? '' : String(lead_time_days),
  price_band: price_band ?? '',
  note,
});
type HeldTexts = ReturnType<typeof textsOf>;

/** What a supplier holds, as typed; read as a cell of a list is. */
export function HoldingForm({ title, takesFocus = false, held, onKeep, onClose }: HoldingFormProps) {
  const [texts, setTexts] = useState<HeldTexts>(() => textsOf(held));
  const [problem, setProblem] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const read = readHolding({ designation: title, table: '', ...texts }, BY_HAND);
  const error = (name: keyof HeldTexts) =>
    'lengths_m' in read ? undefined : read.find(({ field }) => field === name)?.message;
  const field = (name: keyof HeldTexts) => ({
    value: texts[name],
    error: error(name),
    autoComplete: 'off',
    onChange: ({ target }: { target: { value: string } }) => setTexts({ ...texts, [name]: target.value }),
  });
  async function keep(event: SyntheticEvent) {
    event.preventDefault();
    if (!('lengths_m' in read) || isBusy) return;
    setBusy(true);
    const refused = await onKeep(read);
    setBusy(false);
    setProblem(refused);
    if (refused === null) onClose();
  }
  return (
    <form
      onSubmit={keep}
      onKeyDown={({ key }) => key === 'Escape' && onClose()}
      aria-label={title}
      className="grid w-full gap-10 py-6 text-left"
    >
      <p className="font-semibold">{title}</p>
      <div className="grid grid-cols-[minmax(0,2fr)_minmax(0,1fr)_minmax(0,1fr)_minmax(0,2fr)] gap-14 max-md:grid-cols-2">
        <Field label="Stock lengths, m" placeholder="6; 12" autoFocus={takesFocus} {...field('lengths')} />
        <Field label="Lead time, days" inputMode="numeric" {...field('lead_time')} />
        <ChoiceField label="Price band" choices={BANDS} {...field('price_band')} />
        <Field label="Note" maxLength={200} {...field('note')} />
      </div>
      {problem && (
        <p role="alert" className="font-semibold text-error">
          {problem}
        </p>
      )}
      <p className="flex gap-10">
        <Button type="submit" size="small">
          {isBusy ? 'Saving' : 'Save the line'}
        </Button>
        <Button size="small" tone="text" onClick={onClose}>
          Leave it
        </Button>
      </p>
    </form>
  );
}
