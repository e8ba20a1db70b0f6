import { useMemo, useRef } from 'react';
import { Button } from '@/components/ui/Button';
import { EmptyState } from '@/components/ui/EmptyState';
import { TitleStrip } from '@/components/ui/TitleStrip';
import { useKeys } from '@/components/ui/use-keys';
import { paths } from '@/paths';
import { CatalogueFilters } from './CatalogueFilters';
import { CatalogueList } from './CatalogueList';
import { CatalogueSide } from './CatalogueSide';
import { isNarrowed } from './catalogue-address';
import { type CatalogueCard, type CatalogueData, receiveCard } from './catalogue-card';
import type { CatalogueQuery } from './find';
import { useCatalogue } from './use-catalogue';

interface CatalogueProps {
  readonly data: CatalogueData;
  /** What the address asks for. */
  readonly asked: CatalogueQuery;
}

/** The library's templates: searched, filtered, and one of them at a glance. */
export function CatalogueSheet({ data, asked }: CatalogueProps) {
  const { practice } = data;
  const cards = useMemo(() => data.cards.map(receiveCard), [data]);
  const catalogue = useCatalogue(cards, asked);
  const { query, found, shown, selected } = catalogue;
  const slug = selected?.row.slug ?? null;
  useCatalogueKeys(catalogue.move, selected);
  return (
    <div className="grid flex-1 grid-cols-[minmax(0,1fr)] lg:grid-cols-[minmax(0,1fr)_352px]">
      <div className="flex min-w-0 flex-col">
        <SearchBar
          q={query.q}
          count={shown.length}
          total={cards.length}
          onSearch={catalogue.search}
          onMove={catalogue.move}
          open={slug}
        />
        <CatalogueFilters cards={cards} found={found} query={query} onToggle={catalogue.toggle} />
        {shown.length > 0 ? (
          <CatalogueList shown={shown} selected={slug} onChoose={catalogue.choose} />
        ) : (
          <Nothing
            isEmpty={cards.length === 0}
            query={query}
            onClear={() => {
              catalogue.clear();
              document.querySelector<HTMLElement>('[data-search]')?.focus();
            }}
          />
        )}
      </div>
      <CatalogueSide practice={practice} card={selected} />
      {selected && <Strip card={selected} />}
    </div>
  );
}

function useCatalogueKeys(move: (steps: number) => void, selected: CatalogueCard | null): void {
  const step = (steps: number) => {
    move(steps);
    requestAnimationFrame(() =>
      document.querySelector('[data-row] [aria-current="true"]')?.scrollIntoView({ block: 'nearest' }),
    );
  };
  const down = () => step(1);
  const up = () => step(-1);
  const open = ({ target }: KeyboardEvent) => {
    // What is pressed and has the focus does its own work.
    const own = target instanceof Element ? target.closest<HTMLElement>('a, button, summary') : null;
    if (own) own.click();
    else if (selected) location.assign(paths.template(selected.row.slug));
  };
  const use = () => {
    if (selected?.barred === null) location.assign(paths.newMemberOf(selected.row.slug));
  };
  useKeys({ ArrowDown: down, ArrowUp: up, Enter: open, u: use });
}

interface SearchBarProps {
  readonly q: string;
  readonly count: number;
  readonly total: number;
  readonly open: string | null;
  readonly onSearch: (q: string) => void;
  readonly onMove: (steps: number) => void;
}

function SearchBar({ q, count, total, open, onSearch, onMove }: SearchBarProps) {
  const field = useRef<HTMLInputElement>(null);
  return (
    <search className="flex items-end gap-24 border-b border-ink px-(--pad) pt-16 pb-14 max-md:flex-col max-md:items-stretch max-md:gap-8">
      <h1 className="text-sheet">Templates</h1>
      <form
        method="get"
        className="relative min-w-0 flex-1"
        onSubmit={(event) => {
          event.preventDefault();
          if (open) location.assign(paths.template(open));
        }}
      >
        <svg
          width="20"
          height="20"
          viewBox="0 0 20 20"
          aria-hidden="true"
          className="absolute bottom-11 left-7"
          fill="none"
        >
          <circle cx="8" cy="8" r="6" className="stroke-ink" strokeWidth="1.5" />
          <path d="M12.5 12.5 18.5 18.5" className="stroke-ink" strokeWidth="2" />
        </svg>
        <input
          ref={field}
          data-search
          type="search"
          name="q"
          aria-label="Search templates"
          placeholder="Supports, loads, use or reference"
          autoComplete="off"
          spellCheck={false}
          value={q}
          onChange={(event) => onSearch(event.target.value)}
          onKeyDown={(event) => {
            if (event.key === 'ArrowDown' || event.key === 'ArrowUp') {
              event.preventDefault();
              onMove(event.key === 'ArrowDown' ? 1 : -1);
            }
            if (event.key === 'Escape') {
              onSearch('');
              field.current?.blur();
            }
          }}
          className="min-h-42 w-full border-b-[1.5px] border-ink bg-field pr-10 pl-34 text-[1.25rem]"
        />
      </form>
      <p role="status" className="pb-9 whitespace-nowrap text-ink-2 max-md:pb-0">
        <b className="font-semibold text-ink">{count}</b> of {total}
        <span className="ml-14">{q.trim() === '' ? 'by use' : 'by match, then use'}</span>
      </p>
    </search>
  );
}

interface NothingProps {
  readonly isEmpty: boolean;
  readonly query: CatalogueQuery;
  readonly onClear: () => void;
}

function Nothing({ isEmpty, query, onClear }: NothingProps) {
  if (isEmpty)
    return (
      <EmptyState title="No templates yet">
        A librarian adds the first one. It appears here once somebody else has checked it.
      </EmptyState>
    );
  const both = query.q.trim() !== '' && isNarrowed(query);
  return (
    <EmptyState title="Nothing matches" actions={<Button onClick={onClear}>Show every template</Button>}>
      {both
        ? 'No template meets both the search and the filters. Take one off.'
        : 'Search for the supports or the loads, such as “two spans” or “overhang point”.'}
    </EmptyState>
  );
}

function Strip({ card: { row, barred } }: { readonly card: CatalogueCard }) {
  const use = barred === null ? { href: paths.newMemberOf(row.slug) } : { reason: barred };
  return (
    <TitleStrip
      kind="Selected template"
      title={row.name}
      status={row.state}
      reference={row.reference}
      revision={String(row.revision)}
      action={{ label: 'Use in a job', ...use }}
    />
  );
}
