import { type Solution, solveBeam } from '../beam/index';
import { readBeam } from '../model/index';
import { type DimensionName, readQuantity } from '../quantity/index';
import type { Expectation, ProofCase, Selector, Template } from './document';
import { evaluateNumber, evaluateTruth, type Scope } from './evaluate';
import { defaultEi, instantiate } from './instance';
import { select, selectorDimension } from './select';
import { readParameters } from './values';

/** One compared quantity, SI; `ok` where |got − expected| ≤ tolerance. */
type ProofCheck = {
  name: string;
  quantity: Selector;
  expected: number;
  got: number;
  tolerance: number;
  ok: boolean;
  /** What was compared with: a formula, or a printed figure as it is printed. */
  against: string;
};

export type ProofResult = { name: string; source: string; ok: boolean; checks: ProofCheck[]; fault?: string };

/** Closed forms agree within this share of the largest value of their kind. */
const EXACT = 1e-9;

/**
 * Solves the beam of every proof case and compares: closed forms within 1e-9 of the largest value of their kind,
 * printed figures within half a unit of their last digit. A case that cannot be solved is not ok and says why.
 */
export const runProofCases = (template: Template): ProofResult[] =>
  template.proof_cases.map((proof) => {
    const { name, source } = proof;
    const solved = solveCase(template, proof);
    if (!solved.ok) return { name, source, ok: false, checks: [], fault: solved.message };
    const checks = proof.expect.map((expectation) =>
      compare(template, expectation, solved.solution, solved.scope),
    );
    return { name, source, ok: checks.every(({ ok }) => ok), checks };
  });

type Solved = { ok: true; solution: Solution; scope: Scope } | { ok: false; message: string };

function solveCase(template: Template, { parameters, ei }: ProofCase): Solved {
  const values = readParameters(template, parameters);
  if (!values.ok) return { ok: false, message: values.faults.map(({ message }) => message).join(' ') };
  const stiffness = ei === undefined ? undefined : readQuantity(ei, 'bending_stiffness');
  if (stiffness && !stiffness.ok) return { ok: false, message: stiffness.message };
  const made = instantiate(template, values.values, { ei: stiffness?.value ?? defaultEi(template) });
  if (!made.ok) return { ok: false, message: made.faults.map(({ message }) => message).join(' ') };
  const beam = readBeam(made.instance.beam);
  if (!beam.ok) return { ok: false, message: beam.faults.map(({ message }) => message).join(' ') };
  return { ok: true, solution: solveBeam(beam.value), scope: made.instance.scope };
}

function compare(template: Template, expectation: Expectation, solution: Solution, scope: Scope): ProofCheck {
  if ('result' in expectation) return compareResult(template, expectation.result, solution, scope);
  const { quantity } = expectation;
  const { value: got, scale, name } = select(quantity, solution, scope);
  const { expected, tolerance, against } =
    'exact' in expectation
      ? {
          expected: evaluateNumber(expectation.exact.tree, scope),
          tolerance: (expectation.tolerance ?? EXACT) * scale,
          against: expectation.exact.text,
        }
      : readPrinted(expectation, selectorDimension(quantity), scope);
  return { name, quantity, expected, got, tolerance, against, ok: Math.abs(got - expected) <= tolerance };
}

function compareResult(template: Template, id: string, solution: Solution, scope: Scope): ProofCheck {
  const result = template.results.find((one) => one.id === id);
  if (!result) throw new RangeError(`No result ${id}`);
  const { quantity, expression, name } = result;
  const applies = result.when === undefined || evaluateTruth(result.when.tree, scope);
  const { value: got, scale } = select(quantity, solution, scope);
  const expected = evaluateNumber(expression.tree, scope);
  const tolerance = EXACT * scale;
  const ok = applies && Math.abs(got - expected) <= tolerance;
  return { name, quantity, expected, got, tolerance, ok, against: expression.text };
}

type Printed = Extract<Expectation, { printed: string }>;
type Expected = { expected: number; tolerance: number; against: string };

/** A printed figure and half a unit of its last digit: "0.4215", "184.6", "33.28 kN". */
export const PRINTED = /^(-?\d+(?:\.(\d+))?) ?(\D.*)?$/;

function readPrinted(expectation: Printed, dimension: DimensionName, scope: Scope): Expected {
  const [, digits = '', decimals = '', unit = ''] = PRINTED.exec(expectation.printed) ?? [];
  const figure = digits === '' ? Number.NaN : Number(digits);
  const half = 0.5 * 10 ** -decimals.length;
  const against = expectation.printed;
  if ('times' in expectation) {
    const times = evaluateNumber(expectation.times.tree, scope);
    return {
      expected: figure * times,
      tolerance: half * Math.abs(times),
      against: `${against} ${expectation.times.text}`,
    };
  }
  if ('over' in expectation) {
    const over = evaluateNumber(expectation.over.tree, scope);
    const tolerance = Math.abs(over / (figure - half) - over / figure);
    return { expected: over / figure, tolerance, against: `${expectation.over.text} / ${against}` };
  }
  const [expected, tolerance] = [digits, half].map((number) => {
    const reading = readQuantity(`${number} ${unit}`, dimension);
    return reading.ok ? reading.value : Number.NaN;
  });
  return { expected: expected ?? Number.NaN, tolerance: tolerance ?? Number.NaN, against };
}
