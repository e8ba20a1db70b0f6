import { Schematic } from '@/components/drawing/Schematic';
import { TitleBlock } from '@/components/ui/TitleBlock';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { paths } from '@/paths';
import type { CatalogueCard } from './catalogue-card';
import { drawnName } from './names';

interface SideProps {
  readonly practice: string;
  readonly card: CatalogueCard;
}

/** The chosen template at a glance, and its title block. */
export function CatalogueSide({ practice, card: { row, schematic, day, barred } }: SideProps) {
  const open = paths.template(row.slug);
  const use = barred === null ? { href: paths.newMemberOf(row.slug), keyName: 'U' } : { reason: barred };
  return (
    <aside className="flex min-w-0 flex-col border-ink max-lg:border-t lg:border-l">
      <section className="zone max-md:hidden">
        <ZoneHeading letter="A" note={<a href={open}>Open</a>}>
          {row.reference} at a glance
        </ZoneHeading>
        <div className="[&_svg]:h-auto [&_svg]:max-w-full">
          <Schematic
            size="card"
            beam={schematic.beam}
            moment={schematic.moment}
            loadNames={schematic.loadNames.map(drawnName)}
            lengths={schematic.lengths.map(({ from, to, tex }) => ({ from, to, symbol: drawnName(tex) }))}
            label={`${row.name}, with its moment`}
          />
        </div>
        <p className="mt-6">{row.summary}</p>
        <dl className="mt-8 grid grid-cols-2 gap-x-16 text-schedule">
          <div>
            <dt className="font-semibold">You give</dt>
            <dd>{row.youGive}</dd>
          </div>
          <div>
            <dt className="font-semibold">You get</dt>
            <dd>{row.youGet}</dd>
          </div>
        </dl>
      </section>
      <section className="zone">
        <ZoneHeading letter="B">From template to checked member</ZoneHeading>
        <ol className="grid list-decimal gap-6 pl-18">
          <li>Pick a template that matches the supports and loads.</li>
          <li>Choose a job and give the span and loads. Results draw as you type.</li>
          <li>Choose a section and save. The server evaluates the member and keeps its proof.</li>
        </ol>
      </section>
      <div className="mt-auto">
        <TitleBlock
          org={practice}
          orgNote="Selected template"
          kind="Title"
          title={row.name}
          by={row.author}
          checked={row.reviewer ?? undefined}
          date={day}
          status={row.state}
          reference={row.reference}
          revision={String(row.revision)}
          action={{ label: 'Use in a job', ...use }}
          others={[{ label: 'Open', href: open, keyName: 'Enter' }]}
        />
      </div>
    </aside>
  );
}
