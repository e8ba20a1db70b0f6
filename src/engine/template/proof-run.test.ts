import { describe, expect, test } from 'vitest';
import { authored, instanceAt, shippedTemplate, writtenTemplates } from '../../../tests/support/templates';
import { WARM_TEMPLATE } from '../../../tests/support/warm-template';
import { solveBeam } from '../beam/index';
import { readBeam } from '../model/index';
import { readQuantity } from '../quantity/index';
import type { Template } from './document';
import { runProofCases } from './proof';
import { BATCH, boxOf } from './proof-box';
import { mirrorDifference, mirroredBeam, scaledBeam, scalingDifference } from './proof-laws';
import {
  beginProof,
  type ProofProgress,
  type ProofReport,
  type ProofSubject,
  proofReport,
  proveFurther,
} from './proof-run';
import { type SolvedPoint, solvePoint } from './proof-solve';

function prove(template: Template, issued: Template | null = null): ProofReport {
  const subject = { template, issued };
  const { total } = beginProof(subject);
  return proofReport(subject, proveFurther(subject, beginProof(subject), total));
}

type Written = Record<string, unknown> & {
  parameters: Record<string, unknown>[];
  beam: { loads: Record<string, unknown>[]; supports: Record<string, unknown>[]; redundants: unknown[] };
  rules: Record<string, unknown>[];
  results: Record<string, unknown>[];
  proof_cases: Record<string, unknown>[];
};

/** A shipped template as it is written, with something changed in it. */
function changed(slug: string, change: (written: Written) => void): Template {
  const written: unknown = structuredClone(writtenTemplates.get(slug));
  change(written as Written);
  return authored(written);
}

const OVERHANG = 'propped-cantilever-overhang-uniform';
const overhang = shippedTemplate(OVERHANG);

describe('points of the parameter box', () => {
  const numbers = (seed: number, symbol: string): number[] =>
    Array.from({ length: BATCH }, (_, k) => {
      const text = boxOf(overhang, seed)(k).parameters[symbol];
      const reading = readQuantity(String(text), 'length');
      return reading.ok ? reading.value : Number.NaN;
    });

  test('are a Latin hypercube: every equal part of a range holds one of them', () => {
    // Rounded to four figures: within a half of the fourth of the part that it was drawn from.
    const [min, max] = [0.3, 30];
    for (const [k, value] of numbers(1, 'L')
      .sort((a, b) => a - b)
      .entries()) {
      const part = (max - min) / BATCH;
      expect(value).toBeGreaterThanOrEqual(min + k * part - 0.005);
      expect(value).toBeLessThanOrEqual(min + (k + 1) * part + 0.005);
    }
  });

  test('are the same from the same seed, others from another', () => {
    expect(numbers(1, 'L')).toEqual(numbers(1, 'L'));
    expect(numbers(2, 'L')).not.toEqual(numbers(1, 'L'));
  });

  test('take every value of a choice equally often', () => {
    const box = boxOf(shippedTemplate('overhang-loads-in-span'), 1);
    const taken = Array.from({ length: BATCH }, (_, k) => box(k).parameters['loading']);
    const counts = [...new Set(taken)].map((value) => taken.filter((one) => one === value).length);
    expect(counts).toEqual(counts.map(() => BATCH / counts.length));
  });
});

describe.each([
  OVERHANG,
  'overhang-loads-in-span',
  'propped-cantilever-spring-uniform',
  'simple-span-points-uniform',
  'support-settlement',
  'sloping-rafter-uniform',
  'three-equal-spans-patterns',
])('%s', (slug) => {
  test('is proven over its parameter box', () => {
    const template = shippedTemplate(slug);
    const report = prove(template);
    expect(report.reasons).toEqual([]);
    expect(report.passed).toBe(true);
    const { sweep, limits } = report;
    expect(sweep.points).toBeGreaterThanOrEqual(200);
    const kept = Object.values(sweep.refused).reduce((sum, count) => sum + count, 0);
    expect(sweep.points + kept).toBe(sweep.drawn);
    for (const { points, largest } of Object.values(sweep.laws)) {
      expect(points).toBeGreaterThanOrEqual(25);
      expect(largest).toBeLessThanOrEqual(1e-9);
    }
    const tried = new Set(limits.map(({ symbol }) => symbol));
    expect([...tried]).toEqual(template.parameters.map(({ symbol }) => symbol));
  }, 30_000);
});

