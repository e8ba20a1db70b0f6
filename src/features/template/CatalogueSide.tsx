import { TitleBlock } from '@/components/ui/TitleBlock';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { paths } from '@/paths';
import type { CatalogueCard } from './catalogue-card';
import { FirstSteps } from './FirstSteps';
import { TemplateGlance } from './TemplateGlance';

interface SideProps {
  readonly practice: string;
  /** Null where nothing is found. */
  readonly card: CatalogueCard | null;
}

/** The chosen template at a glance, which stays in view while the list is gone through, and its title block. */
export function CatalogueSide({ practice, card }: SideProps) {
  return (
    <aside className="title-column">
      <div className="min-w-0 lg:sticky lg:top-0">
        {card && (
          <section className="zone max-md:hidden">
            <ZoneHeading letter="A" note={<a href={paths.template(card.row.slug)}>Open</a>}>
              {card.row.reference} at a glance
            </ZoneHeading>
            <TemplateGlance row={card.row} schematic={card.schematic} />
          </section>
        )}
        <FirstSteps letter="B" />
      </div>
      <div className="bg-paper lg:relative">
        {card ? <ChosenBlock practice={practice} card={card} /> : <NoneBlock practice={practice} />}
      </div>
    </aside>
  );
}

function ChosenBlock({ practice, card: { row, day, barred } }: SideProps & { readonly card: CatalogueCard }) {
  const use = barred === null ? { href: paths.newMemberOf(row.slug), keyName: 'U' } : { reason: barred };
  return (
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
      others={[{ label: 'Open', href: paths.template(row.slug), keyName: 'Enter' }]}
    />
  );
}

const NoneBlock = ({ practice }: Pick<SideProps, 'practice'>) => (
  <TitleBlock
    org={practice}
    orgNote="Selected template"
    kind="Title"
    title="None"
    action={{ label: 'Use in a job', reason: 'No template is found.', isQuiet: true }}
  />
);
