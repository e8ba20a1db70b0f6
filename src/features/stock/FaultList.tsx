import { Button } from '@/components/ui/Button';
import { ChoiceField, Field } from '@/components/ui/Field';
import { counted } from '@/features/desk/words';
import { shownName } from '@/features/section/display';
import { groupBy } from '@/lib/group-by';
import type { StockField } from './cells';
import type { StockRow } from './file';
import { checkedRow, type LineFault, type Loaded } from './loaded';
import { PRICE_BANDS } from './stock';

const FIELD_WORDS: Readonly<Record<StockField, string>> = {
  designation: 'Designation',
  table: 'Section table',
  lengths: 'Stock lengths',
  lead_time: 'Lead time',
  price_band: 'Price band',
  note: 'Note',
};
const isField = (name: string): name is StockField => name in FIELD_WORDS;

const MOST_SHOWN = 50;

interface FaultListProps {
  readonly loaded: Loaded;
  readonly tableName: (slug: string) => string;
  readonly onMend: (row: StockRow, texts: Partial<Record<StockField, string>>) => void;
  readonly onLeaveOut: (lines: ReadonlySet<number>) => void;
}

/** Lines that cannot be kept as they are, each with what may be done about it. */
export function FaultList({ loaded, tableName, onMend, onLeaveOut }: FaultListProps) {
  const { check, rows } = loaded;
  const current = new Map(rows.map((row) => [row.line, row]));
  const found = check.faults.flatMap((fault) => {
    const before = checkedRow(loaded, fault);
    const row = before && current.get(before.line);
    return before && row ? [{ fault, before, row }] : [];
  });
  const byLine = [...groupBy(found, ({ row }) => row.line)];
  const lines = new Set(byLine.map(([line]) => line));
  return (
    <>
      <div className="flex flex-wrap items-center gap-14">
        <p className="font-semibold">
          {counted(rows.length - check.good, 'line')} cannot be kept as{' '}
          {rows.length - check.good === 1 ? 'it is' : 'they are'}.
        </p>
        <Button size="small" onClick={() => onLeaveOut(lines)}>
          Leave {lines.size === 1 ? 'it' : `all ${lines.size}`} out
        </Button>
        {check.fault_count > check.faults.length && (
          <span className="text-ink-2">These are the first; the others come after them.</span>
        )}
      </div>
      <ol className="mt-8 border-t border-rule">
        {byLine.slice(0, MOST_SHOWN).map(([line, faults]) => (
          <li key={line} className="border-b border-rule py-10">
            <FaultyLine line={line} found={faults} {...{ tableName, onMend, onLeaveOut }} />
          </li>
        ))}
      </ol>
      {byLine.length > MOST_SHOWN && (
        <p className="mt-8 text-ink-2">
          And {counted(byLine.length - MOST_SHOWN, 'more line', 'more lines')}: put these right first, or
          leave all out.
        </p>
      )}
    </>
  );
}

interface FoundFault {
  readonly fault: LineFault;
  /** The row when it was checked, and as it stands. */
  readonly before: StockRow;
  readonly row: StockRow;
}

interface FaultyLineProps extends Omit<FaultListProps, 'loaded'> {
  readonly line: number;
  readonly found: readonly FoundFault[];
}

function FaultyLine({ line, found, tableName, onMend, onLeaveOut }: FaultyLineProps) {
  return (
    <div className="grid gap-8">
      <div className="flex flex-wrap items-center gap-x-14 gap-y-4">
        <span>
          Line {line}:{' '}
          <b className="font-semibold">{found[0]?.before.texts.designation || 'no designation'}</b>
        </span>
        <Button tone="text" onClick={() => onLeaveOut(new Set([line]))} aria-label={`Leave out line ${line}`}>
          Leave out
        </Button>
      </div>
      {found.map(({ fault, before, row }) =>
        isField(fault.field) ? (
          <div key={fault.field + fault.code} className="grid max-w-620 gap-4">
            <FaultField field={fault.field} {...{ fault, before, row, tableName, onMend }} />
            <Suggestions {...{ fault, row, tableName, onMend }} />
          </div>
        ) : (
          <p key={fault.code} role="alert" className="max-w-620 font-semibold text-error">
            {fault.message}
          </p>
        ),
      )}
    </div>
  );
}

interface FaultFieldProps extends FoundFault, Pick<FaultListProps, 'tableName' | 'onMend'> {
  readonly field: StockField;
}

function FaultField({ fault, field, before, row, tableName, onMend }: FaultFieldProps) {
  const value = row.texts[field];
  const isMended = value !== before.texts[field];
  const control = {
    label: `${FIELD_WORDS[field]}, line ${row.line}`,
    value,
    error: isMended ? undefined : fault.message,
    help: isMended ? 'Changed. Check again to see whether it can be kept.' : undefined,
    onChange: ({ target }: { target: { value: string } }) => onMend(row, { [field]: target.value }),
  };
  if (fault.code === 'several_tables') {
    const choices = fault.suggestions.map(({ table }) => ({ value: table, label: tableName(table) }));
    return <ChoiceField {...control} choices={[{ value: '', label: 'Say which' }, ...choices]} />;
  }
  if (field === 'price_band') {
    const bands: readonly string[] = PRICE_BANDS;
    const choices = bands.map((band) => ({ value: band, label: band }));
    const asRead = bands.includes(value) || value === '' ? [] : [{ value, label: `${value}, as read` }];
    return <ChoiceField {...control} choices={[...asRead, { value: '', label: 'Not said' }, ...choices]} />;
  }
  return <Field {...control} autoComplete="off" spellCheck={false} />;
}

type SuggestionsProps = Omit<FaultFieldProps, 'before' | 'field'>;

function Suggestions({ fault, row, tableName, onMend }: SuggestionsProps) {
  if (fault.code !== 'unknown_section' || fault.suggestions.length === 0) return null;
  return (
    <p className="flex flex-wrap items-center gap-10 text-schedule">
      <span className="text-ink-2">Perhaps</span>
      {fault.suggestions.map(({ table, designation }) => (
        <Button
          key={`${table} ${designation}`}
          size="small"
          onClick={() => onMend(row, { designation, table })}
        >
          {shownName(designation)}, {tableName(table)}
        </Button>
      ))}
    </p>
  );
}
