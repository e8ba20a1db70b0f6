import { type DragEvent, useRef, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { Field, TextField } from '@/components/ui/Field';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { counted } from '@/features/desk/words';
import { DELIMITER_WORDS, ENCODING_WORDS, MARK_WORDS } from '@/features/imports/words';
import { FaultList } from './FaultList';
import { rowsCsv } from './file';
import type { ListActions } from './LinesZone';
import { isTouched, type Loaded } from './loaded';
import { type Refused, saidAt, saidElsewhere } from './refused';
import { markNameOf, type StockListView } from './stock';
import { stockApi } from './stock.api';
import { useLoad } from './use-load';

interface LoadZoneProps extends ListActions {
  readonly list: StockListView;
  readonly tableName: (slug: string) => string;
  readonly today: string;
}

type Load = ReturnType<typeof useLoad>;

/** Puts a supplier's newest list in the place of the old one. */
export function LoadZone({ list, tableName, today, act }: LoadZoneProps) {
  const load = useLoad(list.slug);
  const { loaded, problem, isBusy } = load;
  return (
    <section className="zone border-t border-ink">
      <ZoneHeading letter="B" note="replaces every line">
        Load a new list
      </ZoneHeading>
      <p role="alert" className="mb-8 font-semibold text-error empty:hidden">
        {problem}
      </p>
      {loaded ? (
        <>
          <ReadAs loaded={loaded} />
          {loaded.check.fault_count > 0 && (
            <FaultList
              loaded={loaded}
              tableName={tableName}
              onMend={load.mend}
              onLeaveOut={(lines) => void load.leaveOut(lines)}
            />
          )}
          <Keeping load={load} loaded={loaded} {...{ list, today, act }} />
        </>
      ) : (
        <Taking onRead={(name, content) => void load.read(name, content)} isBusy={isBusy} />
      )}
    </section>
  );
}

interface TakingProps {
  readonly onRead: (name: string, content: Blob) => void;
  readonly isBusy: boolean;
}

/** Takes a file by dragging or choosing, or what is pasted. */
function Taking({ onRead, isBusy }: TakingProps) {
  const [text, setText] = useState('');
  const [isOver, setOver] = useState(false);
  const take = (file: File | undefined) => {
    if (file) onRead(file.name, file);
  };
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    take(event.dataTransfer.files[0]);
  };
  return (
    <section
      aria-label="A new list"
      className={`grid gap-14 ${isOver ? 'bg-ochre-wash' : ''}`}
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
    >
      <p className="max-w-[70ch] text-ink-2">{WANTED}</p>
      <Pick onPick={take} />
      <TextField
        label="Lines of the list"
        rows={6}
        spellCheck={false}
        placeholder={'designation;stock lengths (m);lead time (days);price band\nIPE 300;6/12;3;B'}
        value={text}
        onChange={({ target }) => setText(target.value)}
      />
      <p>
        <Button
          onClick={() => onRead('What was pasted', new Blob([text]))}
          {...(text.trim() === '' && { reason: 'Paste some lines first.' })}
        >
          {isBusy ? 'Reading' : 'Read the lines'}
        </Button>
      </p>
    </section>
  );
}

const WANTED =
  'A table as text with a line of headings: designation, table, stock lengths (m), lead time (days), price band, note. Only the designation is needed; the table only where two have the section. 5 MB and 20,000 lines at most.';

function Pick({ onPick }: { onPick: (file: File | undefined) => void }) {
  const input = useRef<HTMLInputElement>(null);
  return (
    <p className="flex flex-wrap items-center gap-14">
      <input
        ref={input}
        type="file"
        accept=".csv,.txt,.tsv,text/csv,text/plain,text/tab-separated-values"
        aria-label="File of a stock list"
        className="sr-only"
        onChange={({ target }) => {
          onPick(target.files?.[0]);
          target.value = ''; // the same file may be chosen again once it is put right
        }}
      />
      <Button onClick={() => input.current?.click()}>Choose a file</Button>
      <span className="text-ink-2">or drop it here, or paste the lines:</span>
    </p>
  );
}

