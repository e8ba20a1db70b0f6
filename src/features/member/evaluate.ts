import { type Criteria, checkMember, type MemberChecks } from '@/engine/check';
import type { SolvedCase } from '@/engine/envelope';
import { SingularMatrix } from '@/engine/linear';
import { type Beam, checkRedundants, type Redundant, readBeam } from '@/engine/model';
import { isProven, proveSolution } from '@/engine/proof';
import type { UnitSystemName } from '@/engine/quantity';
import type { Material } from '@/engine/section';
import { SingularStiffness } from '@/engine/stiffness';
import {
  type Instance,
  instantiate,
  judgeRules,
  type ParameterFault,
  type RuleOutcome,
  readParameters,
  type Template,
} from '@/engine/template';
import { type ResolvedSection, resolveSection, type SectionValues } from '@/features/section/resolve';
import { type MemberSolution, solveMember } from './solve';

/** Everything that a member's numbers follow from: what was typed, and the documents that it pins. */
export type MemberInputs = {
  readonly template: Template;
  /** By symbol, as typed; a load may be given by its groups: { "w": { "G": "5.52 kN/m", "S": "3.6 kN/m" } }. */
  readonly parameters: Readonly<Record<string, unknown>>;
  readonly system: UnitSystemName;
  readonly section: { readonly values: SectionValues; readonly material: Material } | null;
  readonly criteria: Criteria | null;
  /** The section's own weight acts unless it is switched off, with a reason that is printed. */
  readonly ownWeight: boolean;
  /** The groups that the criteria say so act only where adverse, unless that is switched off, with a printed reason. */
  readonly patterns: boolean;
  /** Instead of the template's own choice. */
  readonly redundants?: readonly Redundant[] | undefined;
};

export type ProofLine = {
  readonly equilibrium: number;
  readonly compatibility: number;
  readonly agreement: number;
  /** How many solved load cases the worst is of. */
  readonly arrangements: number;
  readonly proven: boolean;
};

export type MemberEvaluation = Omit<MemberSolution, 'solved'> & {
  readonly instance: Instance;
  readonly section: ResolvedSection | null;
  readonly beam: Beam;
  /** Null until both a section and criteria are chosen. */
  readonly checks: MemberChecks | null;
  readonly rules: readonly RuleOutcome[];
  readonly proof: ProofLine;
};

export type MemberReading =
  | { readonly ok: true; readonly evaluation: MemberEvaluation }
  | { readonly ok: false; readonly faults: readonly ParameterFault[] };

type Refusal = Extract<MemberReading, { ok: false }>;

const refused = (path: readonly (string | number)[], code: string, message: string): Refusal => ({
  ok: false,
  faults: [{ path, code, message }],
});

const inParameters = (faults: readonly ParameterFault[]): Refusal => ({
  ok: false,
  faults: faults.map((fault) => ({ ...fault, path: ['parameters', ...fault.path] })),
});

type InstanceReading =
  | { readonly ok: true; readonly instance: Instance; readonly section: ResolvedSection | null }
  | Refusal;

/** The beam that a member's inputs make, before it is solved. */
export function instanceOf(inputs: MemberInputs): InstanceReading {
  const { template } = inputs;
  const values = readParameters(template, inputs.parameters);
  if (!values.ok) return inParameters(values.faults);
  const resolution = inputs.section && resolveSection(inputs.section.values, inputs.section.material);
  if (resolution && !resolution.ok) return refused(['section'], 'no_strength', resolution.message);
  const section = resolution?.section ?? null;
  const made = instantiate(template, values.values, {
    ei: section?.ei,
    depth: section?.depth,
    selfWeight: inputs.ownWeight ? section?.selfWeight : undefined,
    redundants: inputs.redundants,
  });
  return made.ok ? { ok: true, instance: made.instance, section } : inParameters(made.faults);
}

/**
 * Solves and checks a member: each load group alone and all of them together, proven by the second method, and every
 * combination of the criteria over all patterns as sums of them. Pure: the browser shows while a value is dragged what
 * the server stores on saving. Refused with the path of each fault in the member's inputs.
 */
export function evaluateMember(inputs: MemberInputs): MemberReading {
  const made = instanceOf(inputs);
  if (!made.ok) return made;
  const { instance, section } = made;
  const reading = readBeam({ ...instance.beam, horizontal: 'ignore' });
  if (!reading.ok) return inParameters(reading.faults.map((fault) => ({ ...fault, path: [] })));
  const beam = reading.value;
  const choice = instance.beam.redundants;
  const inadmissible = choice && checkRedundants(beam, choice)[0];
  if (inadmissible) return refused(['redundants'], inadmissible.code, inadmissible.message);
  try {
    const evaluation = evaluateBeam(instance, beam, section, inputs);
    const broken = evaluation.rules.filter(
      ({ state, severity }) => state === 'broken' && severity === 'block',
    );
    return broken.length > 0
      ? inParameters(broken.map(({ path, message }) => ({ path, code: 'rule_broken', message })))
      : { ok: true, evaluation };
  } catch (error) {
    if (!(error instanceof SingularMatrix || error instanceof SingularStiffness)) throw error;
    return refused(inputs.redundants ? ['redundants'] : [], 'unproven', UNSOLVABLE);
  }
}

const UNSOLVABLE =
  'There is no result within the digits that are carried. Look for points that almost coincide, for stiffnesses that are far apart, and for redundants that repeat one another.';

/** Said with the result, as what the criteria themselves leave out is. */
const SWITCHED_OFF =
  'Adverse patterns of loads: switched off for this member, every group stands on its whole length';

function evaluateBeam(
  instance: Instance,
  beam: Beam,
  section: ResolvedSection | null,
  { template, criteria, system, patterns }: MemberInputs,
): MemberEvaluation {
  const { solved, ...solution } = solveMember(beam, instance.beam.redundants, criteria, patterns);
  const { total, strength, service, superposed, nameOf } = solution;
  const limits = service.map(({ limit }) => limit);
  const judged = { beam, superposed, strength, limits, nameOf, system };
  const checks = section && criteria ? checkMember({ ...judged, section: section.elastic, criteria }) : null;
  const isSwitchedOff = !patterns && criteria?.patterns?.some(({ where_adverse }) => where_adverse);
  return {
    ...solution,
    instance,
    section,
    beam,
    checks:
      checks && isSwitchedOff ? { ...checks, notChecked: [SWITCHED_OFF, ...checks.notChecked] } : checks,
    rules: judgeRules(template, instance.scope, { depth: section?.depth, ga: null, solution: total }, system),
    proof: worstOf(solved),
  };
}

function worstOf(solved: readonly SolvedCase[]): ProofLine {
  const each = solved.map(({ beam, solution }) => ({ beam, proof: proveSolution(beam, solution) }));
  const worst = (kind: 'equilibrium' | 'compatibility' | 'agreement') =>
    Math.max(...each.map(({ proof }) => proof[kind]));
  return {
    equilibrium: worst('equilibrium'),
    compatibility: worst('compatibility'),
    agreement: worst('agreement'),
    arrangements: each.length,
    proven: each.every(({ beam, proof }) => isProven(proof, beam)),
  };
}
