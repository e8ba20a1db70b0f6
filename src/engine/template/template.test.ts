import { describe, expect, test } from 'vitest';
import { authored, instanceAt, shippedTemplate, writtenTemplates } from '../../../tests/support/templates';
import { solveBeam } from '../beam/index';
import { readBeam } from '../model/index';
import { authorTemplate } from './author';
import { checkTemplate } from './check';
import { type Template, templateDocument } from './document';
import { instantiate } from './instance';
import { runProofCases } from './proof';
import { judgeRules } from './rules';
import { readParameters } from './values';

const canopy = shippedTemplate('propped-cantilever-overhang-uniform');
const points = shippedTemplate('simple-span-points-uniform');
const part = shippedTemplate('propped-cantilever-overhang-part-uniform');

function faultsOf(template: Template, raw: Readonly<Record<string, unknown>>) {
  const reading = readParameters(template, raw);
  return reading.ok ? [] : reading.faults.map(({ path, code }) => [path.join('/'), code]);
}

function messageOf(template: Template, raw: Readonly<Record<string, unknown>>): string | undefined {
  const reading = readParameters(template, raw);
  return reading.ok ? undefined : reading.faults[0]?.message;
}

describe('the parameters of a template', () => {
  test('are read from texts with units and SI numbers; what is missing takes its default', () => {
    const reading = readParameters(canopy, { L: '12\'-6 1/2"', w: 12_500 });
    expect(reading.ok && reading.values).toEqual({ L: 3.8227, a: 1.8, w: { G: 12_500 } });
  });

  test('are refused each at its place', () => {
    expect(faultsOf(canopy, { L: '12.5', a: '1.8 kN', w: 'heavy', q: '3 kN/m' })).toEqual([
      ['q', 'unknown_parameter'],
      ['L', 'unit_missing'],
      ['a', 'unit_wrong_dimension'],
      ['w', 'not_a_number'],
    ]);
    expect(faultsOf(canopy, { L: null, a: true, w: [1] })).toEqual([
      ['L', 'wrong_type'],
      ['a', 'wrong_type'],
      ['w', 'wrong_type'],
    ]);
    expect(faultsOf(canopy, { L: Number.NaN, a: Number.POSITIVE_INFINITY })).toEqual([
      ['L', 'not_finite'],
      ['a', 'not_finite'],
    ]);
    expect(faultsOf(canopy, { L: '7,2,3 m' })).toEqual([['L', 'not_a_number']]);
    expect(faultsOf(part, { part: 'both' })).toEqual([['part', 'not_allowed']]);
    expect(faultsOf(canopy, JSON.parse('{"__proto__": 1}'))).toEqual([['__proto__', 'unknown_parameter']]);
  });

  test('out of range are told the range in the units they are shown in', () => {
    expect(messageOf(canopy, { L: 0 })).toBe('Span is 0\u00a0m. Give 0.3\u00a0m to 30\u00a0m.');
    const inFeet = readParameters(canopy, { L: "200'" }, { fields: 'us' });
    expect(inFeet.ok ? '' : inFeet.faults[0]?.message).toBe(
      `Span is 200'-0". Give 0'-11 13/16" to 98'-5 1/8".`,
    );
    expect(messageOf(part, { part: 'roof' })).toBe('Loaded part: give one of “overhang”, “span”.');
  });

  test('at either end of their range are accepted', () => {
    expect(faultsOf(canopy, { L: '30 m', a: '0 m' })).toEqual([]);
    expect(faultsOf(canopy, { L: '0.3 m', a: '0 m', w: '-50 kN/m' })).toEqual([]);
  });

  test('in a field take the unit that the field shows', () => {
    const reading = readParameters(canopy, { L: '7.2', w: '12.5' }, { fields: 'metric' });
    expect(reading.ok && reading.values).toMatchObject({ L: 7.2, w: { G: 12_500 } });
  });

  test('take a load by its groups', () => {
    const reading = readParameters(canopy, { w: { G: '5.52 kN/m', S: 3600 } });
    expect(reading.ok && reading.values['w']).toEqual({ G: 5520, S: 3600 });
    expect(faultsOf(canopy, { w: { G: '5 kN/m', snow: '3 kN/m' } })).toEqual([['w/snow', 'unknown_group']]);
    expect(faultsOf(canopy, { w: { G: '200 kN/m', Q: '200 kN/m' } })).toEqual([['w', 'out_of_range']]);
    expect(faultsOf(canopy, { w: { G: '5' } })).toEqual([['w/G', 'unit_missing']]);
  });

  test('that are rows are read cell by cell', () => {
    const reading = readParameters(points, {
      loads: [
        { x: '1 m', P: 5000 },
        { x: 2, P: '3 kN', group: 'Q' },
      ],
    });
    expect(reading.ok && reading.values['loads']).toEqual([
      { x: 1, P: 5000, group: 'G' },
      { x: 2, P: 3000, group: 'Q' },
    ]);
    expect(
      faultsOf(points, {
        loads: [{ x: '1 m' }, 7, { x: '1 m', P: '2 kN', y: 1 }, { x: '1', P: '2 kN', group: 'snow' }],
      }),
    ).toEqual([
      ['loads/0/P', 'missing'],
      ['loads/1', 'wrong_type'],
      ['loads/2/y', 'unknown_column'],
      ['loads/3/x', 'unit_missing'],
      ['loads/3/group', 'unknown_group'],
    ]);
    expect(faultsOf(points, { loads: Array.from({ length: 21 }, () => ({ x: 1, P: 1 })) })).toEqual([
      ['loads', 'out_of_range'],
    ]);
    expect(faultsOf(points, { loads: 'none' })).toEqual([['loads', 'wrong_type']]);
  });
});

