import { memo, useRef } from 'react';
import type { BlockAction } from '@/components/ui/BlockActions';
import { TitleBlock } from '@/components/ui/TitleBlock';
import { TitleStrip } from '@/components/ui/TitleStrip';
import { useKeys } from '@/components/ui/use-keys';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { About } from '@/features/why/subject';
import { WhyScope } from '@/features/why/WhyScope';
import { paths } from '@/paths';
import { BeamResults } from './BeamResults';
import { Causes } from './Causes';
import type { TemplateEvaluation } from './evaluate';
import { ForceMethod, redundantsOf } from './ForceMethod';
import { fieldFaults, putRightFirst, toCauses, toDrawingFault } from './faults';
import { AxialRule } from './further/AxialRule';
import { FurtherZone } from './further/FurtherZone';
import { type AxialState, useAxial } from './further/use-axial';
import { toResultLines, toRuleLines } from './lines';
import { ParameterFields } from './ParameterFields';
import { dayText, type TemplatePageData } from './page';
import { entryText, toParameters } from './raw';
import { ClosedForms, Notes, ProofCases, proofNote, Validity, Zone } from './SheetZones';
import { StiffnessFields } from './StiffnessFields';
import { useInSight, useRestedValue } from './use-live';
import { useTemplatePage } from './use-template-page';

/** A template's page: its values, the beam that follows from them, and how it is worked. */
export function TemplateSheet({ data }: { readonly data: TemplatePageData }) {
  const { page, axial } = useAxial(useTemplatePage(data), data.system);
  const action = useAction(data, page);
  const { row } = data;
  return (
    <WhyScope about={() => aboutPage(data, page)} onField={focusField}>
      <div className="flex flex-col">
        <ParametersZone data={data} page={page} />
        <ElevationZone data={data} page={page} />
      </div>
      <FurtherZone good={page.good} isNow={page.outcome.ok} system={data.system} />
      <LowerZones data={data} page={page} action={action} axial={axial} />
      <TitleStrip
        kind="Template"
        title={row.name}
        status={row.state}
        reference={row.reference}
        revision={String(row.revision)}
        action={{ ...action, keyName: undefined }}
      />
    </WhyScope>
  );
}

/** The page at its last good values, which are those that it shows. */
function aboutPage({ row, system, template }: TemplatePageData, { good, releases }: Page): About {
  const { evaluation, values } = good;
  const ei = entryText(values.ei, 'bending_stiffness');
  return {
    kind: 'template',
    evaluation,
    revision: row.revision,
    parameters: toParameters(template, values.raw),
    system,
    section: values.section,
    ei: values.section || ei === template.stiffness.default_ei ? null : ei,
    redundants: redundantsOf(evaluation, releases),
  };
}

type Page = ReturnType<typeof useTemplatePage>;
interface ZoneProps {
  readonly data: TemplatePageData;
  readonly page: Page;
}

function ParametersZone({ data, page }: ZoneProps) {
  const { template, system } = data;
  const { values, outcome } = page;
  const faults = fieldFaults(outcome.ok ? [] : outcome.errors);
  const note = (
    <>
      <span className="max-lg:hidden">Figures underlined on the drawing are the same inputs. </span>
      <button type="button" className="link min-h-26 pointer-coarse:min-h-44" onClick={page.restore}>
        Restore the defaults
      </button>
    </>
  );
  return (
    <section className="max-md:order-2 max-md:border-t max-md:border-ink">
      <div className="px-(--pad) pt-12">
        <ZoneHeading letter="A" note={note}>
          Parameters
        </ZoneHeading>
      </div>
      <ParameterFields
        template={template}
        raw={values.raw}
        system={system}
        faults={faults}
        onChange={page.setParameter}
      >
        <StiffnessFields
          template={template}
          ei={values.ei}
          section={values.section}
          materials={data.materials}
          system={system}
          fault={faults.get('ei')}
          sectionFault={data.sectionFault}
          onChange={page.set}
        />
      </ParameterFields>
    </section>
  );
}

function ElevationZone({ data, page }: ZoneProps) {
  const { outcome, good, values } = page;
  const { evaluation } = good;
  const causes = outcome.ok ? [] : toCauses(data.template, outcome.errors);
  const beside = outcome.ok ? '' : 'lg:grid lg:grid-cols-[minmax(0,1fr)_var(--title-column)]';
  return (
    <section className={`relative border-ink max-md:order-1 md:border-t ${beside}`}>
      <div className="relative min-w-0">
        <div className="px-14 pt-9 md:absolute md:z-1">
          <ZoneHeading letter="B">
            Elevation<span className="sr-only"> and diagrams</span>
          </ZoneHeading>
        </div>
        <BeamResults
          beam={evaluation.beam}
          instance={evaluation.instance}
          solution={outcome.ok ? evaluation.solution : null}
          system={data.system}
          depth={values.section?.resolved.depth}
          notDrawn={causes[0] && `Not drawn: see ${causes[0].title.toLowerCase()}.`}
          fault={toDrawingFault(data.template, causes)}
          onEdit={focusField}
        />
      </div>
      {!outcome.ok && (
        <Causes
          causes={causes}
          onPutBack={(symbol) => {
            page.putBack(symbol);
            focusField(symbol);
          }}
          lastGood={(symbol) => textOf(data, good.values, symbol)}
        />
      )}
    </section>
  );
}

