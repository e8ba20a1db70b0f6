import { type KeyboardEvent, type SyntheticEvent, useState } from 'react';
import { Button } from '@/components/ui/Button';
import type { Finding } from '@/features/section/import/contract';
import { mayAccept } from '@/features/section/import/report';
import type { Accept, Fixes, ImportView } from './imports';
import { Symbols } from './Symbols';

export interface Deeds {
  readonly onFix: (fixes: Partial<Fixes>) => void;
  readonly onAccept: (accept: Accept) => void;
  /** Nothing can be done now: somebody is at it, or may not. */
  readonly isOff: boolean;
  /** The line that rows begin in. */
  readonly firstRow: number;
}

interface FindingItemProps extends Deeds {
  readonly finding: Finding;
  readonly accepted: ImportView['acceptances'][number] | undefined;
}

const MARKS = { error: '×', warning: '!', note: 'i' } as const;

/** One finding: where it is, what was read and expected, why, and what can be done about it. */
export function FindingItem({ finding, accepted, isOff, firstRow, onFix, onAccept }: FindingItemProps) {
  const { key, severity, line, heading, designation, message, read, expected, formula } = finding;
  return (
    <li
      id={`finding-${key}`}
      data-severity={severity}
      data-finding={key}
      tabIndex={-1}
      className="import-finding"
    >
      <span className="mark" aria-hidden="true">
        {MARKS[severity]}
      </span>
      <span className="text-ink-2">
        <span className="sr-only">{severity}, </span>
        {line === null ? 'whole column' : `line ${line}`}
      </span>
      <div className="min-w-0">
        <p className="wrap-anywhere">
          <Place {...{ designation, heading }} />
          <Symbols text={message} />
        </p>
        <Values {...{ read, expected, formula }} />
        {accepted ? (
          <p className="mt-4 text-ink-2">
            Accepted by {accepted.by}: <i>{accepted.reason}</i>
          </p>
        ) : (
          !isOff && <Choices {...{ finding, firstRow, onFix, onAccept }} />
        )}
      </div>
    </li>
  );
}

function Place({ designation, heading }: Pick<Finding, 'designation' | 'heading'>) {
  const words = [designation, heading].filter(Boolean).join(', ');
  return words === '' ? null : <b className="font-semibold">{words}: </b>;
}

function Values({ read, expected, formula }: Pick<Finding, 'read' | 'expected' | 'formula'>) {
  if (read === '' && expected === null && formula === null) return null;
  return (
    <dl className="mt-2 flex flex-wrap gap-x-14 text-note text-ink-2">
      {read !== '' && (
        <div>
          <dt className="inline">read </dt>
          <dd className="inline wrap-anywhere text-ink">
            {read.length > 120 ? `${read.slice(0, 120)}…` : read}
          </dd>
        </div>
      )}
      {expected !== null && (
        <div>
          <dt className="inline">expected </dt>
          <dd className="inline text-ink">{expected}</dd>
        </div>
      )}
      {formula !== null && (
        <div>
          <dt className="sr-only">by</dt>
          <dd className="inline">
            <Symbols text={formula} />
          </dd>
        </div>
      )}
    </dl>
  );
}

type ChoicesProps = Pick<FindingItemProps, 'finding' | 'firstRow' | 'onFix' | 'onAccept'>;

/** What the report offers, then a value typed by hand, leaving the row out, or accepting it with a reason. */
function Choices({ finding, firstRow, onFix, onAccept }: ChoicesProps) {
  const { key, line, column, fixes } = finding;
  const [isTyping, setTyping] = useState(false);
  const [isAccepting, setAccepting] = useState(false);
  const isRow = line !== null && line >= firstRow;
  const drops = fixes.some(({ edit }) => edit.kind === 'drop_row');
  return (
    <div className="mt-4 flex flex-wrap items-center gap-x-14 gap-y-4">
      {fixes.map(({ label }, fix) => (
        <Button key={label} tone="text" onClick={() => onFix({ apply: [{ finding: key, fix }] })}>
          {label}
        </Button>
      ))}
      {line !== null && column !== null && (
        <Button tone="text" aria-expanded={isTyping} onClick={() => setTyping(!isTyping)}>
          Type another value
        </Button>
      )}
      {line !== null && !drops && isRow && finding.severity === 'error' && (
        <Button tone="text" onClick={() => onFix({ leave_out: [line] })}>
          Leave out line {line}
        </Button>
      )}
      {mayAccept(finding) && (
        <Button tone="text" aria-expanded={isAccepting} onClick={() => setAccepting(!isAccepting)}>
          Accept
        </Button>
      )}
      {isTyping && line !== null && column !== null && (
        <OneField
          label={`Value of ${finding.heading} in line ${line}`}
          word="Put right"
          start={finding.read}
          onGiven={(value) => onFix({ cells: [{ line, column, value }] })}
          onClose={() => setTyping(false)}
        />
      )}
      {isAccepting && (
        <OneField
          label="Why it is right as it stands"
          word="Accept with this reason"
          start=""
          least={3}
          onGiven={(reason) => onAccept({ keys: [key], reason })}
          onClose={() => setAccepting(false)}
        />
      )}
    </div>
  );
}

interface OneFieldProps {
  readonly label: string;
  readonly word: string;
  readonly start: string;
  readonly least?: number;
  readonly onGiven: (value: string) => void;
  readonly onClose: () => void;
}

/** A field and its button, in the line. Escape closes it, back at the button that opened it. */
export function OneField({ label, word, start, least = 0, onGiven, onClose }: OneFieldProps) {
  const [value, setValue] = useState(start);
  const send = (event: SyntheticEvent) => {
    event.preventDefault();
    if (value.trim().length >= least) onGiven(value.trim());
  };
  const leave = ({ key, currentTarget }: KeyboardEvent<HTMLFormElement>) => {
    if (key !== 'Escape') return;
    currentTarget.parentElement?.querySelector<HTMLElement>('[aria-expanded="true"]')?.focus();
    onClose();
  };
  return (
    <form onSubmit={send} onKeyDown={leave} className="flex w-full flex-wrap items-end gap-10">
      <label className="min-w-0 flex-1 basis-208">
        <span className="caps mb-2 block">{label}</span>
        <input
          className="input"
          value={value}
          minLength={least || undefined}
          required={least > 0}
          // biome-ignore lint/a11y/noAutofocus: it appears because it was asked for
          autoFocus
          onChange={({ target }) => setValue(target.value)}
        />
      </label>
      <Button type="submit" size="small">
        {word}
      </Button>
    </form>
  );
}
