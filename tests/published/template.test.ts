import { describe, expect, test } from 'vitest';
import { type Solution, solveBeam, stationPositions, stationsAt } from '@/engine/beam';
import { admissibleSets, type Beam, checkRedundants, type Redundant, readBeam } from '@/engine/model';
import { isProven, proveSolution } from '@/engine/proof';
import { instantiate, readParameters, runProofCases, type Template } from '@/engine/template';
import { authored, instanceAt, shippedTemplate, writtenTemplates } from '../support/templates';

/** Slug, reference, and how many reactions equilibrium cannot find, by the choice of ends where it differs. */
const SHIPPED: [slug: string, reference: string, degree: number | Record<string, number>][] = [
  ['simple-span-uniform', 'Span 1', 0],
  ['simple-span-point-centre', 'Span 2', 0],
  ['simple-span-point', 'Span 3', 0],
  ['simple-span-two-points', 'Span 4', 0],
  ['simple-span-points-uniform', 'Span 5', 0],
  ['simple-span-part-uniform', 'Span 6', 0],
  ['simple-span-uniform-from-end', 'Span 7', 0],
  ['simple-span-triangle-rising', 'Span 8', 0],
  ['simple-span-triangle-centre', 'Span 9', 0],
  ['simple-span-trapezoid', 'Span 10', 0],
  ['simple-span-end-couple', 'Span 11', 0],
  ['simple-span-couple', 'Span 12', 0],
  ['simple-span-uniform-end-moments', 'Span 13', 0],
  ['cantilever-uniform', 'Cantilever 1', 0],
  ['cantilever-tip-point', 'Cantilever 2', 0],
  ['cantilever-point', 'Cantilever 3', 0],
  ['cantilever-triangle-root', 'Cantilever 4', 0],
  ['cantilever-triangle-tip', 'Cantilever 5', 0],
  ['cantilever-tip-couple', 'Cantilever 6', 0],
  ['cantilever-spring-root-uniform', 'Cantilever 7', 0],
  ['propped-cantilever-uniform', 'Prop 1', 1],
  ['propped-cantilever-point-centre', 'Prop 2', 1],
  ['propped-cantilever-point', 'Prop 3', 1],
  ['propped-cantilever-triangle', 'Prop 4', 1],
  ['propped-cantilever-overhang-uniform', 'Prop 5', 1],
  ['propped-cantilever-overhang-tip-point', 'Prop 6', 1],
  ['propped-cantilever-overhang-part-uniform', 'Prop 7', 1],
  ['support-settlement', 'Prop 8', { propped: 1, fixed: 2 }],
  ['propped-cantilever-spring-uniform', 'Prop 9', 1],
  ['propped-cantilever-overhang-loads', 'Prop 10', 1],
  ['fixed-ends-uniform-centre-point', 'Fixed 1', 2],
  ['fixed-ends-point', 'Fixed 2', 2],
  ['fixed-guided-uniform-end-point', 'Fixed 3', 1],
  ['overhang-uniform', 'Overhang 1', 0],
  ['overhang-tip-point', 'Overhang 2', 0],
  ['overhang-uniform-on-overhang', 'Overhang 3', 0],
  ['overhang-loads-in-span', 'Overhang 4', 0],
  ['overhang-double-uniform', 'Overhang 5', 0],
  ['overhang-loads', 'Overhang 6', 0],
  ['two-equal-spans-uniform', 'Continuous 1', 1],
  ['two-equal-spans-one-loaded', 'Continuous 2', 1],
  ['two-unequal-spans-uniform', 'Continuous 3', 1],
  ['three-equal-spans-patterns', 'Continuous 4', 2],
  ['four-equal-spans-patterns', 'Continuous 5', 3],
  ['two-spans-overhang-uniform', 'Continuous 6', 1],
  ['sloping-rafter-uniform', 'Rafter 1', 0],
];

function beamAt(template: Template, parameters: Readonly<Record<string, unknown>> = {}): Beam {
  const reading = readBeam(instanceAt(template, parameters).beam);
  if (reading.ok) return reading.value;
  throw new Error(JSON.stringify(reading.faults));
}

