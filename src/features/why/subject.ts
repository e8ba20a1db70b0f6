/** What the engine is asked about, out of what a page has evaluated. Pure. */
import type { UnitSystemName } from '@/engine/quantity';
import type { Material } from '@/engine/section';
import { readParameters, type Template, type Values } from '@/engine/template';
import type { Subject, SubjectSection } from '@/engine/why';
import type { MemberEvaluation, MemberInputs } from '@/features/member/evaluate';
import type { SectionValues } from '@/features/section/resolve';
import type { TemplateEvaluation } from '@/features/template/evaluate';

/** A section as it was chosen; what it was computed from is known where its row is. */
export interface ChosenSection {
  readonly values: SectionValues;
  readonly table: string;
  readonly tableName: string;
  readonly edition: number | null;
  readonly material: Material;
  readonly computed: readonly string[];
}

interface TemplateAsked {
  readonly evaluation: TemplateEvaluation;
  readonly revision: number;
  /** As typed, by symbol. */
  readonly parameters: Readonly<Record<string, unknown>>;
  readonly system: UnitSystemName;
  readonly section: ChosenSection | null;
  /** Null where EI is the section's, or the template's own. */
  readonly ei: string | null;
}

/** A template at the values of its page. */
export const templateSubject = (asked: TemplateAsked): Subject => ({
  template: asked.evaluation.template,
  revision: asked.revision,
  instance: asked.evaluation.instance,
  beam: asked.evaluation.beam,
  typed: asked.parameters,
  values: valuesOf(asked.evaluation.template, asked.parameters),
  system: asked.system,
  section: asked.section && sectionOf(asked.section),
  typedEi: asked.ei,
  patterned: [],
  criteria: null,
});

interface MemberAsked {
  readonly inputs: MemberInputs;
  readonly evaluation: MemberEvaluation;
  readonly templateRevision: number;
  readonly section: ChosenSection | null;
  readonly criteriaRevision: number | null;
}

/** A member as it stands in its fields. */
export const memberSubject = ({
  inputs,
  evaluation,
  templateRevision,
  section,
  criteriaRevision,
}: MemberAsked): Subject => ({
  template: inputs.template,
  revision: templateRevision,
  instance: evaluation.instance,
  beam: evaluation.beam,
  typed: inputs.parameters,
  values: valuesOf(inputs.template, inputs.parameters),
  system: inputs.system,
  section: section && sectionOf(section),
  typedEi: null,
  patterned: evaluation.patterning.groups,
  criteria: inputs.criteria && {
    document: inputs.criteria,
    revision: criteriaRevision,
    strength: evaluation.strength.map(({ combination }) => combination),
    limits: evaluation.service.map(({ limit }) => limit),
  },
});

/** Values that were evaluated are read again; they are known to be good. */
function valuesOf(template: Template, parameters: Readonly<Record<string, unknown>>): Values {
  const reading = readParameters(template, parameters);
  return reading.ok ? reading.values : {};
}

const sectionOf = ({
  values,
  table,
  tableName,
  edition,
  material,
  computed,
}: ChosenSection): SubjectSection => ({
  designation: values.designation,
  table,
  tableName,
  edition,
  dimensions: values.dimensions,
  massKgM: values.massKgM,
  iMajorCm4: values.iMajorCm4,
  wElCm3: values.wElCm3,
  computed,
  material,
});
