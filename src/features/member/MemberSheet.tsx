import { Notice } from '@/components/ui/Notice';
import { SheetHead } from '@/components/ui/SheetHead';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { LOAD_GROUP_NAMES, LOAD_GROUPS } from '@/engine/check';
import { formatUtilisation } from '@/engine/quantity';
import { stopTitle, toCauses } from '@/features/template/faults';
import { ParameterFields } from '@/features/template/ParameterFields';
import { RedundantChoice } from '@/features/template/RedundantChoice';
import { releaseKey, toRedundant, toRelease } from '@/features/template/release';
import { paths } from '@/paths';
import { BasisFields } from './BasisFields';
import { BasisZone } from './BasisZone';
import { ChecksZone } from './ChecksZone';
import { ElevationZone } from './ElevationZone';
import { HistoryZone } from './HistoryZone';
import { LoadGroupsZone, ReactionsZone } from './LoadZones';
import { MemberBlock } from './MemberBlock';
import { PinNotices, SaveNotice } from './Notices';
import { SectionZone } from './SectionZone';
import { useMember } from './use-member';
import type { WorkspaceData } from './workspace';

const GROUPS = LOAD_GROUPS.map((group) => ({ group, name: LOAD_GROUP_NAMES[group] }));

/** A figure on the drawing leads to its field. */
function editField(symbol: string) {
  const field = document.querySelector<HTMLInputElement>(`[data-symbol="${CSS.escape(symbol)}"] input`);
  field?.focus();
  field?.select();
}

/** The member's sheet: inputs, drawing, checks, section, loads, reactions, all live; what is saved is the server's. */
export function MemberSheet({ data }: { readonly data: WorkspaceData }) {
  const { template, job, criteria, mayEdit } = data;
  const system = job.unitSystem;
  const work = useMember(data);
  const { member, draft, change, live, faults, saving } = work;
  const { evaluation } = live;
  const causes = toCauses(template, live.faults);
  const governing = evaluation?.checks?.rows[0];
  const missing = !draft.section
    ? 'Choose a section: stresses and deflections are judged with it.'
    : 'Choose criteria: they say the combinations and the limits.';
  return (
    <>
      <SheetHead
        trail={[
          { label: 'Jobs', href: paths.jobs },
          { label: `${job.number} ${job.name}`, href: paths.job(job.number) },
        ]}
        reference={member.mark}
        title={draft.title || template.name}
        facts={[
          { label: 'Template', value: `${member.template.reference} rev ${member.template.revision}` },
          { label: 'Section', value: draft.section?.values.designation ?? 'not chosen' },
          {
            label: 'Governing',
            value: governing
              ? `${formatUtilisation(governing.ratio)} ${governing.title.toLowerCase()}`
              : 'not checked',
          },
        ]}
      />
      <PinNotices member={member} />
      <SaveNotice
        saving={saving}
        body={work.body}
        onSettle={async (current, body) => {
          if (await work.save(body, current.version)) work.readAgain();
        }}
        onTakeTheirs={work.readAgain}
      />
      {causes.length > 0 && (
        <Notice tone="error" title={stopTitle(causes)}>
          <ul className="list-disc pl-18">
            {causes.map(({ symbol, title, message }) => (
              <li key={title + message}>
                {symbol ? (
                  <button type="button" className="link min-h-24" onClick={() => editField(symbol)}>
                    {title}
                  </button>
                ) : (
                  title
                )}
                : {message}
              </li>
            ))}
          </ul>
        </Notice>
      )}
      <section aria-label="Inputs" className="border-b border-ink">
        <fieldset disabled={!mayEdit} className="min-w-0">
          <legend className="sr-only">Inputs</legend>
          <ParameterFields
            template={template}
            raw={draft.raw}
            system={system}
            faults={faults}
            groups={GROUPS}
            onChange={(symbol, value) => change({ raw: { ...draft.raw, [symbol]: value } })}
          >
            <BasisFields draft={draft} criteria={criteria} faults={faults} onChange={change} />
          </ParameterFields>
        </fieldset>
      </section>
      <ElevationZone
        live={live}
        system={system}
        notDrawn={causes.length > 0 ? `Not drawn: ${causes[0]?.message}` : undefined}
        onEdit={editField}
      />
      <div className="grid grid-cols-[minmax(0,1fr)] lg:grid-cols-[minmax(0,1fr)_var(--title-column)]">
        <div className="min-w-0">
          <div className="grid grid-cols-[minmax(0,1fr)] min-[1380px]:grid-cols-[minmax(0,452fr)_minmax(0,584fr)] min-[1380px]:[&>*+*]:border-t-0 min-[1380px]:[&>*+*]:border-l min-[1380px]:[&>*+*]:border-ink">
            <ChecksZone checks={evaluation?.checks ?? null} system={system} missing={missing} />
            <SectionZone
              section={draft.section}
              inputs={work.inputs}
              system={system}
              mayEdit={mayEdit}
              onPick={(section) => change({ section })}
            />
          </div>
          <div className="border-t border-ink">
            <LoadGroupsZone evaluation={evaluation} system={system} />
            {evaluation && (
              <section className="zone">
                <ZoneHeading letter="E" note="every choice gives the same answer">
                  Redundant
                </ZoneHeading>
                <fieldset disabled={!mayEdit}>
                  <legend className="sr-only">Redundant</legend>
                  <RedundantChoice
                    beam={evaluation.beam}
                    solution={evaluation.total}
                    chosen={releaseKey(
                      evaluation.total.forceMethod.redundants.flatMap(
                        (one) => toRelease(evaluation.beam, one) ?? [],
                      ),
                    )}
                    onChoose={(releases) =>
                      change({ redundants: releases.map((one) => toRedundant(evaluation.beam, one)) })
                    }
                  />
                </fieldset>
              </section>
            )}
            <ReactionsZone evaluation={evaluation} system={system} />
          </div>
        </div>
        <aside className="flex min-w-0 flex-col border-ink max-lg:border-t lg:border-l">
          <BasisZone template={template} evaluation={evaluation} system={system} />
          <HistoryZone history={data.history} />
          <div className="mt-auto">
            <MemberBlock data={data} work={work} />
          </div>
        </aside>
      </div>
    </>
  );
}
