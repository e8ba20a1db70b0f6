import { Button } from '@/components/ui/Button';
import { landOn } from '@/components/ui/landing';
import { Notice } from '@/components/ui/Notice';
import { SheetHead } from '@/components/ui/SheetHead';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { LOAD_GROUP_NAMES, LOAD_GROUPS } from '@/engine/combination';
import type { Redundant } from '@/engine/model';
import { formatUtilisation } from '@/engine/quantity';
import { type Cause, stopTitle, toCauses } from '@/features/template/faults';
import { ParameterFields } from '@/features/template/ParameterFields';
import { RedundantChoice } from '@/features/template/RedundantChoice';
import { releaseKey, toRedundant, toRelease } from '@/features/template/release';
import type { About } from '@/features/why/subject';
import { WhyScope } from '@/features/why/WhyScope';
import { paths } from '@/paths';
import { BasisFields, BasisSummary, useBasis } from './BasisFields';
import { BasisZone } from './BasisZone';
import { ChecksZone, NotChecked } from './ChecksZone';
import { ElevationZone } from './ElevationZone';
import type { MemberEvaluation } from './evaluate';
import { HistoryZone } from './HistoryZone';
import { LoadGroupsZone, ReactionsZone } from './LoadZones';
import { MemberBlock } from './MemberBlock';
import { PinNotices, SaveNotice } from './Notices';
import { SectionZone } from './SectionZone';
import { useMember } from './use-member';
import type { WorkspaceData } from './workspace';

const GROUPS = LOAD_GROUPS.map((group) => ({ group, name: LOAD_GROUP_NAMES[group] }));

/** A figure on the drawing leads to its field; null to the first. */
function editField(symbol: string | null) {
  const of = symbol === null ? '' : `="${CSS.escape(symbol)}"`;
  const field = document.querySelector<HTMLInputElement>(`[data-symbol${of}] input`);
  field?.focus();
  field?.select();
}

type Work = ReturnType<typeof useMember>;
interface PartProps {
  readonly data: WorkspaceData;
  readonly work: Work;
}

/** The member's sheet: inputs, drawing, checks, section, loads, reactions, all live; what is saved is the server's. */
export function MemberSheet({ data }: { readonly data: WorkspaceData }) {
  const work = useMember(data);
  const { live } = work;
  const causes = toCauses(data.template, live.faults);
  const readAgain = () => {
    landOn('title-block');
    work.readAgain();
  };
  const system = data.job.unitSystem;
  return (
    <WhyScope about={() => aboutMember(data, work)} onField={editField}>
      <Head data={data} work={work} />
      <PinNotices member={work.member} host={upgradeHost(data, work, readAgain)} />
      <SaveNotice
        saving={work.saving}
        body={work.body}
        onSettle={async (current, body) => {
          if (await work.save(body, current.version)) readAgain();
        }}
        onTakeTheirs={readAgain}
      />
      {causes.length > 0 && (
        <CauseNotice
          causes={causes}
          onPutBack={() => {
            work.putBack();
            editField(causes[0]?.symbol ?? null);
          }}
        />
      )}
      <div className="flex flex-col max-md:flex-col-reverse">
        <Inputs data={data} work={work} />
        <ElevationZone
          live={live}
          system={system}
          notDrawn={causes.length > 0 ? `Not drawn: ${causes[0]?.message}` : undefined}
          onEdit={editField}
        />
      </div>
      <div className="grid grid-cols-[minmax(0,1fr)] lg:grid-cols-[minmax(0,1fr)_var(--title-column)]">
        <Zones data={data} work={work} />
        <aside className="title-column">
          <div className="min-w-0">
            <BasisZone template={data.template} evaluation={live.evaluation} system={system} />
            <HistoryZone history={work.history} />
          </div>
          <div>
            <MemberBlock data={data} work={work} />
          </div>
        </aside>
      </div>
    </WhyScope>
  );
}

/** The member as it stands in the fields; null where that gives no result. */
function aboutMember(data: WorkspaceData, { live, inputs, draft, member }: Work): About | null {
  if (!live.evaluation) return null;
  const { section } = draft;
  const isPinned =
    member.section?.designation === section?.values.designation && member.section?.table === section?.table;
  return {
    kind: 'member',
    inputs,
    evaluation: live.evaluation,
    revision: member.template.revision,
    section: section && { ...section, origin: section.origin ?? (isPinned ? data.sectionOrigin : undefined) },
    criteriaRevision: data.criteria.find(({ slug }) => slug === draft.criteria)?.revision ?? null,
  };
}

/** What the notices of newer revisions upgrade the member by. */
const upgradeHost = ({ job, template, mayEdit }: WorkspaceData, work: Work, onUpgraded: () => void) => ({
  job: job.number,
  system: job.unitSystem,
  template,
  barred: mayEdit
    ? work.isDirty
      ? 'Save what you typed first.'
      : null
    : 'Members are changed by engineers.',
  body: work.body,
  onUpgraded,
});

