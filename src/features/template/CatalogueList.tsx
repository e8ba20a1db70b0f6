import { Schematic } from '@/components/drawing/Schematic';
import { Button } from '@/components/ui/Button';
import { StatusStamp } from '@/components/ui/StatusStamp';
import { paths } from '@/paths';
import type { CatalogueCard } from './catalogue-card';
import type { Match } from './find';

interface ListProps {
  readonly shown: readonly Match<CatalogueCard>[];
  readonly selected: string | null;
  readonly onChoose: (slug: string) => void;
}

const COLUMNS =
  'md:grid-cols-[258px_minmax(0,1fr)_116px_92px_146px] md:max-lg:grid-cols-[244px_minmax(0,1fr)_106px_84px_142px]';

/** The templates found, drawn at their defaults with the moment shaded. */
export function CatalogueList({ shown, selected, onChoose }: ListProps) {
  return (
    <>
      <div
        aria-hidden="true"
        className={`border-b border-ink text-schedule font-semibold max-md:hidden md:grid [&>span]:px-12 [&>span]:py-5 ${COLUMNS}`}
      >
        <span>Schematic, moment shaded</span>
        <span>Template</span>
        <span>Revision</span>
        <span>In use</span>
        <span />
      </div>
      <ul aria-label="Templates">
        {shown.map((match) => (
          <Row
            key={match.entry.row.slug}
            match={match}
            isSelected={match.entry.row.slug === selected}
            onChoose={onChoose}
          />
        ))}
      </ul>
    </>
  );
}

interface RowProps {
  readonly match: Match<CatalogueCard>;
  readonly isSelected: boolean;
  readonly onChoose: (slug: string) => void;
}

function Row({ match: { entry, marks }, isSelected, onChoose }: RowProps) {
  const { row, schematic, day, barred } = entry;
  const { slug, uses } = row;
  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: the arrow keys choose, and the row's own links take the focus
    <li
      data-row={slug}
      onClick={() => onChoose(slug)}
      onFocus={() => onChoose(slug)}
      className={`relative grid min-h-90 items-center border-b border-rule max-md:grid-cols-[minmax(0,1fr)_auto] max-md:py-8 scroll-mb-60 [&>*]:px-12 [&>*]:py-8 max-md:[&>*]:py-3 ${COLUMNS} ${isSelected ? 'dimensioned-side' : 'hover:bg-paper-2'}`}
    >
      <div className="pl-20! max-md:col-span-2">
        <Schematic beam={schematic.beam} moment={schematic.moment} />
      </div>
      <div className="max-md:col-span-2">
        <p className="text-schedule text-ink-2">{row.reference}</p>
        <h3 className="text-[1rem] leading-20 font-semibold">
          <a
            href={paths.template(slug)}
            className="no-underline hover:underline"
            aria-current={isSelected ? 'true' : undefined}
          >
            <Marked text={row.name} marks={marks} />
          </a>
        </h3>
        <p className="mt-3 text-schedule text-ink-2">{row.tags.join(' · ')}</p>
      </div>
      <div className="text-schedule">
        <span className="mr-6 text-[1.375rem] leading-24 font-light">
          <span className="sr-only">Revision </span>
          {row.revision}
        </span>
        <StatusStamp status={row.state} />
        <span className="block whitespace-nowrap text-ink-2">{day}</span>
      </div>
      <div className="text-schedule leading-16 text-ink-2">
        {uses.members === 0 ? (
          'not used yet'
        ) : (
          <>
            <b className="block text-[1.125rem] leading-22 font-normal text-ink">{uses.members}</b>
            {uses.members === 1 ? 'member' : 'members'} in {uses.jobs} {uses.jobs === 1 ? 'job' : 'jobs'}
          </>
        )}
      </div>
      <div className="max-md:col-span-2 max-md:grid">
        {barred === null ? (
          <Button size="small" href={paths.newMemberOf(slug)} aria-label={`Use ${row.reference} in a job`}>
            Use in a job
          </Button>
        ) : (
          <span className="text-schedule text-ink-2">{barred}</span>
        )}
      </div>
    </li>
  );
}

interface MarkedProps {
  readonly text: string;
  readonly marks: readonly (readonly [number, number])[];
}

/** The words that a search meant, underlined. */
function Marked({ text, marks }: MarkedProps) {
  let at = 0;
  const parts = marks.flatMap(([from, to]) => {
    const before = text.slice(at, from);
    at = to;
    return [
      before,
      <mark key={from} className="border-b-2 border-ochre bg-transparent text-inherit">
        {text.slice(from, to)}
      </mark>,
    ];
  });
  return [...parts, text.slice(at)];
}