interface LowerProps extends ZoneProps {
  readonly action: BlockAction;
  readonly axial: AxialState;
}

function LowerZones({ data, page, action, axial }: LowerProps) {
  const { evaluation } = page.good;
  const rested = useRestedValue(evaluation);
  // What is said beside the derivation follows it.
  const after = useRestedValue(rested, 60);
  const note = page.outcome.ok ? undefined : 'At the last good values';
  return (
    <div className="grid flex-1 border-t border-ink md:grid-cols-[minmax(0,1fr)_var(--title-column)] lg:grid-cols-[minmax(0,724fr)_minmax(0,312fr)_var(--title-column)]">
      <section className="zone md:max-lg:col-span-2 md:max-lg:border-b md:max-lg:border-ink">
        <ForceMethod
          solved={rested}
          releases={page.releases}
          system={data.system}
          onChoose={page.setReleases}
          initial={data.worked}
          note={note}
        />
      </section>
      <RulesAndForms data={data} rested={after} note={note} axial={axial} />
      <aside className="flex min-w-0 flex-col border-ink max-md:border-t md:border-l">
        <ProofAndNotes data={data} />
        <div className="mt-auto">
          <Block data={data} action={action} />
        </div>
      </aside>
    </div>
  );
}

interface RulesProps {
  readonly data: TemplatePageData;
  /** The last good evaluation, when the hand has rested. */
  readonly rested: TemplateEvaluation;
  readonly note: string | undefined;
  readonly axial: AxialState;
}

/** What is said of the values. */
const RulesAndForms = memo(function RulesAndForms({ data, rested, note, axial }: RulesProps) {
  const { template, system, formulas } = data;
  const place = useRef<HTMLDivElement>(null);
  const seen = useInSight(place, rested);
  const rules = toRuleLines(template, seen.rules, system);
  const results = toResultLines(template, seen.instance, system);
  return (
    <div ref={place} className="min-w-0 border-ink max-md:border-t lg:border-l">
      <Zone letter="E" title="Validity" note={note}>
        <Validity rules={rules} formulas={formulas} />
        <AxialRule axial={axial} />
      </Zone>
      {results.length > 0 && (
        <Zone letter="F" title="Closed forms" note={note}>
          <ClosedForms results={results} formulas={formulas} />
        </Zone>
      )}
    </div>
  );
});

/** What is said of the template, whatever the values. */
const ProofAndNotes = memo(function ProofAndNotes({ data }: Pick<RulesProps, 'data'>) {
  const { template, notes, proof, row, engineNow, engineVersion } = data;
  return (
    <>
      <Zone letter="G" title="Proof cases" note={proofNote(proof)}>
        <ProofCases cases={proof} />
        <p className="mt-8 text-note text-ink-2 italic">
          Run again for this page, on engine {engineNow}. Revision {row.revision} was written on engine{' '}
          {engineVersion}.
        </p>
      </Zone>
      <Zone letter="H" title="Notes">
        <Notes sources={template.sources} notes={notes} />
      </Zone>
    </>
  );
});

function Block({ data, action }: { readonly data: TemplatePageData; readonly action: BlockAction }) {
  const { row } = data;
  return (
    <TitleBlock
      org={data.practice}
      orgNote="Template"
      kind="Title"
      title={row.name}
      by={row.author}
      checked={row.reviewer ?? undefined}
      date={dayText(new Date(row.date))}
      status={row.state}
      reference={row.reference}
      revision={String(row.revision)}
      revisions={data.history}
      action={action}
      others={[
        { label: 'Passport', href: paths.passport(row.slug, row.revision) },
        { label: 'Print this page', onPress: () => window.print() },
      ]}
    />
  );
}

/** "Use in a job", with the values of the page, and its key; not with values that give no result. */
function useAction({ row, barred, template }: TemplatePageData, { query, outcome }: Page) {
  const why = barred ?? (outcome.ok ? null : putRightFirst(toCauses(template, outcome.errors)));
  const href = `${paths.newMemberOf(row.slug)}${query === '' ? '' : `&${query}`}`;
  useKeys({ u: () => why === null && location.assign(href) });
  return why === null
    ? { label: 'Use in a job', keyName: 'U', href }
    : { label: 'Use in a job', reason: why };
}

/** A figure on the drawing leads to its field; null to the first. */
function focusField(symbol: string | null): void {
  const of = symbol === null ? '' : `="${CSS.escape(symbol)}"`;
  const field = document.querySelector<HTMLInputElement>(`[data-symbol${of}] input`);
  field?.scrollIntoView({ block: 'nearest' });
  field?.focus();
  field?.select();
}

function textOf(
  { template }: TemplatePageData,
  { raw }: ReturnType<typeof useTemplatePage>['values'],
  symbol: string,
) {
  const parameter = template.parameters.find((one) => one.symbol === symbol);
  const value = raw[symbol];
  return parameter?.kind === 'quantity' && value?.kind === 'quantity'
    ? entryText(value.entry, parameter.dimension)
    : null;
}