function Head({ data: { job, template }, work: { member, draft, live } }: PartProps) {
  const governing = live.evaluation?.checks?.rows[0];
  const facts = [
    { label: 'Template', value: `${member.template.reference} rev ${member.template.revision}` },
    { label: 'Section', value: draft.section?.values.designation ?? 'not chosen' },
    {
      label: 'Governing',
      value: governing
        ? `${formatUtilisation(governing.ratio)} ${governing.title.toLowerCase()}`
        : 'not checked',
    },
  ];
  const trail = [
    { label: 'Jobs', href: paths.jobs },
    { label: `${job.number} ${job.name}`, href: paths.job(job.number) },
  ];
  return (
    <SheetHead trail={trail} reference={member.mark} title={draft.title || template.name} facts={facts} />
  );
}

interface CauseNoticeProps {
  readonly causes: readonly Cause[];
  readonly onPutBack: () => void;
}

/** What stops the drawing, each with the way to its field. */
function CauseNotice({ causes, onPutBack }: CauseNoticeProps) {
  return (
    <Notice
      tone="error"
      title={stopTitle(causes)}
      actions={<Button onClick={onPutBack}>Put back the last good values</Button>}
    >
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
  );
}

function Inputs({ data, work: { draft, change, faults } }: PartProps) {
  const basis = useBasis({ draft, data, faults });
  return (
    <fieldset disabled={!data.mayEdit} className="min-w-0 border-b border-ink">
      <legend className="sr-only">Inputs</legend>
      <ParameterFields
        template={data.template}
        raw={draft.raw}
        system={data.job.unitSystem}
        faults={faults}
        groups={GROUPS}
        onChange={(symbol, value) => change({ raw: { ...draft.raw, [symbol]: value } })}
      >
        <BasisSummary draft={draft} data={data} basis={basis} mayEdit={data.mayEdit} />
      </ParameterFields>
      <BasisFields draft={draft} data={data} faults={faults} basis={basis} onChange={change} />
    </fieldset>
  );
}

const WIDE = 'min-[1380px]:grid-cols-[minmax(0,452fr)_minmax(0,584fr)] [&>*+*]:border-t [&>*+*]:border-ink';

/** Checks to reactions. */
function Zones({ data, work }: PartProps) {
  const { draft, change, live, inputs } = work;
  const { evaluation } = live;
  const system = data.job.unitSystem;
  const missing = draft.section
    ? 'Choose criteria: they say the combinations and the limits.'
    : 'Choose a section: stresses and deflections are judged with it.';
  return (
    <div className="min-w-0">
      <div className={`grid grid-cols-[minmax(0,1fr)] ${WIDE}`}>
        <ChecksZone checks={evaluation?.checks ?? null} system={system} missing={missing} />
        <NotChecked checks={evaluation?.checks ?? null} />
        <div className="min-w-0 min-[1380px]:col-start-2 min-[1380px]:row-start-1 min-[1380px]:border-t-0! min-[1380px]:border-l">
          <SectionZone
            section={draft.section}
            inputs={inputs}
            materials={data.materials}
            system={system}
            suppliers={data.suppliers}
            today={data.today}
            lengthM={evaluation?.beam.length ?? null}
            mayEdit={data.mayEdit}
            onPick={(section) => change({ section })}
          />
          <LoadGroupsZone evaluation={evaluation} system={system} />
        </div>
      </div>
      <div className="border-t border-ink">
        {evaluation && (
          <RedundantZone
            evaluation={evaluation}
            mayEdit={data.mayEdit}
            onChoose={(redundants) => change({ redundants })}
          />
        )}
        <ReactionsZone evaluation={evaluation} system={system} />
      </div>
    </div>
  );
}

interface RedundantProps {
  readonly evaluation: MemberEvaluation;
  readonly mayEdit: boolean;
  readonly onChoose: (redundants: Redundant[]) => void;
}

function RedundantZone({ evaluation: { beam, total }, mayEdit, onChoose }: RedundantProps) {
  const chosen = total.forceMethod.redundants.flatMap((one) => toRelease(beam, one) ?? []);
  return (
    <section className="zone">
      <ZoneHeading letter="E" note={beam.degree > 0 ? 'Every choice gives the same answer.' : undefined}>
        Redundant
      </ZoneHeading>
      <fieldset disabled={!mayEdit} className="min-w-0">
        <legend className="sr-only">Redundant to release</legend>
        <RedundantChoice
          beam={beam}
          chosen={releaseKey(chosen)}
          onChoose={(releases) => onChoose(releases.map((one) => toRedundant(beam, one)))}
        />
      </fieldset>
    </section>
  );
}
