import { describe, expect, test } from 'vitest';
import { type Redundant, readBeam } from '@/engine/model';
import { runProofCases } from '@/engine/template';
import { solveDocument } from '@/features/beam/beam';
import { solveRequest } from '@/features/beam/request';
import { shippedTemplate, writtenTemplates } from '../../../tests/support/templates';
import { derivationOf, toEvaluateAnswer } from './answer';
import { type EvaluationInputs, evaluateTemplate, type TemplateEvaluation } from './evaluate';
import { sourceText, toProofLines, toResultLines, toRuleLines } from './lines';
import { evaluateAnswer, evaluateRequest } from './request';
import { searchTexts, toParameterFields, toSchematic, toTemplateRow } from './template';

const canopy = shippedTemplate('propped-cantilever-overhang-uniform');
const SECTION = { designation: 'OV 260x130x32', ei: 9_962_400, selfWeight: 316.7, depth: 0.258 };

function evaluated(inputs: EvaluationInputs, template = canopy): TemplateEvaluation {
  const outcome = evaluateTemplate(template, inputs);
  if (outcome.ok) return outcome.evaluation;
  throw new Error(JSON.stringify(outcome.errors));
}

const errorsOf = (inputs: EvaluationInputs, template = canopy) => {
  const outcome = evaluateTemplate(template, inputs);
  return outcome.ok ? [] : outcome.errors.map(({ pointer, code }) => [pointer, code]);
};

describe('a template at given values', () => {
  test('gives the closed form at the prop, proven', () => {
    const { solution, proof } = evaluated({ parameters: { L: '7.2 m', a: '1.8 m', w: '12.5 kN/m' } });
    const [L, a, w] = [7.2, 1.8, 12_500];
    expect(solution.reactions[1]?.vertical).toBeCloseTo(
      (3 * w * L) / 8 + w * a + (3 * w * a * a) / (4 * L),
      6,
    ); // the template's own derivation
    expect(proof.agreement).toBeLessThan(1e-9);
  });

  test('has the beam that POST beams/solve takes, with the same result', () => {
    const { instance, solution } = evaluated({ parameters: {} });
    const request = solveRequest.parse(JSON.parse(JSON.stringify(instance.beam)));
    const answer = solveDocument(request);
    expect(answer.ok && answer.answer.reactions).toEqual(solution.reactions);
  });

  test('uses the default stiffness without a section, and says so in the beam', () => {
    expect(evaluated({ parameters: {} }).instance.beam.ei).toBe(9_963_000);
    expect(evaluated({ parameters: {}, ei: '20000 kNm2' }).instance.beam.ei).toBe(2e7);
    expect(evaluated({ parameters: {}, section: SECTION }).instance.beam.ei).toBe(9_962_400);
  });

  test('leaves the section’s own weight out unless it is asked for', () => {
    const { beam } = evaluated({ parameters: {}, section: SECTION });
    expect(beam.loads).toHaveLength(1);
    expect(evaluated({ parameters: {}, section: SECTION, self_weight: true }).beam.loads).toHaveLength(2);
  });

  test('is the same whatever is released', () => {
    const choices: Redundant[][] = [
      [{ support: 0, component: 'rotation' }],
      [{ support: 0, component: 'vertical' }],
    ];
    const own = evaluated({ parameters: {} }).solution.extremes.moment.min.value;
    for (const redundants of choices) {
      const { solution } = evaluated({ parameters: {}, redundants });
      expect(solution.forceMethod.redundants).toEqual(redundants);
      expect(Math.abs(solution.extremes.moment.min.value - own)).toBeLessThanOrEqual(1e-9 * Math.abs(own));
    }
  });

  test.each<[EvaluationInputs, [string, string][]]>([
    [{ parameters: { L: 0 } }, [['/parameters/L', 'out_of_range']]],
    [{ parameters: { L: '7,2,3 m' } }, [['/parameters/L', 'not_a_number']]],
    [{ parameters: { w: '12.5' } }, [['/parameters/w', 'unit_missing']]],
    [{ parameters: { L: '4 m', a: '4 m' } }, [['/parameters/a', 'rule_broken']]],
    [
      { parameters: { L: '1,234 m' }, ei: -1 },
      [
        ['/parameters/L', 'ambiguous_number'],
        ['/ei', 'not_positive'],
      ],
    ],
    [{ parameters: {}, ei: '20 kN' }, [['/ei', 'unit_wrong_dimension']]],
    [{ parameters: {}, ei: 1e7, section: SECTION }, [['/ei', 'conflict']]],
    [{ parameters: {}, self_weight: true }, [['/self_weight', 'conflict']]],
    [{ parameters: {}, redundants: [] }, [['/redundants', 'wrong_count']]],
    [
      { parameters: {}, redundants: [{ support: 1, component: 'rotation' }] },
      [['/redundants/0', 'ineligible_redundant']],
    ],
  ])('%j is refused at its place', (inputs, errors) => {
    expect(errorsOf(inputs)).toEqual(errors);
  });

  test('a fixed-ended beam is not released of both its vertical reactions', () => {
    const redundants: Redundant[] = [
      { support: 0, component: 'vertical' },
      { support: 1, component: 'vertical' },
    ];
    expect(
      errorsOf({ parameters: {}, redundants }, shippedTemplate('fixed-ends-uniform-centre-point')),
    ).toEqual([['/redundants', 'inadmissible_redundants']]);
  });

  test('reads fields in the units that they show', () => {
    const outcome = evaluateTemplate(canopy, { parameters: { L: '20', a: '5', w: '0.3' } }, { fields: 'us' });
    expect(outcome.ok && outcome.evaluation.beam.length).toBeCloseTo(25 * 0.3048, 12);
  });

  test('is evaluated fast enough to follow a dragged value', () => {
    const times = Array.from({ length: 30 }, (_, k) => {
      const start = performance.now();
      evaluated({ parameters: { a: 1 + k * 0.05 }, section: SECTION });
      return performance.now() - start;
    });
    expect(Math.min(...times)).toBeLessThan(8); // half a frame, at the best of 30: other processes share the machine
  });
});