describe('an instance', () => {
  test('is the beam with its places and loads as numbers', () => {
    expect(instanceAt(canopy, { L: 6, a: 1.8, w: 5000 }).beam).toEqual({
      length: 7.8,
      ei: 9_963_000,
      ga: null,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 6, kind: 'roller' },
      ],
      loads: [{ kind: 'line', from: 0, to: 7.8, w0: 5000, w1: 5000, group: 'G' }],
      redundants: [{ support: 1, component: 'vertical' }],
    });
  });

  test('names its supports, lengths and loads', () => {
    const { letters, dimensions, loadNames } = instanceAt(canopy, { L: 6, a: 2 });
    expect(letters).toEqual(['A', 'B']);
    expect(dimensions).toEqual([
      { from: 0, to: 6, symbol: 'L', tex: 'L' },
      { from: 6, to: 8, symbol: 'a', tex: 'a' },
    ]);
    expect(loadNames).toEqual([{ symbol: 'w', tex: 'w', group: 'G' }]);
    expect(instanceAt(points, {}).loadNames.map(({ tex }) => tex)).toEqual(['w', 'P_{1}', 'P_{2}']);
    const heavyAtProp = instanceAt(shippedTemplate('propped-cantilever-triangle'), { heavy: 'prop' });
    expect(heavyAtProp.loadNames.map(({ tex }) => tex)).toEqual(['w']);
  });

  test('keeps every load in its group, and the groups add up', () => {
    const split = instanceAt(canopy, { w: { G: 5520, S: 3600 } });
    expect(split.beam.loads.map((load) => load.kind === 'line' && [load.group, load.w0])).toEqual([
      ['G', 5520],
      ['S', 3600],
    ]);
    expect(split.scope.get('w')).toBe(9120);
  });

  test('leaves out a load of nothing, and the group that has none of it', () => {
    const { beam, loadNames } = instanceAt(points, { w: { G: 0, Q: 2000 } });
    expect(beam.loads.map(({ kind, group }) => [kind, group])).toEqual([
      ['line', 'Q'],
      ['point', 'G'],
      ['point', 'G'],
    ]);
    expect(loadNames).toHaveLength(3);
  });

  test('adds the section’s own weight over the whole beam', () => {
    const { beam, loadNames } = instanceAt(canopy, {}, { selfWeight: 317 });
    expect(beam.loads.at(-1)).toEqual({ kind: 'line', from: 0, to: 7.8, w0: 317, w1: 317, group: 'G' });
    expect(loadNames).toHaveLength(beam.loads.length);
  });

  test('takes the share of the own weight that acts across the beam', () => {
    const sloping = authored(edited('simple-span-uniform', ['beam', 'own_weight'], '0.8'));
    const { beam } = instanceAt(sloping, {}, { selfWeight: 300 });
    expect(beam.loads.at(-1)).toMatchObject({ w0: 240, w1: 240, group: 'G' });
  });

  test('takes its redundants and stiffness from the caller', () => {
    const { beam, ei } = instanceAt(
      canopy,
      {},
      { ei: 2e7, ga: 3e8, redundants: [{ support: 0, component: 'rotation' }] },
    );
    expect(beam).toMatchObject({ ei: 2e7, ga: 3e8, redundants: [{ support: 0, component: 'rotation' }] });
    expect(ei).toBe(2e7);
  });

  test('is refused where a block rule is broken, at the parameter and with what to do', () => {
    const values = readParameters(canopy, { L: '4 m', a: '3.7 m' });
    const made = values.ok ? instantiate(canopy, values.values) : undefined;
    expect(made?.ok === false && made.faults).toEqual([
      {
        path: ['a'],
        code: 'rule_broken',
        message:
          'The overhang 3.7\u00a0m is more than 0.9 of the span 4\u00a0m. Shorten it or lengthen the span; near 0.913 L the fixed end begins to lift.',
      },
    ]);
  });

  test('is refused at the row whose load is off the span', () => {
    const values = readParameters(points, {
      L: '4 m',
      loads: [
        { x: '1 m', P: '1 kN' },
        { x: '4.1 m', P: '1 kN' },
      ],
    });
    const made = values.ok ? instantiate(points, values.values) : undefined;
    expect(made?.ok === false && made.faults[0]?.path).toEqual(['loads', 1]);
  });
});

