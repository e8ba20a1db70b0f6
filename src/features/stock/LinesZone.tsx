import { useEffect, useRef, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { Field } from '@/components/ui/Field';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { UnitSystemName } from '@/engine/quantity';
import { counted } from '@/features/desk/words';
import { useRestedValue } from '@/features/template/use-live';
import { AddLine } from './AddLine';
import { type LineActions, LineRow } from './LineRow';
import type { Refused } from './refused';
import type { NewStockLine, StockLine, StockListView } from './stock';
import { type Acted, type LinesPage, stockApi } from './stock.api';

const REST_MS = 200;
const PAGE = '100';

/** The lines that answer a search, read as far as they were asked for; again for every version of the list. */
function useLines(slug: string, version: number, q: string, first: LinesPage) {
  const asked = useRestedValue(q.trim(), REST_MS);
  const [page, setPage] = useState(first);
  const [failure, setFailure] = useState<string | null>(null);
  const [round, setRound] = useState(0);
  const turn = useRef(0);
  const isFirst = useRef(true);
  // biome-ignore lint/correctness/useExhaustiveDependencies: another version or round reads again
  useEffect(() => {
    if (isFirst.current) {
      isFirst.current = false;
      return;
    }
    turn.current += 1;
    const mine = turn.current;
    void stockApi.lines(slug, { q: asked, limit: PAGE }).then((acted) => {
      if (mine !== turn.current) return;
      setFailure(acted.kind === 'refused' ? acted.message : null);
      if (acted.kind === 'done') setPage(acted.value);
    });
  }, [slug, version, asked, round]);
  async function more() {
    if (page.next === null) return;
    const mine = turn.current;
    const acted = await stockApi.lines(slug, { q: asked, limit: PAGE, cursor: page.next });
    if (mine !== turn.current) return;
    setFailure(acted.kind === 'refused' ? acted.message : null);
    if (acted.kind === 'done') setPage({ ...acted.value, items: [...page.items, ...acted.value.items] });
  }
  return { page, failure, more, again: () => setRound((before) => before + 1) };
}

export interface ListActions {
  /** Does something to the list, one thing at a time; what is wrong, or null when it is done. */
  readonly act: <T>(work: (version: number) => Promise<Acted<T>>) => Promise<Refused | null>;
}

interface LinesZoneProps extends ListActions {
  readonly list: StockListView;
  readonly first: LinesPage;
  readonly tables: readonly { readonly slug: string; readonly name: string }[];
  readonly system: UnitSystemName;
  readonly mayEdit: boolean;
}

/** What the supplier holds, line by line. */
export function LinesZone({ list, first, tables, system, mayEdit, act }: LinesZoneProps) {
  const [q, setQ] = useState('');
  const { page, failure, more, again } = useLines(list.slug, list.version, q, first);
  const { slug } = list;
  const actions: LineActions | undefined = mayEdit
    ? {
        onChange: ({ id }, held) => act((version) => stockApi.changeLine(slug, version, { id, ...held })),
        onRemove: ({ id }) => act((version) => stockApi.removeLine(slug, version, id)),
      }
    : undefined;
  return (
    <section className="zone">
      <ZoneHeading letter="A" note={counted(list.lines, 'section')}>
        What is stocked
      </ZoneHeading>
      {list.lines > 0 && (
        <div className="mb-8 max-w-440">
          <Field
            label="Find a designation"
            type="search"
            data-search
            autoComplete="off"
            spellCheck={false}
            maxLength={100}
            value={q}
            onChange={({ target }) => setQ(target.value)}
          />
        </div>
      )}
      <p role="status" className="text-ink-2 empty:hidden">
        {saidOf(list, page, q, mayEdit)}
      </p>
      {failure && (
        <p role="alert" className="flex gap-10 font-semibold text-error">
          {failure}
          <Button tone="text" onClick={again}>
            Try again
          </Button>
        </p>
      )}
      <LineTable lines={page.items} {...{ tables, system, actions }} />
      {page.next !== null && (
        <p className="mt-10">
          <Button onClick={more}>
            Show more ({page.items.length} of {page.total})
          </Button>
        </p>
      )}
      {mayEdit && (
        <AddLine
          tables={tables}
          onAdd={(line: NewStockLine) => act((version) => stockApi.addLine(slug, version, line))}
        />
      )}
    </section>
  );
}

function saidOf(list: StockListView, page: LinesPage, q: string, mayEdit: boolean): string {
  if (list.lines === 0)
    return mayEdit
      ? 'Nothing is stocked yet. Load the supplier’s list below, or add a line.'
      : 'Nothing is stocked yet. A librarian loads the supplier’s list.';
  if (q.trim() === '') return '';
  return page.total === 0 ? 'No line is called so.' : `${counted(page.total, 'line')} of ${list.lines}.`;
}

interface LineTableProps extends Pick<LinesZoneProps, 'tables' | 'system'> {
  readonly lines: readonly StockLine[];
  readonly actions: LineActions | undefined;
}

function LineTable({ lines, tables, system, actions }: LineTableProps) {
  if (lines.length === 0) return null;
  const names = new Map(tables.map(({ slug, name }) => [slug, name]));
  return (
    <table className="schedule stacking">
      <thead>
        <tr>
          <th scope="col">Section</th>
          <th scope="col">Table</th>
          <th scope="col">Stock lengths</th>
          <th scope="col">Lead time</th>
          <th scope="col">Price band</th>
          <th scope="col">Note</th>
          {actions && (
            <th scope="col">
              <span className="sr-only">Change</span>
            </th>
          )}
        </tr>
      </thead>
      <tbody>
        {lines.map((line) => (
          <LineRow
            key={line.id}
            line={line}
            tableName={names.get(line.table) ?? line.table}
            system={system}
            {...actions}
          />
        ))}
      </tbody>
    </table>
  );
}