describe('the answer of the endpoint', () => {
  test('has the contract’s shape for every template and every choice of redundant', () => {
    for (const slug of writtenTemplates.keys()) {
      const template = shippedTemplate(slug);
      const own = evaluated({ parameters: {}, section: SECTION }, template);
      for (const redundant of own.beam.degree === 1 ? own.solution.forceMethod.eligible : [undefined]) {
        const evaluation = evaluated(
          { parameters: {}, section: SECTION, redundants: redundant && [redundant] },
          template,
        );
        const answer = toEvaluateAnswer(evaluation, 1);
        expect(evaluateAnswer.parse(JSON.parse(JSON.stringify(answer))), slug).toEqual(
          JSON.parse(JSON.stringify(answer)),
        );
        expect(answer.derivation.length).toBeGreaterThan(2);
      }
    }
  }, 20_000);

  test('derives the prop’s reaction with the template’s letters, in SI', () => {
    const evaluation = evaluated({ parameters: { L: '6 m', a: '1.8 m', w: '5.517 kN/m' } });
    const key = derivationOf(evaluation).find((step) => step.key);
    expect(key?.value).toBeCloseTo(evaluation.solution.reactions[1]?.vertical ?? 0, 6);
    const { derivation, rules, template } = toEvaluateAnswer(evaluation, 3);
    expect(derivation.find(({ value }) => value === key?.value)?.unit).toBe('N');
    expect(derivation.map(({ symbols }) => symbols).join(' ')).toMatch(/w.*L.*a/);
    expect(template).toBe('propped-cantilever-overhang-uniform');
    expect(rules.map(({ rule }) => rule)).toEqual(['overhang-length', 'tip-rises', 'small-movement']); // no depth is known
  });

  test('is asked for by the contract’s body, and by no other', () => {
    const body = {
      revision: 1,
      parameters: { L: '7.2 m' },
      ei: '2e7 Nm2',
      redundants: [{ support: 1, component: 'vertical' }],
      self_weight: false,
    };
    expect(evaluateRequest.parse(body)).toEqual(body);
    expect(evaluateRequest.safeParse({ ...body, combinations: [] }).success).toBe(false);
    expect(evaluateRequest.safeParse({}).success).toBe(false);
    expect(evaluateRequest.safeParse({ parameters: {}, section: { designation: 'W12x26' } }).success).toBe(
      false,
    );
  });
});

