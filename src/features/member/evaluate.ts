import { prepareBeam, type Solution } from '@/engine/beam';
import {
  type Arrangement,
  type Criteria,
  checkMember,
  type MemberChecks,
  type ServiceArrangement,
} from '@/engine/check';
import {
  actingCombinations,
  factoredLoads,
  groupsOf,
  stillBeam,
  supportsMove,
} from '@/engine/combination';
import { SingularMatrix } from '@/engine/linear';
import { type Beam, checkRedundants, type Load, type Redundant, readBeam } from '@/engine/model';
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
  /** Instead of the template's own choice. */
  readonly redundants?: readonly Redundant[] | undefined;
};

export type ProofLine = {
  readonly equilibrium: number;
  readonly compatibility: number;
  readonly agreement: number;
  /** How many solved arrangements the worst is of. */
  readonly arrangements: number;
  readonly proven: boolean;
};

export type MemberEvaluation = {
  readonly instance: Instance;
  readonly section: ResolvedSection | null;
  readonly beam: Beam;
  /** All groups together, unfactored. */
  readonly total: Solution;
  /** Each group alone, unfactored; supports' own movements as a group of their own where there are any. */
  readonly groups: readonly { readonly group: string; readonly solution: Solution }[];
  readonly strength: readonly Arrangement[];
  readonly service: readonly ServiceArrangement[];
  /** Null until both a section and criteria are chosen. */
  readonly checks: MemberChecks | null;
  readonly rules: readonly RuleOutcome[];
  readonly proof: ProofLine;
};

export type MemberReading =
  | { readonly ok: true; readonly evaluation: MemberEvaluation }
  | { readonly ok: false; readonly faults: readonly ParameterFault[] };

/** The group of what the supports do by themselves. */
export const MOVEMENTS = 'movements';

const refused = (path: readonly (string | number)[], code: string, message: string): MemberReading => ({
  ok: false,
  faults: [{ path, code, message }],
});

const inParameters = (faults: readonly ParameterFault[]): MemberReading => ({
  ok: false,
  faults: faults.map((fault) => ({ ...fault, path: ['parameters', ...fault.path] })),
});

/**
 * Solves and checks a member: each load group alone, all of them together, and every combination of the criteria as an
 * arrangement of its own, each proven by the second method. Pure: the browser shows while a value is dragged what the
 * server stores on saving. Refused with the path of each fault in the member's inputs.
 */
export function evaluateMember(inputs: MemberInputs): MemberReading {
  const { template, system, criteria } = inputs;
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
  if (!made.ok) return inParameters(made.faults);
  const { instance } = made;
  const reading = readBeam({ ...instance.beam, horizontal: 'ignore' });
  if (!reading.ok) return inParameters(reading.faults.map((fault) => ({ ...fault, path: [] })));
  const beam = reading.value;
  const choice = instance.beam.redundants;
  const inadmissible = choice && checkRedundants(beam, choice)[0];
  if (inadmissible) return refused(['redundants'], inadmissible.code, inadmissible.message);
  try {
    const evaluation = evaluateBeam(instance, beam, section, criteria, template, system);
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

function evaluateBeam(
  instance: Instance,
  beam: Beam,
  section: ResolvedSection | null,
  criteria: Criteria | null,
  template: Template,
  system: UnitSystemName,
): MemberEvaluation {
  const prepared = prepareBeam(beam, instance.beam.redundants);
  const proofs: { beam: Beam; solution: Solution }[] = [];
  const solve = (loads: readonly Load[], movements: boolean): Solution => {
    const solution = prepared.solve(loads, { movements });
    proofs.push({ beam: { ...(movements ? beam : stillBeam(beam)), loads }, solution });
    return solution;
  };
  const total = solve(beam.loads, true);
  const present = groupsOf(beam.loads);
  const groups = [
    ...present.map((group) => ({
      group,
      solution: solve(
        beam.loads.filter((load) => load.group === group),
        false,
      ),
    })),
    ...(supportsMove(beam) ? [{ group: MOVEMENTS, solution: solve([], true) }] : []),
  ];
  const arrangementsOf = (combinations: Criteria['strength']['combinations']): Arrangement[] =>
    actingCombinations(combinations, present, criteria?.letters).map((combination) => ({
      combination,
      solution: solve(factoredLoads(beam.loads, combination), true),
    }));
  const strength = arrangementsOf(criteria?.strength.combinations ?? []);
  const service = (criteria?.deflection ?? []).flatMap((limit): ServiceArrangement[] =>
    arrangementsOf([limit.combination]).map(({ combination, solution }) => ({
      limit: { ...limit, combination },
      solution,
    })),
  );
  return {
    instance,
    section,
    beam,
    total,
    groups,
    strength,
    service,
    checks:
      section && criteria
        ? checkMember({ beam, section: section.elastic, criteria, strength, service, system })
        : null,
    rules: judgeRules(template, instance.scope, { depth: section?.depth, ga: null, solution: total }, system),
    proof: worstOf(proofs),
  };
}

function worstOf(proofs: readonly { beam: Beam; solution: Solution }[]): ProofLine {
  const each = proofs.map(({ beam, solution }) => ({ beam, proof: proveSolution(beam, solution) }));
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
