import type { MouseEvent, ReactNode } from 'react';
import { Schematic } from '@/components/drawing/Schematic';
import { STATUS_WORDS } from '@/components/ui/StatusStamp';
import { REVISION_STATES } from '@/features/review/review';
import { toggled, writeCatalogueQuery } from './catalogue-address';
import type { CatalogueCard } from './catalogue-card';
import { type CatalogueQuery, countBy, type Facet, type Match } from './find';
import { ARRANGEMENT_GLYPHS, type Glyph, LOAD_GLYPHS } from './glyphs';
import { ARRANGEMENT_NAMES, LOAD_KIND_NAMES } from './template';

interface FiltersProps {
  readonly cards: readonly CatalogueCard[];
  readonly found: readonly Match<CatalogueCard>[];
  readonly query: CatalogueQuery;
  readonly onToggle: (facet: Facet, value: string) => void;
}

/** Tags shown before the others are unfolded: as many as fit beside the drawn filters. */
const FIRST_TAGS = 5;

/** Arrangement and load drawn, status and tag in words; each a link, so that it works before the script does. */
export function CatalogueFilters(props: FiltersProps) {
  const propsOf = (facet: Facet) => {
    const counts = countBy(props.found, props.query, facet);
    return (value: string, name: string): OneProps => ({
      ...props,
      facet,
      value,
      name,
      count: counts.get(value) ?? 0,
    });
  };
  const [arrangements, loads, states, tags] = [
    propsOf('arrangements'),
    propsOf('loadKinds'),
    propsOf('states'),
    propsOf('tags'),
  ] as const;
  const allTags = [...new Set(props.cards.flatMap(({ row }) => row.tags))].sort(
    (a, b) => tags(b, b).count - tags(a, a).count || a.localeCompare(b),
  );
  return (
    <nav
      aria-label="Filters"
      className="flex border-b-2 border-ink max-md:overflow-x-auto md:grid md:grid-cols-2 min-[1380px]:grid-cols-[minmax(0,400fr)_minmax(0,330fr)_126px_150px]"
    >
      <Group title="Support arrangement">
        <div className="grid grid-cols-3 gap-x-4 gap-y-4 max-md:grid-cols-2">
          {entriesOf(ARRANGEMENT_NAMES).map(([value, name]) => (
            <Drawn key={value} {...arrangements(value, name)} glyph={ARRANGEMENT_GLYPHS[value]} />
          ))}
        </div>
      </Group>
      <Group title="Load">
        <div className="grid grid-cols-2 gap-x-8 gap-y-4">
          {entriesOf(LOAD_KIND_NAMES).map(([value, name]) => (
            <Drawn key={value} {...loads(value, name)} glyph={LOAD_GLYPHS[value]} />
          ))}
        </div>
      </Group>
      <Group title="Status">
        {REVISION_STATES.map((value) => (
          <Ticked key={value} {...states(value, STATUS_WORDS[value])} />
        ))}
      </Group>
      <Group title="Tag">
        <Tags all={allTags.map((tag) => tags(tag, tag))} />
      </Group>
    </nav>
  );
}

/** The first tags, and the others folded. */
function Tags({ all }: { readonly all: readonly OneProps[] }) {
  // A filter that is on is never folded away.
  const isFirst = ({ query, value }: OneProps, at: number) => at < FIRST_TAGS || query.tags.includes(value);
  const more = all.filter((tag, at) => !isFirst(tag, at));
  return (
    <>
      {all.filter(isFirst).map((tag) => (
        <Ticked key={tag.value} {...tag} />
      ))}
      {more.length > 0 && (
        <details>
          <summary className="link min-h-26 py-4 text-schedule pointer-coarse:py-13">
            {more.length} more {more.length === 1 ? 'tag' : 'tags'}
          </summary>
          {more.map((tag) => (
            <Ticked key={tag.value} {...tag} />
          ))}
        </details>
      )}
    </>
  );
}

const entriesOf = <K extends string>(record: Record<K, string>) => Object.entries(record) as [K, string][];

function Group({ title, children }: { readonly title: string; readonly children: ReactNode }) {
  return (
    <section className="min-w-0 border-rule px-14 py-10 max-md:flex-[0_0_310px] max-md:border-l md:nth-[even]:border-l md:max-[1379px]:nth-[n+3]:border-t min-[1380px]:border-l min-[1380px]:first:border-l-0">
      <h2 className="caps mb-6">{title}</h2>
      {children}
    </section>
  );
}

interface OneProps extends FiltersProps {
  readonly facet: Facet;
  readonly value: string;
  readonly name: string;
  readonly count: number;
}

/** A link to the catalogue with this filter on, or off where it is on. */
function useFilter({ query, facet, value, onToggle }: OneProps) {
  const isOn = query[facet].some((one) => one === value);
  const key = `${facet} ${value}`;
  const address = writeCatalogueQuery(toggled(query, facet, value));
  const onClick = (event: MouseEvent) => {
    if (event.metaKey || event.ctrlKey || event.shiftKey) return;
    event.preventDefault();
    onToggle(facet, value);
    // A tag that is turned on or off may change its place.
    requestAnimationFrame(() =>
      document.querySelector<HTMLElement>(`[data-filter="${CSS.escape(key)}"]`)?.focus(),
    );
  };
  const link = {
    href: `?${address}`,
    onClick,
    'data-filter': key,
    'aria-current': isOn ? ('true' as const) : undefined,
  };
  return { isOn, link };
}

function Drawn(props: OneProps & { readonly glyph: Glyph }) {
  const { isOn, link } = useFilter(props);
  const { name, count, glyph } = props;
  return (
    <a
      {...link}
      className={`grid min-h-44 grid-cols-[58px_minmax(0,1fr)] items-center gap-7 px-2 pt-6 pb-12 text-schedule leading-15 no-underline hover:bg-paper-2 ${isOn ? 'dimensioned font-semibold' : ''} ${count === 0 && !isOn ? 'text-ink-3' : ''}`}
    >
      <Schematic beam={glyph} size="glyph" />
      <span className="min-w-0">
        {name} <span className="block font-normal text-ink-2">{count}</span>
      </span>
    </a>
  );
}

function Ticked(props: OneProps) {
  const { isOn, link } = useFilter(props);
  const { name, count } = props;
  return (
    <a
      {...link}
      className="flex min-h-26 items-center gap-8 text-schedule no-underline hover:bg-paper-2 pointer-coarse:min-h-44"
    >
      <span
        aria-hidden="true"
        className={`relative size-15 flex-none border ${isOn ? 'border-ochre-ink after:absolute after:top-1 after:left-[2.5px] after:h-6 after:w-12 after:-rotate-48 after:border-b-[1.8px] after:border-l-[1.8px] after:border-ochre-ink' : 'border-ink'}`}
      />
      <span className={isOn ? 'font-semibold' : ''}>{name}</span>
      <span className="ml-auto text-ink-2">{count}</span>
    </a>
  );
}
