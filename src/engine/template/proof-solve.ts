/** One point of a template's parameter box: solved by the force method, proven by direct stiffness. */
import { type Proof, type Solution, solveBeam } from '../beam/index';
import { SingularMatrix } from '../linear/index';
import { type Beam, checkRedundants, readBeam } from '../model/index';
import { isProven, proofLimit, proveSolution } from '../proof/index';
import { readQuantity } from '../quantity/index';
import { SingularStiffness } from '../stiffness/index';
import type { Template } from './document';
import { evaluateNumber, evaluateTruth } from './evaluate';
import { defaultEi, type Instance, instantiate } from './instance';
import type { BoxPoint } from './proof-box';
import { judgeRules, type Known } from './rules';
import { scopeOf } from './scope';
import { select } from './select';
import { readParameters, type Values } from './values';

export type SolvedPoint = {
  readonly instance: Instance;
  readonly beam: Beam;
  readonly solution: Solution;
  readonly proof: Proof;
  /** What the proof may be at most: 1e-9, or 1e-6 where lengths are very short. */
  readonly limit: number;
};

/** Refused: a block rule keeps the point out. Failed: it is let in, and has no result that can be trusted. */
export type PointReading =
  | { readonly state: 'solved'; readonly solved: SolvedPoint }
  | { readonly state: 'refused'; readonly rule: string }
  | { readonly state: 'failed'; readonly message: string };

const failed = (faults: readonly { message: string }[]): PointReading => ({
  state: 'failed',
  message: faults.map(({ message }) => message).join(' '),
});

export function solvePoint(template: Template, point: BoxPoint): PointReading {
  const values = readParameters(template, point.parameters);
  if (!values.ok) return failed(values.faults);
  const stiffness = readQuantity(point.ei, 'bending_stiffness');
  if (!stiffness.ok) return failed([stiffness]);
  return solveValues(template, values.values, stiffness.value);
}

/** The same for values in SI, within their ranges or not; EI is the template's own unless it is given. */
function solveValues(template: Template, values: Values, ei = defaultEi(template)): PointReading {
  const scope = scopeOf(template, values, ei);
  const blocked = (known: Known): PointReading | undefined => {
    const rule = judgeRules(template, scope, known).find(
      ({ state, severity }) => state === 'broken' && severity === 'block',
    );
    return rule && { state: 'refused', rule: rule.id };
  };
  const early = blocked({});
  if (early) return early;
  const made = instantiate(template, values, { ei });
  if (!made.ok) return failed(made.faults);
  const beam = readBeam(made.instance.beam);
  if (!beam.ok) return failed(beam.faults);
  const { redundants = [] } = made.instance.beam;
  const inadmissible = checkRedundants(beam.value, redundants);
  if (inadmissible.length > 0) return failed(inadmissible);
  const reading = solveProven(made.instance, beam.value);
  return (reading.state === 'solved' && blocked({ solution: reading.solved.solution })) || reading;
}

function solveProven(instance: Instance, beam: Beam): PointReading {
  try {
    const solution = solveBeam(beam, instance.beam.redundants);
    const proof = proveSolution(beam, solution);
    if (isProven(proof, beam))
      return { state: 'solved', solved: { instance, beam, solution, proof, limit: proofLimit(beam) } };
    return failed([{ message: 'The force method and direct stiffness do not agree.' }]);
  } catch (error) {
    if (!(error instanceof SingularMatrix || error instanceof SingularStiffness)) throw error;
    return failed([{ message: 'There is no result within the digits that are carried.' }]);
  }
}

/** A closed form beside the solver: their difference as a share of the largest value of its kind. */
type FormShare = { readonly id: string; readonly share: number };

/** Every closed form that holds at the point. */
export const compareForms = (template: Template, { instance, solution }: SolvedPoint): FormShare[] =>
  template.results
    .filter(({ when }) => when === undefined || evaluateTruth(when.tree, instance.scope))
    .map(({ id, quantity, expression }) => {
      const { value, scale } = select(quantity, solution, instance.scope);
      const difference = Math.abs(value - evaluateNumber(expression.tree, instance.scope));
      return { id, share: difference === 0 ? 0 : difference / scale };
    });
