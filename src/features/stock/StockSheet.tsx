import { useRef, useState } from 'react';
import { Notice } from '@/components/ui/Notice';
import { SheetHead } from '@/components/ui/SheetHead';
import { TitleBlock } from '@/components/ui/TitleBlock';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { UnitSystemName } from '@/engine/quantity';
import { dayWords } from '@/features/desk/words';
import { paths } from '@/paths';
import { AboutZone } from './AboutZone';
import { LinesZone } from './LinesZone';
import { LoadZone } from './LoadZone';
import type { Refused } from './refused';
import { isOld, type StockListView } from './stock';
import { type Acted, type LinesPage, stockApi } from './stock.api';
import { ageWords, OLD_WORDS } from './words';

interface StockSheetProps {
  readonly practice: string;
  readonly list: StockListView;
  readonly lines: LinesPage;
  readonly tables: readonly { readonly slug: string; readonly name: string }[];
  readonly system: UnitSystemName;
  readonly mayEdit: boolean;
  readonly today: string;
}

const inWords = (message: string): Refused => ({ message, faults: [] });
const STALE = inWords(
  'Somebody changed this list in between; it is shown as it stands now. Look, and do it again.',
);
const WAIT = inWords('What was done before is still being kept. Do this again in a moment.');

/** The list as it stands, and how something is done to it. */
function useList(first: StockListView) {
  const [list, setList] = useState(first);
  // Known at once, before a second press.
  const version = useRef(first.version);
  const isBusy = useRef(false);
  const show = (now: StockListView) => {
    version.current = now.version;
    setList(now);
  };
  async function settle<T>(acted: Acted<T>): Promise<Refused | null> {
    if (acted.kind === 'refused') return acted;
    if (acted.kind === 'stale') {
      show(acted.list);
      return STALE;
    }
    if (acted.version === 0) return null; // the list is gone
    version.current = acted.version;
    const now = await stockApi.read(first.slug);
    if (now.kind === 'done') show(now.value);
    else setList((before) => ({ ...before, version: acted.version }));
    return null;
  }
  async function act<T>(work: (version: number) => Promise<Acted<T>>): Promise<Refused | null> {
    if (isBusy.current) return WAIT;
    isBusy.current = true;
    const refused = await settle(await work(version.current));
    isBusy.current = false;
    return refused;
  }
  return { list, act };
}

/** One supplier's stock list: what is in it, how old it is, and by whom it was changed. */
export function StockSheet({ practice, lines, tables, system, mayEdit, today, ...props }: StockSheetProps) {
  const { list, act } = useList(props.list);
  const names = new Map(tables.map(({ slug, name }) => [slug, name]));
  const tableName = (slug: string) => names.get(slug) ?? slug;
  const age = ageWords(list.as_of, today);
  return (
    <>
      <SheetHead
        trail={[
          { label: 'Sections', href: paths.sections },
          { label: 'Stock', href: paths.stock },
        ]}
        title={list.supplier}
        facts={[
          { label: 'Sections', value: String(list.lines) },
          { label: 'As of', value: dayWords(list.as_of) },
          { label: 'Age', value: age },
          { label: 'Changed by', value: list.changed_by },
          { label: 'On', value: dayWords(list.changed_at) },
        ]}
      />
      {isOld(list.as_of, today) && (
        <Notice title={`This list is ${age}`}>
          <p>{OLD_WORDS}</p>
        </Notice>
      )}
      <div className="grid flex-1 grid-cols-[minmax(0,1fr)] lg:grid-cols-[minmax(0,1fr)_var(--title-column)]">
        <div className="flex min-w-0 flex-col">
          <LinesZone {...{ list, tables, system, mayEdit, act }} first={lines} />
          {mayEdit && <LoadZone {...{ list, tableName, today, act }} />}
        </div>
        <aside className="title-column">
          <div className="min-w-0">
            {mayEdit ? <AboutZone {...{ list, today, act }} /> : <Note note={list.note} />}
          </div>
          <TitleBlock
            org={practice}
            kind="Stock list"
            title={list.supplier}
            action={{ label: 'Find sections in this stock', href: `${paths.sections}?supplier=${list.slug}` }}
            others={[
              { label: 'Save as CSV', href: paths.api.stockCsv(list.slug) },
              { label: 'All suppliers', href: paths.stock },
            ]}
          />
        </aside>
      </div>
    </>
  );
}

function Note({ note }: { note: string }) {
  return (
    <section className="zone">
      <ZoneHeading letter="B">Note</ZoneHeading>
      <p className="whitespace-pre-line">{note === '' ? 'None.' : note}</p>
    </section>
  );
}