/** The parameters of each variant: every named value of every choice, but those that a rule refuses. */
const variants = (template: Template): Record<string, string>[] =>
  template.parameters
    .reduce<Record<string, string>[]>(
      (all, { symbol, ...parameter }) =>
        parameter.kind === 'choice'
          ? all.flatMap((one) => parameter.options.map(({ value }) => ({ ...one, [symbol]: value })))
          : all,
      [{}],
    )
    .filter((variant) => {
      const reading = readParameters(template, variant);
      return reading.ok && instantiate(template, reading.values).ok;
    });

const PLACES = 41;

/** A result's numbers, kind by kind: whatever is released, they are the same. */
function figures(beam: Beam, solution: Solution): number[][] {
  const stations = stationsAt(solution, stationPositions(beam, PLACES));
  const { shear, moment, slope, deflection } = solution.extremes;
  return [
    solution.reactions.map(({ vertical }) => vertical),
    [
      ...solution.reactions.map((reaction) => reaction.moment),
      ...stations.flatMap((station) => station.moment),
    ],
    [...stations.flatMap((station) => station.shear), shear.max.value, shear.min.value],
    [moment.max.value, moment.min.value],
    [...stations.flatMap((station) => station.slope), slope.max.value, slope.min.value],
    [...stations.map((station) => station.deflection), deflection.max.value, deflection.min.value],
  ];
}

/** Largest difference between two results, each kind beside its largest value. */
function difference(one: number[][], other: number[][]): number {
  const shares = one.map((kind, k) => {
    const largest = Math.max(...kind.map(Math.abs));
    const apart = Math.max(...kind.map((value, i) => Math.abs(value - (other[k]?.[i] ?? Number.NaN))));
    return apart === 0 ? 0 : apart / largest;
  });
  return Math.max(...shares);
}

test('the shipped templates are these', () => {
  expect([...writtenTemplates.keys()].sort()).toEqual(SHIPPED.map(([slug]) => slug).sort());
});

describe.each(SHIPPED)('%s', (slug, reference, degrees) => {
  const template = shippedTemplate(slug);
  const degreeOf = (variant: Record<string, string>): number =>
    typeof degrees === 'number' ? degrees : (degrees[variant['ends'] ?? ''] ?? Number.NaN);

  test('is named and described in full', () => {
    expect(template).toMatchObject({ slug, reference });
    for (const parameter of template.parameters) expect(parameter.help.length).toBeGreaterThan(10);
  });

  test('its proof cases agree with the formulas and the printed figures', () => {
    const results = runProofCases(template);
    expect(results.length).toBeGreaterThanOrEqual(3);
    for (const { name, checks, fault } of results) {
      expect(fault, name).toBeUndefined();
      for (const check of checks) expect(check.ok, `${name}: ${JSON.stringify(check)}`).toBe(true);
    }
  });

  test('every closed form is in a proof case', () => {
    const proven = template.proof_cases.flatMap(({ expect }) =>
      expect.flatMap((one) => ('result' in one ? [one.result] : [])),
    );
    expect(template.results.map(({ id }) => id).filter((id) => !proven.includes(id))).toEqual([]);
  });

  test('every admissible set of redundants gives the same result, proven by stiffness', () => {
    for (const variant of variants(template)) {
      const beam = beamAt(template, variant);
      const degree = degreeOf(variant);
      expect(beam.degree).toBe(degree);
      const own = solveBeam(beam, instanceAt(template, variant).beam.redundants);
      expect(isProven(proveSolution(beam, own), beam)).toBe(true);
      const sets = [...admissibleSets(beam)];
      const worst = Math.max(
        ...sets.map((set) => difference(figures(beam, own), figures(beam, solveBeam(beam, set)))),
      );
      for (const set of sets) expect(solveBeam(beam, set).forceMethod.redundants).toEqual(set);
      const name = [slug, ...Object.values(variant)].join(' ');
      process.stdout.write(
        `${name}: ${sets.length} admissible sets of ${degree}, worst difference ${worst.toExponential(1)}\n`,
      );
      expect(sets.length).toBeGreaterThanOrEqual(degree === 0 ? 1 : 2);
      expect(worst).toBeLessThanOrEqual(1e-9);
    }
  });

  test('its own redundants are admissible in every variant', () => {
    for (const variant of variants(template)) {
      const { redundants = [] } = instanceAt(template, variant).beam;
      expect(checkRedundants(beamAt(template, variant), redundants)).toEqual([]);
    }
  });

  test('the release of every vertical reaction is refused with the reason', () => {
    const beam = beamAt(template);
    const everything: Redundant[] = beam.supports.map((_, support) => ({ support, component: 'vertical' }));
    const [fault] = checkRedundants(beam, everything);
    expect(fault?.message).toMatch(
      /it has no redundants|Choose (one|\d) redundants?|the beam is a mechanism|without it the beam moves/,
    );
  });

  test('a coefficient that is wrong by 1 % fails its proof cases', () => {
    for (const [index, { id, expression }] of template.results.entries()) {
      const results = template.results.map((result, at) =>
        at === index
          ? { ...result, expression: { ...expression, tree: ['*', 1.01, expression.tree] as const } }
          : result,
      );
      const outcome = runProofCases({ ...template, results });
      expect(
        outcome.some(({ ok }) => !ok),
        id,
      ).toBe(true);
    }
  });
});

