import { TitleBlock } from '@/components/ui/TitleBlock';
import { TitleStrip } from '@/components/ui/TitleStrip';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { paths } from '@/paths';
import { shownName } from './display';
import type { EditionView } from './edition';
import type { SectionItem } from './section';

interface EditionBlockProps {
  readonly practice: string;
  readonly chosen: SectionItem | null;
  readonly edition: EditionView | undefined;
}

/** The edition of the chosen section, its title block and the strip that stands in for it. */
export function EditionBlock({ practice, chosen, edition }: EditionBlockProps) {
  const action =
    chosen === null
      ? undefined
      : {
          label: `Open ${shownName(chosen.designation)}`,
          href: paths.section(chosen.table, chosen.designation),
        };
  const block = {
    kind: 'Section table',
    title: edition?.name ?? 'No table chosen',
    status: edition?.state,
    reference: edition?.reference,
    revision: edition && String(edition.edition),
    revisionLabel: 'Edn',
    action,
  };
  return (
    <aside className="flex min-w-0 flex-col">
      <section className="zone">
        <ZoneHeading letter="C">{edition ? `Edition ${edition.edition}` : 'Edition'}</ZoneHeading>
        {edition ? (
          <div className="grid gap-6 text-schedule">
            <p>{edition.changeNote}</p>
            <p className="text-ink-2">
              {edition.rows} sections. {edition.standard}.
            </p>
            <p className="text-ink-2">{edition.conventions}</p>
          </div>
        ) : (
          <p className="text-ink-2">Choose a row to see which table it comes from, and who checked it.</p>
        )}
      </section>
      <div className="mt-auto">
        <TitleBlock
          org={practice}
          {...block}
          by={edition?.by}
          checked={edition?.checked ?? undefined}
          date={edition?.date}
        />
      </div>
      <TitleStrip {...block} />
    </aside>
  );
}