function ReadAs({ loaded: { name, file, rows, leftOut, check } }: { loaded: Loaded }) {
  const { delimiter, encoding, as, columns } = file;
  const ignored = columns.filter(({ field, heading }) => field === null && heading !== '');
  const words = [
    `${DELIMITER_WORDS[delimiter]} between cells`,
    ...(as.mark === null ? [] : [`decimal ${MARK_WORDS[as.mark]}`]),
    `lengths in ${as.lengthUnit}`,
    ENCODING_WORDS[encoding] ?? encoding,
  ];
  return (
    <div className="mb-10">
      <p role="status">
        {name}: <b className="font-semibold">{check.good}</b> of {counted(rows.length, 'line')} can be kept
        {leftOut > 0 && `, ${leftOut} left out`}.
      </p>
      <p className="text-schedule text-ink-2">Read with {words.join(', ')}.</p>
      {ignored.length > 0 && (
        <p className="text-schedule text-ink-2">
          Columns that are not read: {ignored.map(({ heading }) => heading).join(', ')}.
        </p>
      )}
    </div>
  );
}

interface KeepingProps extends ListActions {
  readonly load: Load;
  readonly loaded: Loaded;
  readonly list: StockListView;
  readonly today: string;
}

/** As of which day, and the press that keeps it. */
function Keeping({ load, loaded, list, today, act }: KeepingProps) {
  const [asOf, setAsOf] = useState('');
  const [refused, setRefused] = useState<Refused | null>(null);
  const { check, rows, file } = loaded;
  const isChanged = isTouched(loaded);
  const mustCheck = check.fault_count > 0 || isChanged;
  async function keep() {
    const given = { asOf, csv: rowsCsv(rows, file.as), mark: markNameOf(file.as.mark) };
    const answered = await act((version) => stockApi.replace(list.slug, version, given));
    if (answered === null) load.clear();
    setRefused(answered);
    load.say(saidElsewhere(answered, ['/as_of']));
  }
  return (
    <div className="mt-14 flex flex-wrap items-end gap-14">
      <div className="w-180">
        <Field
          label="This list is as of"
          type="date"
          required
          max={today}
          value={asOf}
          error={saidAt(refused, '/as_of')}
          onChange={({ target }) => {
            setAsOf(target.value);
            setRefused(null);
          }}
        />
      </div>
      {mustCheck ? (
        <Button
          onClick={() => void load.again()}
          {...(!isChanged && { reason: 'Put the lines right, or leave them out.' })}
        >
          {load.isBusy ? 'Checking' : 'Check again'}
        </Button>
      ) : (
        <Button
          onClick={() => void keep()}
          {...(asOf === '' && { reason: 'Say the day that the supplier said it.' })}
        >
          Keep {counted(rows.length, 'line')} in place of {list.lines}
        </Button>
      )}
      <PutAway {...{ loaded }} onPutAway={load.clear} />
    </div>
  );
}

interface PutAwayProps {
  readonly loaded: Loaded;
  readonly onPutAway: () => void;
}

/** Makes room for another list; asks first where lines of this one were put right or left out. */
function PutAway({ loaded: { rows, file }, onPutAway }: PutAwayProps) {
  const [isAsked, setAsked] = useState(false);
  const kept = new Set(rows);
  const changed = file.rows.filter((row) => !kept.has(row)).length;
  if (!isAsked)
    return (
      <Button tone="text" onClick={changed === 0 ? onPutAway : () => setAsked(true)}>
        Bring another list
      </Button>
    );
  return (
    <p className="flex flex-wrap items-center gap-10">
      <span>What you changed in {counted(changed, 'line')} goes with it.</span>
      <Button tone="text" onClick={onPutAway}>
        Put it away
      </Button>
      <Button tone="text" onClick={() => setAsked(false)}>
        Go on with it
      </Button>
    </p>
  );
}
