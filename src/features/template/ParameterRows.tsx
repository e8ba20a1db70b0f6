import { useId, useRef } from 'react';
import { Button } from '@/components/ui/Button';
import { FieldNote } from '@/components/ui/Field';
import { readQuantity, type UnitSystemName, unitText } from '@/engine/quantity';
import type { Column, RowsParameter } from '@/engine/template';
import type { FieldFaults } from './faults';
import type { LoadGroup } from './MeasuredField';
import { newRow, type RawRow } from './raw';

interface ParameterRowsProps {
  readonly parameter: RowsParameter;
  readonly rows: readonly RawRow[];
  readonly system: UnitSystemName;
  readonly faults: FieldFaults;
  readonly groups: readonly LoadGroup[];
  readonly onChange: (rows: readonly RawRow[]) => void;
}

/** Load groups that every practice knows; a job's own criteria may name more. */
const USUAL_GROUPS: readonly LoadGroup[] = [
  { group: 'G', name: 'permanent' },
  { group: 'Q', name: 'imposed' },
  { group: 'S', name: 'snow' },
  { group: 'W', name: 'wind' },
];

/** A parameter that is a list: one line for each row. */
export function ParameterRows({ parameter, rows, system, faults, groups, onChange }: ParameterRowsProps) {
  const { symbol, name, help, most, least } = parameter;
  const id = useId();
  const list = useRef<HTMLOListElement>(null);
  // A new row is typed next; one taken out leaves the focus on the row before it.
  const goTo = (index: number) =>
    requestAnimationFrame(() => list.current?.children[index]?.querySelector('input')?.focus());
  const put = (index: number, column: string, cell: RawRow[string]) =>
    onChange(rows.map((row, at) => (at === index ? { ...row, [column]: cell } : row)));
  return (
    <fieldset data-symbol={symbol} className="border-t border-rule px-(--pad) py-10">
      <legend className="caps float-left mb-6 w-full">{name}</legend>
      <FieldNote id={`${id}-help`} help={help} error={faults.get(symbol)} />
      <ol ref={list} className="clear-both mt-6 grid gap-x-28 gap-y-4 lg:grid-cols-2">
        {rows.map((row, index) => (
          <Row
            // biome-ignore lint/suspicious/noArrayIndexKey: a row has no identity but its place
            key={index}
            parameter={parameter}
            row={row}
            index={index}
            groups={groups.length > 0 ? groups : USUAL_GROUPS}
            faults={faults}
            onPut={(column, cell) => put(index, column, cell)}
            onTakeOut={
              rows.length > least
                ? () => {
                    onChange(rows.filter((_, at) => at !== index));
                    goTo(Math.max(0, index - 1));
                  }
                : undefined
            }
          />
        ))}
      </ol>
      <div className="mt-8">
        <Button
          size="small"
          reason={rows.length >= most ? `At most ${most} rows.` : undefined}
          onClick={() => {
            onChange([...rows, newRow(parameter, system)]);
            goTo(rows.length);
          }}
        >
          Add a row
        </Button>
      </div>
    </fieldset>
  );
}

interface RowProps extends Pick<ParameterRowsProps, 'parameter' | 'faults' | 'groups'> {
  readonly row: RawRow;
  readonly index: number;
  readonly onPut: (column: string, cell: RawRow[string]) => void;
  /** Left out where no row can be spared. */
  readonly onTakeOut: (() => void) | undefined;
}

function Row({ parameter, row, index, groups, faults, onPut, onTakeOut }: RowProps) {
  const { symbol, name, columns } = parameter;
  const id = useId();
  return (
    <li className="flex flex-wrap items-start gap-10">
      <span className="min-w-18 pt-7 text-right text-schedule text-ink-2 max-md:w-full max-md:pt-4 max-md:text-left">
        {index + 1}
      </span>
      {columns.map((column) => (
        <Cell
          key={column.symbol}
          column={column}
          place={`${name} ${index + 1}`}
          cell={row[column.symbol] ?? ''}
          groups={groups}
          error={faults.get(`${symbol}/${index}/${column.symbol}`)}
          onChange={(cell) => onPut(column.symbol, cell)}
        />
      ))}
      <span className="flex min-h-34 items-center">
        <Button
          tone="text"
          aria-label={`Remove row ${index + 1} of ${name}`}
          onClick={onTakeOut}
          reason={onTakeOut ? undefined : 'One row is needed.'}
        >
          Remove
        </Button>
      </span>
      <FieldNote id={id} error={faults.get(`${symbol}/${index}`)} />
    </li>
  );
}

interface CellProps {
  readonly column: Column;
  readonly place: string;
  readonly cell: RawRow[string];
  readonly groups: readonly LoadGroup[];
  readonly error: string | undefined;
  readonly onChange: (cell: RawRow[string]) => void;
}

function Cell({ column, place, cell, groups, error, onChange }: CellProps) {
  const id = useId();
  const label = `${column.name}, ${place}`;
  if (column.kind === 'group' || typeof cell === 'string')
    return (
      <select
        aria-label={label}
        className="input max-w-180"
        value={String(cell)}
        onChange={(event) => onChange(event.target.value)}
      >
        {groups.every(({ group }) => group !== cell) && <option value={String(cell)}>{String(cell)}</option>}
        {groups.map(({ group, name }) => (
          <option key={group} value={group}>
            {group}, {name}
          </option>
        ))}
      </select>
    );
  const reading = readQuantity(cell.text, column.dimension, { unit: cell.unit });
  const wrong = reading.ok ? error : reading.message;
  return (
    <div className="w-150 max-md:min-w-120 max-md:flex-1">
      <div className="flex items-baseline border-b-[1.5px] border-ink bg-field focus-within:outline-2 focus-within:outline-ochre">
        <i className="pl-6 font-semibold">{column.symbol}</i>
        <input
          id={id}
          aria-label={label}
          aria-invalid={wrong ? true : undefined}
          aria-describedby={`${id}-note`}
          autoComplete="off"
          value={cell.text}
          onChange={(event) => onChange({ text: event.target.value, unit: cell.unit })}
          className={`min-h-34 w-full min-w-0 px-6 text-[1rem] outline-none pointer-coarse:min-h-44 ${wrong ? 'text-error' : ''}`}
        />
        <span className="pr-6 text-schedule whitespace-nowrap text-ink-2">
          {cell.unit === 'ft-in' ? 'ft, in' : unitText(cell.unit)}
        </span>
      </div>
      <FieldNote id={`${id}-note`} error={wrong} />
    </div>
  );
}
