import { useState } from 'react';
import { Button } from '@/components/ui/Button';
import type { UnitSystemName } from '@/engine/quantity';
import { shownName } from '@/features/section/display';
import { paths } from '@/paths';
import { HoldingForm } from './HoldingForm';
import { type Refused, saidElsewhere } from './refused';
import type { Holding, StockLine } from './stock';
import { leadWords, lengthsWords } from './words';

export interface LineActions {
  /** What is wrong; null when it is kept. */
  readonly onChange: (line: StockLine, held: Holding) => Promise<Refused | null>;
  readonly onRemove: (line: StockLine) => Promise<Refused | null>;
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
  readonly onRemove: () => Promise<Refused | null>;
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
              onClick={async () => setProblem(saidElsewhere(await onRemove(), []))}
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
