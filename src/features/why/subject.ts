/** What the engine is asked about, out of what a page has evaluated. Pure. */
import type { Redundant } from '@/engine/model';
import type { UnitSystemName } from '@/engine/quantity';
import { type Material, materialFor } from '@/engine/section';
import { readParameters, type Template, type Values } from '@/engine/template';
import type { Subject, SubjectSection } from '@/engine/why';
import type { MemberEvaluation, MemberInputs } from '@/features/member/evaluate';
import type { SectionValues } from '@/features/section/resolve';
import type { RowOrigin } from '@/features/section/section';
import type { TemplateEvaluation } from '@/features/template/evaluate';

/** A section as it was chosen. */
interface ChosenSection {
  readonly values: SectionValues;
  /** The slug of its table. */
  readonly table: string;
  /** The material's id or key, and the material itself where the page has it. */
  readonly material: string;
  readonly made?: Material | undefined;
  readonly origin?: RowOrigin | undefined;
}

interface TemplateAbout {
  readonly kind: 'template';
  readonly evaluation: Pick<TemplateEvaluation, 'template' | 'instance' | 'beam'>;
  readonly revision: number;
  /** As typed, by symbol. */
  readonly parameters: Readonly<Record<string, unknown>>;
  readonly system: UnitSystemName;
  readonly section: ChosenSection | null;
  /** Null where EI is the section's, or the template's own. */
  readonly ei: string | null;
  /** What the page releases. */
  readonly redundants: readonly Redundant[];
}

interface MemberAbout {
  readonly kind: 'member';
  readonly inputs: MemberInputs;
  readonly evaluation: MemberEvaluation;
  readonly revision: number;
  readonly section: ChosenSection | null;
  readonly criteriaRevision: number | null;
}

/** What a page can be asked about. */
export type About = TemplateAbout | MemberAbout;

export const toSubject = (about: About): Subject =>
  about.kind === 'template' ? ofTemplate(about) : ofMember(about);

function ofTemplate({
  evaluation,
  revision,
  parameters,
  system,
  section,
  ei,
  redundants,
}: TemplateAbout): Subject {
  const { template, instance, beam } = evaluation;
  return {
    template,
    revision,
    instance: { ...instance, beam: { ...instance.beam, redundants: [...redundants] } },
    beam,
    typed: parameters,
    values: valuesOf(template, parameters),
    system,
    section: section && sectionOf(section, section.made ?? materialFor(section.material)),
    typedEi: ei,
    patterned: [],
    criteria: null,
  };
}

function ofMember({ inputs, evaluation, revision, section, criteriaRevision }: MemberAbout): Subject {
  const { template, parameters, system, criteria } = inputs;
  return {
    template,
    revision,
    instance: evaluation.instance,
    beam: evaluation.beam,
    typed: parameters,
    values: valuesOf(template, parameters),
    system,
    section: section && sectionOf(section, inputs.section?.material),
    typedEi: null,
    patterned: evaluation.patterning.groups,
    criteria: criteria && {
      document: criteria,
      revision: criteriaRevision,
      strength: evaluation.strength.map(({ combination }) => combination),
      limits: evaluation.service.map(({ limit }) => limit),
    },
  };
}

/** Values that were evaluated are read again; they are known to be good. */
function valuesOf(template: Template, parameters: Readonly<Record<string, unknown>>): Values {
  const reading = readParameters(template, parameters);
  return reading.ok ? reading.values : {};
}

function sectionOf(
  { values, table, origin }: ChosenSection,
  material: Material | undefined,
): SubjectSection | null {
  return (
    (material && {
      ...values,
      table,
      tableName: origin?.tableName ?? table,
      edition: origin?.edition ?? null,
      computed: origin?.computed ?? [],
      material,
    }) ??
    null
  );
}
