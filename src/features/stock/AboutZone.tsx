import { type SyntheticEvent, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { Field, TextField } from '@/components/ui/Field';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { read } from '@/lib/read';
import { paths } from '@/paths';
import type { ListActions } from './LinesZone';
import { type Refused, saidAt, saidElsewhere } from './refused';
import { StockListChange, type StockListView } from './stock';
import { stockApi } from './stock.api';
import { goneWords } from './words';

interface AboutZoneProps extends ListActions {
  readonly list: StockListView;
  readonly today: string;
}

/** What is said of the list itself, and its removal. */
export function AboutZone({ list, today, act }: AboutZoneProps) {
  /** Only what was typed: the rest follows the list. */
  const [typed, setTyped] = useState<StockListChange>({});
  const [refused, setRefused] = useState<Refused | null>(null);
  const [done, setDone] = useState('');
  const reading = read(StockListChange, typed);
  const error = (name: keyof StockListChange) =>
    saidAt(reading.ok ? refused : { message: '', faults: reading.faults }, `/${name}`);
  const field = (name: keyof StockListChange) => ({
    value: typed[name] ?? list[name],
    error: error(name),
    onChange: ({ target }: { target: { value: string } }) => {
      setTyped({ ...typed, [name]: target.value });
      setRefused(null);
      setDone('');
    },
  });
  async function save(event: SyntheticEvent) {
    event.preventDefault();
    if (Object.keys(typed).length === 0) return setDone('Nothing has changed.');
    if (!reading.ok) return;
    const answered = await act((version) => stockApi.change(list.slug, version, reading.value));
    if (answered === null) setTyped({});
    setRefused(answered);
    setDone(answered === null ? 'Saved.' : '');
  }
  const problem = saidElsewhere(refused, ['/supplier', '/as_of', '/note']);
  return (
    <section className="zone">
      <ZoneHeading letter="C">About this list</ZoneHeading>
      <form onSubmit={save} className="grid gap-14" noValidate>
        <Field label="Supplier" maxLength={100} {...field('supplier')} />
        <Field
          label="Stock as of"
          type="date"
          max={today}
          help="The day that the supplier said it, not the day that it was typed."
          {...field('as_of')}
        />
        <TextField label="Note" rows={3} maxLength={2000} {...field('note')} />
        <p className="flex flex-wrap items-center gap-14">
          <Button type="submit">Save</Button>
          <span role="status" className={problem ? 'font-semibold text-error' : 'text-ink-2'}>
            {problem ?? done}
          </span>
        </p>
      </form>
      <Removal list={list} act={act} />
    </section>
  );
}

function Removal({ list, act }: Pick<AboutZoneProps, 'list' | 'act'>) {
  const [isAsked, setAsked] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  async function remove() {
    const refused = await act((version) => stockApi.remove(list.slug, version));
    if (refused === null) location.assign(paths.stock);
    else setProblem(saidElsewhere(refused, []));
  }
  return (
    <div className="mt-20 border-t border-rule pt-10">
      {isAsked ? (
        <p className="flex flex-wrap items-center gap-10">
          <span>{goneWords(list.lines)} The record keeps that it was.</span>
          <Button size="small" onClick={() => void remove()}>
            Remove for good
          </Button>
          <Button tone="text" onClick={() => setAsked(false)}>
            Keep it
          </Button>
        </p>
      ) : (
        <Button tone="text" onClick={() => setAsked(true)}>
          Remove this list
        </Button>
      )}
      {problem && (
        <p role="alert" className="font-semibold text-error">
          {problem}
        </p>
      )}
    </div>
  );
}
