import type { Answer, Field, MappedColumn, Mapping } from '@/features/section/import/contract';
import { FIELD_NAMES, FIELDS, readsAs, unitsOf, unitWords } from './fields';
import type { ImportView } from './imports';

interface ColumnTableProps {
  readonly mapping: Mapping;
  readonly view: Pick<ImportView, 'columns' | 'guesses' | 'recognised'>;
  readonly isFixed: boolean;
  readonly onAnswer: (answer: Answer) => void;
}

/** Each column of the file: its first cells, what it goes to, in which unit it is, and what its first row reads then. */
export function ColumnTable({ mapping, view, isFixed, onAnswer }: ColumnTableProps) {
  const samples = new Map(view.columns.map((one) => [one.index, one.samples]));
  const guesses = new Map(view.guesses.map((one) => [one.column, one]));
  return (
    <table className="schedule import-columns">
      <thead>
        <tr>
          <th scope="col">In the file</th>
          <th scope="col" colSpan={3}>
            First three rows
          </th>
          <th scope="col">
            <span className="sr-only">goes to</span>
          </th>
          <th scope="col">Goes to</th>
          <th scope="col">Unit in file</th>
          <th scope="col" className="figure">
            First row reads
          </th>
        </tr>
      </thead>
      <tbody>
        {mapping.columns.map((column) => (
          <ColumnRow
            key={column.index}
            column={column}
            samples={samples.get(column.index) ?? []}
            guess={guesses.get(column.index)}
            reads={readsAs(view.recognised.preview[0]?.[column.index] ?? '', column, mapping.decimalMark)}
            areAxesSaid={mapping.axes !== null}
            isFixed={isFixed}
            onAnswer={onAnswer}
          />
        ))}
      </tbody>
    </table>
  );
}

interface RowProps {
  readonly column: MappedColumn;
  readonly samples: readonly string[];
  readonly guess: ImportView['guesses'][number] | undefined;
  /** What the first row's cell is read as. */
  readonly reads: string;
  readonly areAxesSaid: boolean;
  readonly isFixed: boolean;
  readonly onAnswer: (answer: Answer) => void;
}

function ColumnRow({ column, samples, guess, reads, areAxesSaid, isFixed, onAnswer }: RowProps) {
  const { index, heading, field, unit } = column;
  const isNumber = field !== null && FIELDS[field].quantity !== null;
  const isAsked = isNumber && unit === null;
  const waits = field === null && column.byAxes !== undefined && !areAxesSaid;
  // What a heading means by the axes is asked for in words.
  const isUnsure = field !== null && !column.byAxes && guess?.confidence === 'unsure';
  return (
    <tr data-left-out={(field === null && !waits) || undefined} title={guess?.reason}>
      <th scope="row">{heading || `Column ${index + 1}`}</th>
      {[0, 1, 2].map((place) => (
        <td key={place} className="raw figure">
          {samples[place] ?? ''}
        </td>
      ))}
      <td className="arrow">
        <Arrow isDashed={field === null && !waits} />
      </td>
      <td className="goes">
        <select
          className="input"
          aria-label={`What ${heading} is`}
          aria-invalid={isUnsure || undefined}
          disabled={isFixed}
          value={field ?? ''}
          onChange={({ target }) =>
            onAnswer({ kind: 'field', column: index, value: (target.value || null) as Field | null })
          }
        >
          <option value="">{waits ? 'By its axes: see B' : 'Leave out'}</option>
          {FIELD_NAMES.map((name) => (
            <option key={name} value={name}>
              {FIELDS[name].label}
            </option>
          ))}
        </select>
      </td>
      <UnitCell {...{ column, isFixed, onAnswer }} />
      <td className="figure reads" data-asked={isAsked || waits || undefined}>
        {waits ? 'axes not said' : isAsked ? 'unit not said' : reads}
      </td>
    </tr>
  );
}

function UnitCell({ column, isFixed, onAnswer }: Pick<RowProps, 'column' | 'isFixed' | 'onAnswer'>) {
  const { index, heading, field, unit, factor } = column;
  const isAsked = unit === null;
  if (field === null || FIELDS[field].quantity === null) return <td className="unit">–</td>;
  return (
    <td className="unit">
      <select
        className="input"
        aria-label={`Unit of ${heading}`}
        data-asked={isAsked || undefined}
        disabled={isFixed}
        value={unit ?? ''}
        onChange={({ target }) => onAnswer({ kind: 'unit', column: index, value: target.value })}
      >
        {isAsked && <option value="">Which?</option>}
        {unitsOf(field, unit).map((one) => (
          <option key={one} value={one}>
            {unitWords(one)}
          </option>
        ))}
      </select>
      {factor !== 1 && <small>times {factor}</small>}
    </td>
  );
}

function Arrow({ isDashed }: { isDashed: boolean }) {
  return (
    <svg
      width="26"
      height="10"
      viewBox="0 0 26 10"
      aria-hidden="true"
      fill="none"
      className="inline stroke-ink-2"
    >
      {isDashed ? <path d="M1 5h22" strokeDasharray="4 3" /> : <path d="M1 5h23M18 2l7 3-7 3" />}
    </svg>
  );
}