describe('a template without loads', () => {
  const settling = shippedTemplate('support-settlement');

  test('is a beam that its supports’ movements alone bend', () => {
    const { beam } = instanceAt(settling, { D: '8 mm' });
    expect(beam.loads).toEqual([]);
    expect(beam.supports[1]).toEqual({ at: 6, kind: 'roller', rise: -0.008 });
  });

  test('tells a movement in the unit of its field', () => {
    const { scope } = instanceAt(settling, { D: '60 mm' });
    const size = (system: 'metric' | 'us') =>
      judgeRules(settling, scope, {}, system).find(({ id }) => id === 'settlement-size')?.message;
    expect(size('metric')).toMatch(/^The movement 60\u00a0mm is more than/);
    expect(size('us')).toMatch(/^The movement 2\.36\d*\u00a0in is more than/);
  });
});

describe('the rules of a template', () => {
  const at = (parameters: Readonly<Record<string, unknown>>, depth?: number) => {
    const instance = instanceAt(part, parameters);
    const beam = readBeam(instance.beam);
    if (!beam.ok) throw new Error('unreadable');
    return judgeRules(part, instance.scope, { depth, solution: solveBeam(beam.value) });
  };

  test('that need a section are unknown without one, and never hold', () => {
    expect(at({}).find(({ id }) => id === 'slender')).toMatchObject({ state: 'unknown' });
    expect(at({}, 0.26).find(({ id }) => id === 'slender')).toMatchObject({
      state: 'holds',
      shown: 6 / 0.26,
    });
    expect(at({}, 0.9).find(({ id }) => id === 'slender')).toMatchObject({
      state: 'broken',
      severity: 'warn',
    });
  });

  test('say what is wrong with the figures, in their units', () => {
    const uplift = at({ L: '6 m', a: '2 m', w: '6 kN/m' }).find(({ id }) => id === 'uplift-at-a');
    expect(uplift?.message).toBe(
      'The reaction at A is \u22123.0\u00a0kN: uplift. Hold A down, and check it with the least permanent load on the span.',
    );
  });
});

/** A copy of a written template with one value changed. */
function edited(slug: string, path: readonly (string | number)[], value: unknown): unknown {
  const copy: unknown = structuredClone(writtenTemplates.get(slug));
  const parent = path.slice(0, -1).reduce<unknown>((at, key) => Reflect.get(Object(at), key), copy);
  Reflect.set(Object(parent), path.at(-1) ?? '', value);
  return copy;
}

test('a figure is calculated from the reactions that the engine finds', () => {
  const quantity = { figure: 'RA + RB', dimension: 'force' };
  const proves = (exact: string) =>
    runProofCases(
      authored(
        edited('propped-cantilever-overhang-uniform', ['proof_cases', 0, 'expect'], [{ quantity, exact }]),
      ),
    )[0]?.ok;
  expect(proves('w*(L + a)')).toBe(true);
  expect(proves('w*L')).toBe(false);
});