test('hinges, steps, curvature, couples and repeated loads obey the laws too', () => {
  const report = prove(authored(WARM_TEMPLATE));
  const { points, failed, laws } = report.sweep;
  expect(points).toBeGreaterThanOrEqual(200);
  expect([failed, ...Object.values(laws).map((law) => law.failed)]).toEqual([0, 0, 0, 0, 0]);
  // Its one closed form is of the free curvature alone.
  expect(report.reasons.filter((reason) => !reason.includes('closed form'))).toEqual([]);
}, 30_000);

describe('a proof that is done bit by bit', () => {
  test('comes to the same as one at a stretch, whatever is kept as JSON between', () => {
    const subject: ProofSubject = { template: overhang, issued: overhang };
    let progress: ProofProgress = beginProof(subject);
    const units = [1, 3, 17, 50, 2, 400];
    for (let k = 0; progress.done < progress.total; k++)
      progress = JSON.parse(JSON.stringify(proveFurther(subject, progress, units[k % units.length] ?? 1)));
    expect(proofReport(subject, progress)).toEqual(JSON.parse(JSON.stringify(prove(overhang, overhang))));
  }, 30_000);

  test('leaves the progress that it was given as it was', () => {
    const subject = { template: overhang, issued: null };
    const before = beginProof(subject);
    proveFurther(subject, before, 40);
    expect(before).toEqual(beginProof(subject));
  });
});

describe('what is wrong is found', () => {
  test('a closed form that is 1 % off, at every point where it is compared', () => {
    const wrong = changed(OVERHANG, ({ results }) => {
      const tip = results.find(({ id }) => id === 'prop');
      if (tip) tip['expression'] = `1.01*(${String(tip['expression'])})`;
    });
    const { passed, reasons, sweep } = prove(wrong);
    expect(passed).toBe(false);
    expect(sweep.forms['prop']).toMatchObject({ points: sweep.points, failed: sweep.points });
    expect(reasons.filter((reason) => reason.includes('closed form')).length).toBeGreaterThan(0);
  });

  test('block rules that let in too little of the box', () => {
    const narrow = changed('simple-span-point', ({ rules, parameters }) => {
      rules.push({
        id: 'narrow',
        title: 'The span is 6 m to the millimetre',
        expression: 'L > 0.9999*S and L < 1.0001*S',
        severity: 'block',
        message: 'Give the span {S}.',
        trial: { parameters: { L: '7 m' } },
      });
      parameters.push({
        kind: 'quantity',
        symbol: 'S',
        tex: 'S',
        name: 'The only span',
        help: 'For this test.',
        dimension: 'length',
        default: '6 m',
        min: '5.999 m',
        max: '6.001 m',
        step: '0.001 m',
      });
      const span = parameters.find(({ symbol }) => symbol === 'L');
      if (span) span['default'] = '6 m';
    });
    const { sweep, reasons } = prove(narrow);
    expect(sweep.points).toBeLessThan(200);
    expect(reasons.join(' ')).toMatch(/Block rules let in \d+ of 9600 points/);
  }, 60_000);

  test('a span that may come to nothing: its beam has two supports at one point', () => {
    const vanishing = changed('two-unequal-spans-uniform', ({ parameters }) => {
      const span = parameters.find(({ symbol }) => symbol === 'L1');
      if (span) span['min'] = '0 m';
    });
    const { limits } = prove(vanishing);
    expect(limits.find(({ symbol, held }) => symbol === 'L1' && held === '0 m')).toMatchObject({
      state: 'failed',
    });
  });

  test('a result that jumps where a length comes to zero', () => {
    // Held against turning at the left end as soon as the overhang has any length.
    const jumping = changed('overhang-uniform', ({ beam, results, proof_cases, rules }) => {
      const [first] = beam.supports;
      if (first) first['kr'] = 'EI/L*(a > 0 ? 100 : 1)';
      beam.redundants = [{ support: 'A', component: 'rotation' }];
      results.length = 0;
      rules.length = 0;
      for (const proof of proof_cases)
        Object.assign(proof, { expect: [{ quantity: { moment: 'L + a' }, exact: '0' }] });
    });
    expect(prove(jumping).limits.find(({ symbol, held }) => symbol === 'a' && held === '0 m')).toMatchObject({
      state: 'failed',
      message: 'The result jumps as the length comes to zero.',
    });
  }, 30_000);
});

