import { useMemo } from 'react';
import { TitleBlock } from '@/components/ui/TitleBlock';
import { TitleStrip } from '@/components/ui/TitleStrip';
import { useKeys } from '@/components/ui/use-keys';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { paths } from '@/paths';
import { BeamResults } from './BeamResults';
import { Causes } from './Causes';
import { ForceMethod } from './ForceMethod';
import { fieldFaults, toCauses } from './faults';
import { toResultLines, toRuleLines } from './lines';
import { ParameterFields } from './ParameterFields';
import { dayText, type TemplatePageData } from './page';
import { entryText } from './raw';
import { ClosedForms, Notes, ProofCases, proofNote, Validity, Zone } from './SheetZones';
import { StiffnessFields } from './StiffnessFields';
import { useRestedValue } from './use-live';
import { useTemplatePage } from './use-template-page';

/** A template's page: its values, the beam that follows from them, and how it is worked. */
export function TemplateSheet({ data }: { readonly data: TemplatePageData }) {
  const { template, row, system, formulas } = data;
  const page = useTemplatePage(data);
  const { outcome, good, values } = page;
  const { evaluation } = good;
  const rested = useRestedValue(evaluation);
  const faults = outcome.ok ? [] : outcome.errors;
  const causes = toCauses(template, faults);
  const action = useAction(data, page.query);
  const rules = useMemo(
    () => toRuleLines(template, evaluation.rules, system),
    [template, evaluation, system],
  );
  const results = useMemo(
    () => toResultLines(template, evaluation.instance, system),
    [template, evaluation, system],
  );
  const lastGoodNote = outcome.ok ? undefined : 'At the last good values';
  return (
    <>
      <div className="flex flex-col">
        <section className="max-md:order-2 max-md:border-t max-md:border-ink">
          <div className="px-(--pad) pt-12">
            <ZoneHeading
              letter="A"
              note={
                <>
                  <span className="max-lg:hidden">
                    Figures underlined on the drawing are the same inputs.{' '}
                  </span>
                  <button
                    type="button"
                    className="link min-h-26 pointer-coarse:min-h-44"
                    onClick={page.restore}
                  >
                    Restore the defaults
                  </button>
                </>
              }
            >
              Parameters
            </ZoneHeading>
          </div>
          <ParameterFields
            template={template}
            raw={values.raw}
            system={system}
            faults={fieldFaults(faults)}
            onChange={page.setParameter}
          >
            <StiffnessFields
              template={template}
              values={values}
              system={system}
              fault={fieldFaults(faults).get('ei')}
              sectionFault={data.sectionFault}
              onChange={page.set}
            />
          </ParameterFields>
        </section>
        <section
          className={`relative border-ink max-md:order-1 md:border-t ${outcome.ok ? '' : 'lg:grid lg:grid-cols-[minmax(0,1fr)_var(--title-column)]'}`}
        >
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
              system={system}
              depth={values.section?.resolved.depth}
              notDrawn={causes[0] && `Not drawn: ${causes[0].title}.`}
              onEdit={focusField}
            />
          </div>
          {!outcome.ok && (
            <Causes
              causes={causes}
              onPutBack={page.putBack}
              lastGood={(symbol) => textOf(data, good.values, symbol)}
            />
          )}
        </section>
      </div>
      <div className="grid flex-1 border-t border-ink md:grid-cols-[minmax(0,1fr)_var(--title-column)] lg:grid-cols-[minmax(0,724fr)_minmax(0,312fr)_var(--title-column)]">
        <section className="zone md:max-lg:col-span-2 md:max-lg:border-b md:max-lg:border-ink">
          <ForceMethod
            solved={rested}
            releases={page.releases}
            onChoose={page.setReleases}
            initial={data.worked}
          />
        </section>
        <div className="min-w-0 border-ink max-md:border-t lg:border-l">
          <Zone letter="E" title="Validity" note={lastGoodNote}>
            <Validity rules={rules} formulas={formulas} />
          </Zone>
          <Zone letter="F" title="Proof cases" note={proofNote(data.proof)}>
            <ProofCases cases={data.proof} />
            <p className="mt-8 text-note text-ink-2 italic">
              Run again for this page. They also ran before revision {row.revision} was issued, on engine{' '}
              {data.engineVersion}.
            </p>
          </Zone>
          <Zone letter="H" title="Closed forms" note={lastGoodNote}>
            <ClosedForms results={results} formulas={formulas} />
          </Zone>
        </div>
        <aside className="flex min-w-0 flex-col border-ink max-md:border-t md:border-l">
          <Zone letter="G" title="Notes">
            <Notes template={template} />
          </Zone>
          <div className="mt-auto">
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
              others={[{ label: 'Print this page', onPress: () => window.print() }]}
            />
          </div>
        </aside>
      </div>
      <TitleStrip
        kind="Template"
        title={row.name}
        status={row.state}
        reference={row.reference}
        revision={String(row.revision)}
        action={{ ...action, keyName: undefined }}
      />
    </>
  );
}

/** "Use in a job", with the values of the page, and its key. */
function useAction({ row, barred }: TemplatePageData, query: string) {
  const href = `${paths.newMemberOf(row.slug)}${query === '' ? '' : `&${query}`}`;
  useKeys({ u: () => barred === null && location.assign(href) });
  return barred === null
    ? { label: 'Use in a job', keyName: 'U', href }
    : { label: 'Use in a job', reason: barred };
}

/** A figure on the drawing leads to its field. */
function focusField(symbol: string): void {
  const field = document.querySelector<HTMLInputElement>(`[data-symbol="${CSS.escape(symbol)}"] input`);
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