describe('authoring', () => {
  const SLUG = 'propped-cantilever-overhang-uniform';
  test.each<[readonly (string | number)[], unknown, string]>([
    [['slug'], 'Canopy', 'invalid_format'],
    [['reference'], 'PC-03', 'invalid_format'],
    [['beam', 'length'], 'L + w', 'unsound'],
    [['beam', 'length'], 'w*L', 'wrong_dimension'],
    [['beam', 'length'], 'L + ', 'syntax'],
    [['beam', 'length'], 'L.constructor', 'not_allowed'],
    [['beam', 'supports', 1, 'at'], 'a > L', 'wrong_dimension'],
    [['beam', 'loads', 0, 'w0'], 'w*L^3/8', 'wrong_dimension'],
    [['beam', 'redundants', 0, 'support'], 'C', 'unknown_support'],
    [['beam', 'redundants', 0], { support: 'B', component: 'rotation' }, 'ineligible_redundant'],
    [['beam', 'redundants'], [], 'wrong_count'],
    [['beam', 'dimensions', 0, 'symbol'], 'Lx', 'unknown_symbol'],
    [['parameters', 1, 'symbol'], 'L', 'duplicate'],
    [['parameters', 1, 'symbol'], 'EI', 'reserved'],
    [['parameters', 1, 'symbol'], 'max', 'not_allowed'],
    [['parameters', 1, 'default'], '20 m', 'out_of_range'],
    [['parameters', 1, 'max'], '-1 m', 'order'],
    [['parameters', 1, 'min'], '3 kN', 'unit_wrong_dimension'],
    [['parameters', 1, 'units'], { metric: 'kN' }, 'unit_wrong_dimension'],
    [['stiffness', 'default_ei'], '5', 'unit_missing'],
    [['rules', 0, 'expression'], 'a + L', 'wrong_dimension'],
    [['rules', 0, 'message'], 'Shorten {b}.', 'unknown'],
    [['rules', 0, 'trial'], { parameters: {} }, 'not_broken'],
    [['results', 0, 'expression'], 'w*L^2', 'wrong_dimension'],
    [['results', 0, 'source'], 'nowhere', 'unknown'],
    [['results', 0, 'quantity'], { reaction: 'D' }, 'unknown'],
    [['results', 0, 'quantity'], { figure: 'RA + RC', dimension: 'force' }, 'unsound'],
    [['results', 0, 'quantity'], { figure: 'RA*L', dimension: 'force' }, 'wrong_dimension'],
    [['beam', 'own_weight'], 'L', 'wrong_dimension'],
    [['proof_cases', 0, 'expect', 0], { result: 'nothing' }, 'unknown'],
    [['proof_cases', 0, 'expect', 0], { quantity: { reaction: 'B' }, printed: 'about 3' }, 'not_printed'],
    [['proof_cases', 0, 'expect', 0], { quantity: { moment: 'w' }, exact: 'w*L^2' }, 'wrong_dimension'],
    [['sources', 0], { id: 'derivation', publication: 'A book', from_memory: true }, 'no_place'],
    [['beam', 'loads', 0], { kind: 'line', from: '0', to: 'L', w0: '0', w1: '0' }, 'no_group'],
    [['beam', 'loads', 0, 'w1'], 'w + EI/L^3', 'not_proportional'],
    [['beam', 'supports', 1, 'at'], '0', 'duplicate'],
  ])('%j as %j is refused with its code', (path, value, code) => {
    const reading = authorTemplate(edited(SLUG, path, value));
    const faults = reading.ok ? [] : reading.faults;
    expect(faults.map((fault) => fault.code)).toContain(code);
    expect(faults.map((fault) => fault.path[0])).toContain(path[0]);
    for (const { message } of faults) expect(message).not.toBe('');
  });

  test('every fault is returned, not the first alone', () => {
    const written = edited(SLUG, ['beam', 'length'], 'L +');
    Reflect.set(Object(written), 'name', '');
    const reading = authorTemplate(written);
    expect(reading.ok ? 0 : reading.faults.length).toBe(2);
  });

  test('a stored document is read by its own schema, and an altered tree is refused', () => {
    const stored: unknown = JSON.parse(JSON.stringify(canopy));
    expect(templateDocument.safeParse(stored).success).toBe(true);
    Reflect.set(Object(Reflect.get(Object(stored), 'beam')), 'length', { text: 'L', tree: ['eval', 'L'] });
    expect(templateDocument.safeParse(stored).success).toBe(false);
    expect(checkTemplate(canopy)).toEqual([]);
  });
});