describe('same results as the issued revision', () => {
  test('are proven of an expression that is written in another way', () => {
    const other = changed(OVERHANG, ({ beam }) => {
      const [load] = beam.loads;
      if (load) load['w0'] = '2*w/2';
    });
    expect(prove(other, overhang)).toMatchObject({ sameResults: true, same: { differing: 0, lost: 0 } });
  });

  test('are not, where one coefficient is 1 % larger, and the point where it shows most is kept', () => {
    const other = changed('simple-span-uniform', ({ beam }) => {
      const [load] = beam.loads;
      if (load) Object.assign(load, { w0: '1.01*w', w1: '1.01*w' });
    });
    const { same, sameResults } = prove(other, shippedTemplate('simple-span-uniform'));
    expect(sameResults).toBe(false);
    expect(same?.differing).toBe(same?.points);
    expect(same?.largest?.share).toBeCloseTo(0.01, 12);
  });

  test('are not, where a rule keeps out what was let in', () => {
    const narrower = changed(OVERHANG, ({ rules }) => {
      for (const rule of rules) if (rule['expression'] === 'a <= 0.9*L') rule['expression'] = 'a <= 0.5*L';
    });
    const { same, sameResults } = prove(narrower, overhang);
    expect(sameResults).toBe(false);
    expect(same?.lost).toBeGreaterThan(0);
  });
});

test('the worst point is a proof case that its author can keep, with closed forms and without', () => {
  const bare = changed(OVERHANG, (written) => {
    written.results = [];
    for (const proof of written.proof_cases)
      Object.assign(proof, { expect: [{ quantity: { moment: 'L + a' }, exact: '0' }] });
  });
  for (const template of [overhang, bare]) {
    const { worstCase } = prove(template);
    const kept = changed(OVERHANG, (written) => {
      if (template === bare) written.results = [];
      if (worstCase) written.proof_cases = [{ ...worstCase }, { ...worstCase }, { ...worstCase }];
    });
    const [outcome] = runProofCases(kept);
    expect(outcome?.ok).toBe(true);
    expect(outcome?.checks.length).toBeGreaterThan(1);
  }
}, 30_000);

describe('the laws', () => {
  const point = (): SolvedPoint => {
    const reading = solvePoint(overhang, {
      parameters: { L: '6 m', a: '1.8 m', w: '9 kN/m' },
      ei: '9963 kNm2',
    });
    if (reading.state !== 'solved') throw new Error(reading.state);
    return reading.solved;
  };
  const solved = (document: Parameters<typeof readBeam>[0]) => {
    const beam = readBeam(document);
    if (!beam.ok) throw new Error(JSON.stringify(beam.faults));
    return solveBeam(beam.value);
  };

  test('a propped cantilever seen from behind carries 3wL/8 at its left, 5wL/8 at its right', () => {
    const { beam } = instanceAt(shippedTemplate('propped-cantilever-uniform'), { L: '8 m', w: '10 kN/m' });
    const { reactions } = solved(mirroredBeam(beam));
    expect(reactions[0]?.vertical).toBeCloseTo(30_000, 6);
    expect(reactions[1]?.vertical).toBeCloseTo(50_000, 6);
    // wL²/8, clockwise on a beam that is held at its right: the textbook's fixing moment, turned round.
    expect(reactions[1]?.moment).toBeCloseTo(-80_000, 6);
  });

  test('a simple span three times as long under the same line load bends nine times as much, and sags 81 times', () => {
    const { beam } = instanceAt(shippedTemplate('simple-span-uniform'), { L: '4 m', w: '10 kN/m' });
    // The load per length is the force over the length: times 3 in force keeps it.
    const long = solved(scaledBeam(beam, { length: 3, force: 3, stiffness: 1 }));
    const own = solved(beam);
    expect(long.extremes.moment.max.value / own.extremes.moment.max.value).toBeCloseTo(9, 12);
    expect(long.extremes.deflection.min.value / own.extremes.deflection.min.value).toBeCloseTo(81, 10);
  });

  test('are broken by results of another beam', () => {
    const right = point();
    const other = solvePoint(overhang, {
      parameters: { L: '6 m', a: '1.8 m', w: '9.01 kN/m' },
      ei: '9963 kNm2',
    });
    if (other.state !== 'solved') throw new Error(other.state);
    const wrong = { ...right, solution: other.solved.solution };
    expect(mirrorDifference(right)).toBeLessThan(1e-12);
    expect(mirrorDifference(wrong)).toBeGreaterThan(1e-4);
    expect(scalingDifference(right, { length: 3, force: 7, stiffness: 11 })).toBeLessThan(1e-12);
    expect(scalingDifference(wrong, { length: 3, force: 7, stiffness: 11 })).toBeGreaterThan(1e-4);
  });
});
