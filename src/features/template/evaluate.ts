import type { Proof, Solution } from '@/engine/beam';
import type { Beam, Redundant } from '@/engine/model';
import { readQuantity, type UnitSystemName } from '@/engine/quantity';
import {
  type Instance,
  instantiate,
  judgeRules,
  type RuleOutcome,
  readParameters,
  type Template,
} from '@/engine/template';
import { solveProven } from '@/features/beam/solve';
import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';

/** What a template needs to know of a section: N·m², N, N/m, m. */
export type SectionOfTemplate = {
  readonly designation: string;
  readonly ei: number;
  readonly ga?: number | null | undefined;
  readonly selfWeight: number;
  readonly depth: number;
};

export type EvaluationInputs = {
  /** By symbol: text with a unit, a number in SI, a named value, rows, or a load by its groups. */
  readonly parameters: Readonly<Record<string, unknown>>;
  readonly section?: SectionOfTemplate | undefined;
  /** Instead of a section; the template's own without either. */
  readonly ei?: number | string | undefined;
  readonly redundants?: readonly Redundant[] | undefined;
  readonly self_weight?: boolean | undefined;
};

export type EvaluationOptions = {
  /** For fields: a text without unit takes the one that the field shows. */
  readonly fields?: UnitSystemName | undefined;
  /** The units of messages. */
  readonly system?: UnitSystemName | undefined;
};

export type TemplateEvaluation = {
  readonly template: Template;
  readonly instance: Instance;
  readonly beam: Beam;
  readonly solution: Solution;
  readonly proof: Proof;
  readonly rules: readonly RuleOutcome[];
};

export type TemplateEvaluating =
  | { readonly ok: true; readonly evaluation: TemplateEvaluation }
  | { readonly ok: false; readonly errors: Fault[] };

type Located = { path: readonly (string | number)[]; code: string; message: string };

const refused = (faults: readonly Located[], base: readonly string[] = []): TemplateEvaluating => ({
  ok: false,
  errors: faults.map(({ path, code, message }) => ({ pointer: pointer([...base, ...path]), code, message })),
});

/**
 * A template at given values, solved and proven: the endpoint's numbers, and the page's while a value is dragged.
 * Refused with a JSON Pointer into the inputs for everything that is wrong: a value, a block rule, the stiffness, the
 * redundants.
 */
export function evaluateTemplate(
  template: Template,
  inputs: EvaluationInputs,
  { fields, system = fields ?? 'metric' }: EvaluationOptions = {},
): TemplateEvaluating {
  const stiffness = readStiffness(inputs);
  const values = readParameters(template, inputs.parameters, { fields });
  if (!values.ok || !stiffness.ok)
    return refused([...prefixed(values.ok ? [] : values.faults), ...stiffness.faults]);
  const { section, redundants, self_weight } = inputs;
  const made = instantiate(template, values.values, {
    ei: stiffness.ei,
    ga: section?.ga,
    depth: section?.depth,
    selfWeight: self_weight ? section?.selfWeight : undefined,
    redundants,
  });
  if (!made.ok) return refused(made.faults, ['parameters']);
  const { instance } = made;
  const solved = solveProven(instance.beam);
  if (!solved.ok) return refused(solved.faults.map(fromBeam));
  const { beam, solution, proof } = solved.value;
  const rules = judgeRules(
    template,
    instance.scope,
    { depth: section?.depth, ga: section?.ga, solution },
    system,
  );
  const broken = rules.filter(({ state, severity }) => state === 'broken' && severity === 'block');
  if (broken.length > 0)
    return refused(
      broken.map(({ path, message }) => ({ path, message, code: 'rule_broken' })),
      ['parameters'],
    );
  return { ok: true, evaluation: { template, instance, beam, solution, proof, rules } };
}

const prefixed = (faults: readonly Located[]): Located[] =>
  faults.map((fault) => ({ ...fault, path: ['parameters', ...fault.path] }));

/** Redundants are the caller's own; every other place in the beam follows from the parameters. */
const fromBeam = (fault: Located): Located =>
  fault.path[0] === 'redundants' ? fault : { ...fault, path: ['parameters'] };

type Stiffness = { ok: true; ei: number | undefined; faults: [] } | { ok: false; faults: Located[] };

function readStiffness({ ei, section, self_weight }: EvaluationInputs): Stiffness {
  const faults: Located[] = [];
  const fault = (path: string, code: string, message: string) => faults.push({ path: [path], code, message });
  if (ei !== undefined && section) fault('ei', 'conflict', 'Give a section or EI, not both.');
  if (self_weight && !section)
    fault('self_weight', 'conflict', 'Own weight needs a section. Choose one, or leave the own weight out.');
  const reading = typeof ei === 'string' ? readQuantity(ei, 'bending_stiffness') : undefined;
  if (reading?.ok === false) fault('ei', reading.code, reading.message);
  const value = reading?.ok ? reading.value : typeof ei === 'number' ? ei : section?.ei;
  if (value !== undefined && !(value > 0 && Number.isFinite(value)))
    fault(
      'ei',
      'not_positive',
      'EI is not more than zero. A beam without stiffness has no result; give one.',
    );
  return faults.length > 0 ? { ok: false, faults } : { ok: true, ei: value, faults: [] };
}