/** Jobmap benchmark of the canopy: recomputed there with an independent stiffness model, printed to these digits. */
test('uniform load and tip load together are the canopy benchmark', () => {
  const shape = { L: '6 m', a: '1.8 m' };
  const uniform = instanceAt(
    shippedTemplate('propped-cantilever-overhang-uniform'),
    { ...shape, w: '5.517 kN/m' },
    { ei: 9963e3 },
  );
  const point = instanceAt(shippedTemplate('propped-cantilever-overhang-tip-point'), { ...shape, P: '6 kN' });
  const reading = readBeam({ ...uniform.beam, loads: [...uniform.beam.loads, ...point.beam.loads] });
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  const { reactions, diagrams, extremes, forceMethod } = solveBeam(reading.value, uniform.beam.redundants);
  const [root, prop] = reactions;
  const at = (x: number) => stationsAt({ diagrams }, [x])[0];
  expect((forceMethod.flexibility[0]?.[0] ?? 0) * 1e6).toBeCloseTo(7.2267, 4); // mm/kN
  expect(Math.abs(forceMethod.gaps[0] ?? 0) * 1e3).toBeCloseTo(240.49, 2); // mm
  expect((prop?.vertical ?? 0) / 1e3).toBeCloseTo(33.28, 2);
  expect((root?.vertical ?? 0) / 1e3).toBeCloseTo(15.75, 2);
  expect((at(0)?.moment[1] ?? 0) / 1e3).toBeCloseTo(-14.96, 2);
  expect((at(6)?.moment[0] ?? 0) / 1e3).toBeCloseTo(-19.74, 2);
  expect(extremes.moment.max.value / 1e3).toBeCloseTo(7.54, 2);
  expect(extremes.moment.max.at[0]).toBeCloseTo(2.86, 2);
  expect((at(7.8)?.deflection ?? 0) * -1e3).toBeCloseTo(2.76, 2);
});

describe('the prop carries 3wL/8 + wa + 3wa²/4L', () => {
  const template = shippedTemplate('propped-cantilever-overhang-uniform');
  test.each([
    [6, 0],
    [6, 0.6],
    [6, 1.8],
    [6, 2.106],
    [6, 5.4],
    [3, 1],
    [7.2, 2.5],
    [10, 9],
    [12.5, 3.3],
    [0.9, 0.81],
  ])('L = %d m, a = %d m', (L, a) => {
    const w = 12_500;
    const beam = beamAt(template, { L, a, w });
    const prop = solveBeam(beam, [{ support: 1, component: 'vertical' }]).reactions[1]?.vertical;
    const closed = (3 * w * L) / 8 + w * a + (3 * w * a * a) / (4 * L); // own derivation, filed with the template
    expect(Math.abs((prop ?? 0) - closed)).toBeLessThanOrEqual(1e-12 * closed);
  });
});

test('a template that was read is read again from its JSON to the same document', () => {
  const template = authored(writtenTemplates.get('propped-cantilever-overhang-uniform'));
  expect(JSON.parse(JSON.stringify(template))).toEqual(template);
});