describe('what a page shows of a template', () => {
  const row = toTemplateRow(
    canopy,
    { number: 2, state: 'issued', date: new Date(Date.UTC(2026, 2, 31)), author: 'A', reviewer: null },
    { members: 3, jobs: 1 },
  );

  test('is a catalogue row that a search can look through', () => {
    expect(row).toMatchObject({
      reference: 'Prop 5',
      revision: 2,
      date: '2026-03-31T00:00:00.000Z',
      uses: { members: 3, jobs: 1 },
    });
    expect(searchTexts(row, canopy)).toEqual(
      expect.arrayContaining(['Propped cantilever', 'Uniform', 'a Overhang', 'canopy']),
    );
  });

  test('is drawn at its defaults', () => {
    for (const slug of writtenTemplates.keys()) {
      const { beam, moment, loadNames } = toSchematic(shippedTemplate(slug));
      expect(moment.breaks.at(-1)).toBe(beam.length);
      expect(loadNames).toHaveLength(beam.loads.length);
    }
  });

  test('has its fields in either unit system', () => {
    const [metric] = toParameterFields(canopy, 'metric');
    const [us] = toParameterFields(canopy, 'us');
    expect(metric).toMatchObject({ symbol: 'L', unit: 'm', min: 0.3, texts: { default: '6\u00a0m' } });
    expect(us).toMatchObject({ symbol: 'L', unit: 'ft-in', default: 6 });
    expect(toParameterFields(shippedTemplate('simple-span-points-uniform'), 'metric')[2]).toMatchObject({
      kind: 'rows',
      columns: [{ unit: 'm' }, { unit: 'kN' }, { kind: 'group' }],
    });
  });

  test('lists the rules with their figures', () => {
    const { rules } = evaluated({ parameters: { L: '6 m', a: '1.8 m' }, section: SECTION });
    const lines = toRuleLines(canopy, rules, 'metric');
    expect(lines.find(({ id }) => id === 'overhang-length')).toMatchObject({
      state: 'holds',
      message: null,
      figure: { tex: 'a/L', text: '0.300' },
    });
    expect(lines.find(({ id }) => id === 'tip-rises')).toMatchObject({ state: 'broken', severity: 'note' });
  });

  test('lists the closed forms that hold, as figures', () => {
    const part = shippedTemplate('propped-cantilever-overhang-part-uniform');
    const { instance } = evaluated(
      { parameters: { L: '6 m', a: '1.8 m', w: '3.6 kN/m', part: 'overhang' } },
      part,
    );
    const lines = toResultLines(part, instance, 'metric');
    expect(lines).toHaveLength(5);
    expect(lines.find(({ id }) => id === 'tip-overhang')?.text).toBe('2.1\u00a0mm'); // jobmap §9, LF4: snow on the overhang
  });

  test('lists the proof cases with their sources', () => {
    const lines = toProofLines(canopy, runProofCases(canopy), 'metric');
    expect(lines.every(({ ok }) => ok)).toBe(true);
    expect(lines[0]?.checks[0]).toMatchObject({ name: 'Reaction at the prop B', ok: true });
    expect(
      sourceText(
        shippedTemplate('simple-span-uniform').sources[0] ?? { id: '', publication: '', from_memory: false },
      ),
    ).toBe('AISC Steel Construction Manual, 15th edition, 2017, Table 3-23, Case 1 (from memory)');
  });

  test('a beam of every template is read without ignoring horizontal restraint', () => {
    for (const slug of writtenTemplates.keys())
      expect(readBeam(evaluated({ parameters: {} }, shippedTemplate(slug)).instance.beam).ok).toBe(true);
  });
});
