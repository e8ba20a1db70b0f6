import { describe, expect, test } from 'vitest';
import { authored, instanceAt } from '../../../tests/support/templates';
import { WARM_TEMPLATE } from '../../../tests/support/warm-template';
import { authorTemplate } from './author';
import { instantiate } from './instance';
import { runProofCases } from './proof';
import { judgeRules } from './rules';
import { readParameters } from './values';

type Place = readonly (string | number)[];

/** The written template with values put at places; a value of undefined takes the place away. */
function written(...changes: readonly (readonly [Place, unknown])[]): unknown {
  const copy: unknown = structuredClone(WARM_TEMPLATE);
  for (const [path, value] of changes) {
    const parent = path.slice(0, -1).reduce<unknown>((at, key) => Reflect.get(Object(at), key), copy);
    const key = path.at(-1) ?? '';
    if (value === undefined) Reflect.deleteProperty(Object(parent), key);
    else Reflect.set(Object(parent), key, value);
  }
  return copy;
}

const faultsOf = (input: unknown): string[] => {
  const reading = authorTemplate(input);
  return reading.ok ? [] : reading.faults.map(({ path, code }) => `${path.join('/')} ${code}`);
};

const warm = authored(WARM_TEMPLATE);

describe('a template with a step, a hinge, curvature, a couple and repeated loads', () => {
  test('is sound, and agrees with closed forms and printed figures', () => {
    expect(faultsOf(written())).toEqual([]);
    for (const { name, ok, checks } of runProofCases(warm)) {
      expect(checks.length, name).toBeGreaterThan(0);
      expect(ok, name).toBe(true);
    }
  });

  test('becomes a beam with its parts in numbers', () => {
    const loads = [{ x: 2, P: 3000 }];
    const { beam, loadNames } = instanceAt(
      warm,
      { n: 2, C: 500, loads, joint: 'hinged' },
      { ei: 1e6, ga: 5e5 },
    );
    expect(beam).toEqual({
      length: 6,
      segments: [
        { from: 0, to: 3, ei: 1e6, ga: 5e5 },
        { from: 3, to: 6, ei: 2e6, ga: 5e5 },
      ],
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 6, kind: 'roller' },
      ],
      hinges: [2],
      redundants: [],
      loads: [
        { kind: 'curvature', from: 0, to: 6, kappa: 0.0004, group: 'T' },
        { kind: 'couple', at: 6, m: 500, group: 'G' },
        { kind: 'point', at: 2, p: 3000, group: 'Q' },
      ],
    });
    expect(loadNames.map(({ tex }) => tex)).toEqual(['\\kappa', 'C', 'P_{1}']);
    expect(instanceAt(warm).beam).toMatchObject({
      hinges: [],
      redundants: [{ at: 1.5, component: 'moment' }],
    });
  });

  test('has rules that fill in figures of every kind, and know the section and the result', () => {
    const judged = (known: Parameters<typeof judgeRules>[2], parameters = {}) =>
      Object.fromEntries(
        judgeRules(warm, instanceAt(warm, parameters).scope, known).map(({ id, state, message }) => [
          id,
          [state, message.replaceAll(/\s/g, ' ')],
        ]),
      );
    const solution = {
      reactions: [{ vertical: 1000 }, { vertical: -1000 }],
      extremes: { deflection: { max: { value: 0.02 }, min: { value: -0.001 } } },
    };
    expect(judged({}, { n: 6 })['even']).toEqual([
      'broken',
      'The outer half is 6 times as stiff; a third of 6 m is 2.000 m, EI is 10 000 kNm², the joint rigid.',
    ]);
    expect(judged({})['held-down']?.[0]).toBe('unknown');
    expect(judged({ solution })['held-down']).toEqual(['broken', 'The prop pulls −1.0 kN.']);
    expect(judged({ solution })['still']?.[0]).toBe('unknown');
    expect(judged({ solution, depth: 0.3 })['still']?.[0]).toBe('broken');
    expect(judged({ solution, depth: 0.3 })['still']?.[1]).toMatch(
      /^It moves 20(\.0)? mm, h is 300(\.0)? mm\.$/,
    );
    const small = { ...solution, extremes: { deflection: { max: { value: 0 }, min: { value: -0.001 } } } };
    expect(judged({ solution: small, depth: 0.3 })['still']?.[0]).toBe('holds');
    expect(judged({ solution: small, depth: 0.3, ga: 1e6 })['still']?.[0]).toBe('broken');
  });

  test.each<[Place, unknown, string]>([
    [['beam', 'segments', 1, 'ei'], 'L', 'beam/segments/1/ei wrong_dimension'],
    [['beam', 'segments', 0, 'to'], 'n', 'beam/segments/0/to wrong_dimension'],
    [['beam', 'segments', 0, 'to'], 'd', 'beam/segments/1/from gap'],
    [['beam', 'hinges', 0, 'at'], 'k', 'beam/hinges/0/at wrong_dimension'],
    [['beam', 'hinges', 0, 'when'], 'd', 'beam/hinges/0/when wrong_dimension'],
    [['beam', 'hinges', 0, 'when'], 'joint == "loose"', 'beam/hinges/0/when unsound'],
    [['beam', 'loads', 0, 'kappa'], 'C', 'beam/loads/0/kappa wrong_dimension'],
    [['beam', 'loads', 0, 'kappa'], 'k + 1/L', 'beam/loads not_proportional'],
    [['beam', 'loads', 2, 'repeat'], 'joint', 'beam/loads/2/repeat unknown_symbol'],
    [['beam', 'loads', 2, 'p'], 'P + C/L', 'beam/loads/2 mixed'],
    [['beam', 'loads', 1, 'm'], 'C + n', 'beam/loads/1/m unsound'],
    [['beam', 'loads', 1, 'm'], 'sum(loads, P*x)', 'beam/loads/1 no_group'],
    [['beam', 'loads', 1, 'm'], 'C + sum(loads, P*x)', 'beam/loads/1 mixed'],
    [['beam', 'loads', 2, 'p'], 'C/L', 'beam/loads/2 no_group'],
    [['beam', 'redundants', 0, 'at'], 'n', 'beam/redundants/0/at wrong_dimension'],
    [['beam', 'redundants', 0, 'at'], 'L', 'beam/redundants/0 ineligible_redundant'],
    [
      ['beam', 'redundants', 0],
      { at: 'L/4', component: 'rotation' },
      'beam/redundants/0/component invalid_value',
    ],
    [['parameters', 4, 'columns', 1, 'default'], '200 kN', 'parameters/4/columns/1/default out_of_range'],
    [['parameters', 4, 'default'], [{ x: '3 m' }], 'parameters/loads/0/P missing'],
    [['parameters', 5, 'default'], 'loose', 'parameters/5/default not_allowed'],
    [['parameters', 5, 'options', 1, 'value'], 'rigid', 'parameters/5/options duplicate'],
    [['parameters', 0, 'step'], '0 m', 'parameters/0/step not_positive'],
    [['rules', 0, 'repeat'], 'joint', 'rules/0/repeat unknown'],
    [['rules', 0, 'trial'], { parameters: { loads: 'many' } }, 'rules/0/trial/parameters/loads wrong_type'],
    [['rules', 0, 'trial'], { parameters: {}, depth: '3' }, 'rules/0/trial/depth unit_missing'],
    [['rules', 1, 'severity'], 'fatal', 'rules/1/severity invalid_value'],
    [['derived', 0, 'expression'], 'L + n', 'derived/0/expression unsound'],
    [['sources', 1, 'id'], 'own', 'sources/1/id duplicate'],
    [['proof_cases', 0, 'source'], 'nowhere', 'proof_cases/0/source unknown'],
    [['proof_cases', 0, 'ei'], '5', 'proof_cases/0/ei unit_missing'],
    [['proof_cases', 0, 'expect', 3, 'printed'], '1.000', 'proof_cases/0/expect/3/printed unit_missing'],
    [['proof_cases', 0, 'expect', 1, 'exact'], '3*EI*', 'proof_cases/0/expect/1/exact syntax'],
    [['proof_cases', 0, 'expect', 0], {}, 'proof_cases/0/expect/0/result invalid_type'],
  ])('%j as %j is refused: %s', (path, value, fault) => {
    expect(faultsOf(written([path, value]))).toContain(fault);
  });

  test.each<[Place, unknown, string]>([
    [['parameters'], { L: 'long' }, 'does not read as a length'],
    [['parameters'], { loads: [{ x: '7 m', P: '1 kN' }] }, 'off the span'],
    [['ei'], 'stiff', 'does not read as a bending stiffness'],
  ])('a proof case with %j as %j is not ok, and says why', (path, value, words) => {
    const { proof_cases: cases } = warm;
    const spoilt = { ...cases[0]!, [path[0] ?? '']: value };
    const [result] = runProofCases({ ...warm, proof_cases: [spoilt, ...cases.slice(1)] });
    expect(result).toMatchObject({ ok: false, checks: [] });
    expect(result?.fault).toContain(words);
  });

  test('a proof case whose beam is a mechanism is not ok, and says why', () => {
    const supports = warm.beam.supports.slice(1);
    const [result] = runProofCases({ ...warm, beam: { ...warm.beam, supports } });
    expect(result?.fault).toMatch(/^The beam is unstable\. It turns about the roller at 6\.000 m\./);
  });

  test('a closed form that does not apply proves nothing', () => {
    const [, , hinged] = warm.proof_cases;
    const [result] = runProofCases({ ...warm, proof_cases: [{ ...hinged!, expect: [{ result: 'prop' }] }] });
    expect(result?.ok).toBe(false);
    expect(() =>
      runProofCases({ ...warm, proof_cases: [{ ...hinged!, expect: [{ result: 'nothing' }] }] }),
    ).toThrow(RangeError);
  });

  test('an expression that is not finite at some values is refused there', () => {
    const divided = authored(written([['beam', 'segments', 1, 'ei'], '5*n/(6 - n)']));
    const values = readParameters(divided, { n: '6' });
    const made = values.ok ? instantiate({ ...divided, rules: [] }, values.values) : undefined;
    expect(made?.ok === false && made.faults).toEqual([
      {
        path: [],
        code: 'not_finite',
        message: 'With these values a place or a load is not finite. Change them.',
      },
    ]);
  });
});
