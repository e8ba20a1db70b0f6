import { describe, expect, test } from 'vitest';
import { defaultRedundants } from './default-redundants';
import { releaseMechanism } from './motion';
import { readBeam } from './read';
import { admissibleSets, checkRedundants, eligibleRedundants, placeRedundant } from './redundants';
import type { Beam, BeamDocument, Redundant } from './types';
import { nameRedundant } from './words';

function beam(document: Partial<BeamDocument> & Pick<BeamDocument, 'supports'>): Beam {
  const reading = readBeam({ length: 9, ei: 1, horizontal: 'ignore', ...document });
  if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
  return reading.value;
}

const vertical = (support: number): Redundant => ({ support, component: 'vertical' });
const rotation = (support: number): Redundant => ({ support, component: 'rotation' });
const moment = (at: number): Redundant => ({ at, component: 'moment' });

const propped = beam({
  supports: [
    { at: 0, kind: 'fixed' },
    { at: 7, kind: 'roller' },
  ],
});
const fixedEnds = beam({
  supports: [
    { at: 0, kind: 'fixed' },
    { at: 9, kind: 'fixed' },
  ],
});
const threeSpans = beam({
  supports: [
    { at: 0, kind: 'pin' },
    { at: 3, kind: 'roller' },
    { at: 6, kind: 'roller' },
    { at: 9, kind: 'roller' },
  ],
});

describe('eligibleRedundants', () => {
  test('of a propped cantilever with overhang are its two reactions and the fixed-end moment', () => {
    // The moment over the prop is the overhang's: equilibrium alone determines it.
    expect(eligibleRedundants(propped)).toEqual([vertical(0), rotation(0), vertical(1)]);
  });

  test('of a continuous beam are all reactions, then the moments over the inner supports', () => {
    expect(eligibleRedundants(threeSpans)).toEqual([
      vertical(0),
      vertical(1),
      vertical(2),
      vertical(3),
      moment(3),
      moment(6),
    ]);
  });

  test('hold springs, but no moment over a support that holds rotation, nor in a hinge', () => {
    const sprung = beam({
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 3, kind: 'roller', kr: 1e6 },
        { at: 6, kind: 'free', kv: 1e6 },
        { at: 9, kind: 'roller' },
      ],
      hinges: [6],
    });
    expect(eligibleRedundants(sprung)).toEqual([
      vertical(0),
      rotation(0),
      vertical(1),
      rotation(1),
      vertical(2), // the last span hangs on the hinge: equilibrium determines its roller
    ]);
  });

  test('of a determinate beam are none', () => {
    expect(eligibleRedundants(beam({ supports: [{ at: 0, kind: 'fixed' }] }))).toEqual([]);
  });

  test('leave out the determinate part of a beam that is indeterminate elsewhere', () => {
    const mixed = beam({
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 4, kind: 'roller' },
        { at: 9, kind: 'roller' },
      ],
      hinges: [5],
    });
    expect(eligibleRedundants(mixed)).toEqual([vertical(0), rotation(0), vertical(1)]);
  });
});

describe('defaultRedundants', () => {
  test('are the support moments of a continuous beam, from left to right', () => {
    expect(defaultRedundants(threeSpans)).toEqual([moment(3), moment(6)]);
    expect(defaultRedundants(propped)).toEqual([rotation(0)]);
    expect(defaultRedundants(fixedEnds)).toEqual([rotation(0), rotation(1)]);
  });

  test('turn to vertical reactions where moments do not suffice', () => {
    const guided = beam({
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 4, kind: 'fixed' },
        { at: 9, kind: 'fixed' },
      ],
    });
    const chosen = defaultRedundants(guided);
    expect(chosen).toHaveLength(4);
    expect(checkRedundants(guided, chosen)).toEqual([]);
    expect(chosen).toContainEqual(vertical(1));
  });

  test('begin with a spring that is softer than the beam', () => {
    const soft = (kv: number) =>
      beam({
        supports: [
          { at: 0, kind: 'pin' },
          { at: 4, kind: 'free', kv },
          { at: 9, kind: 'roller' },
        ],
      });
    expect(defaultRedundants(soft(1e-6))).toEqual([vertical(1)]);
    expect(defaultRedundants(soft(1))).toEqual([moment(4)]);
  });
});

describe('admissibleSets', () => {
  test('of fixed ends are all pairs but the two vertical reactions', () => {
    expect([...admissibleSets(fixedEnds)]).toEqual([
      [vertical(0), rotation(0)],
      [vertical(0), rotation(1)],
      [rotation(0), vertical(1)],
      [rotation(0), rotation(1)],
      [vertical(1), rotation(1)],
    ]);
  });

  test('are all accepted, and every other set of eligible redundants is refused', () => {
    const admissible = new Set([...admissibleSets(threeSpans)].map((set) => JSON.stringify(set)));
    const eligible = eligibleRedundants(threeSpans);
    const pairs = eligible.flatMap((a, i) => eligible.slice(i + 1).map((b) => [a, b]));
    for (const pair of pairs) {
      expect(checkRedundants(threeSpans, pair).length === 0).toBe(admissible.has(JSON.stringify(pair)));
    }
    expect(admissible.size).toBe(13);
  });

  test('of a determinate beam is the empty set alone', () => {
    expect([...admissibleSets(beam({ supports: [{ at: 0, kind: 'fixed' }] }))]).toEqual([[]]);
  });
});

describe('checkRedundants', () => {
  const codes = (of: Beam, set: Redundant[]) =>
    checkRedundants(of, set).map(({ path, code }) => `${path.join('.')} ${code}`);
  const words = (of: Beam, set: Redundant[]) => checkRedundants(of, set)[0]?.message;

  test('accepts an admissible set in any order, and a moment anywhere within a span', () => {
    expect(checkRedundants(fixedEnds, [vertical(1), rotation(0)])).toEqual([]);
    expect(checkRedundants(propped, [moment(2.5)])).toEqual([]);
  });

  test.each<[string, Beam, Redundant[], string[], string]>([
    [
      'too few',
      fixedEnds,
      [rotation(0)],
      ['redundants wrong_count'],
      'The beam is statically indeterminate to degree 2. Choose 2 redundants, not 1.',
    ],
    [
      'none',
      propped,
      [],
      ['redundants wrong_count'],
      'The beam is statically indeterminate to degree 1. Choose one redundant, not 0.',
    ],
    [
      'the same one twice',
      fixedEnds,
      [rotation(0), rotation(0)],
      ['redundants.1 duplicate'],
      'The moment reaction of the fixed support at 0.000 m is listed twice. Choose another for one of them.',
    ],
    [
      'a support that is not there',
      propped,
      [vertical(2)],
      ['redundants.0 ineligible_redundant'],
      'There is no support 2. The beam has 2, counted from 0 in the order given.',
    ],
    [
      'a reaction that is not there',
      propped,
      [rotation(1)],
      ['redundants.0 ineligible_redundant'],
      'The roller at 7.000 m does not hold rotation: there is no reaction to release. Choose another redundant.',
    ],
    [
      'a moment at an end',
      propped,
      [moment(0)],
      ['redundants.0 ineligible_redundant'],
      "There is no moment to release at 0.000 m. Choose a position inside the beam, or a support's rotation.",
    ],
    [
      'the moment of an overhang',
      propped,
      [moment(7)],
      ['redundants.0 ineligible_redundant'],
      'Equilibrium alone determines the moment at 7.000 m: without it the beam moves. The part between 7.000 m and 9.000 m turns about the roller at 7.000 m. Choose another redundant.',
    ],
    [
      'both vertical reactions',
      fixedEnds,
      [vertical(0), vertical(1)],
      ['redundants inadmissible_redundants'],
      'Without these redundants the beam is a mechanism. It slides up and down: nothing holds it vertically. Choose another set.',
    ],
    ['two hinges in one span', fixedEnds, [moment(3), moment(6)], [], ''],
    [
      'a moment beside the reaction that then fails',
      threeSpans,
      [vertical(0), moment(3)],
      ['redundants inadmissible_redundants'],
      'Without these redundants the beam is a mechanism. The part between 0.000 m and 3.000 m turns about the roller at 3.000 m. Choose another set.',
    ],
  ])('%s', (_, of, set, expected, message) => {
    expect(codes(of, set)).toEqual(expected);
    expect(words(of, set) ?? '').toBe(message);
  });

  test('a determinate beam has no redundants to choose', () => {
    const cantilever = beam({ supports: [{ at: 0, kind: 'fixed' }] });
    expect(codes(cantilever, [vertical(0)])).toEqual([
      'redundants.0 ineligible_redundant',
      'redundants wrong_count',
    ]);
    expect(checkRedundants(cantilever, [])).toEqual([]);
  });

  test('a moment where a support holds rotation, or in a hinge, is refused with the reason', () => {
    const of = beam({
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 4, kind: 'fixed' },
        { at: 9, kind: 'fixed' },
      ],
      hinges: [6],
    });
    expect(words(of, [moment(4), rotation(0), rotation(2)])).toMatch(
      /^The moment jumps at the fixed support at 4\.000 m/,
    );
    expect(words(of, [moment(6), rotation(0), rotation(2)])).toMatch(
      /^The moment is zero in the hinge at 6\.000 m/,
    );
  });

  test('a moment beside a point of the beam is brought to that point', () => {
    const of = beam({
      ei: undefined,
      segments: [
        { from: 0, to: 2, ei: 1 },
        { from: 2, to: 9, ei: 2 },
      ],
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 3, kind: 'roller' },
        { at: 9, kind: 'fixed' },
      ],
      hinges: [8],
      loads: [
        { kind: 'point', at: 4, p: 1 },
        { kind: 'line', from: 5, to: 6, w0: 1, w1: 1 },
      ],
    });
    for (const point of [0, 2, 3, 4, 5, 6, 8, 9]) {
      expect(placeRedundant(of, moment(point + 3e-12))).toEqual(moment(point));
      expect(placeRedundant(of, moment(point - 3e-12))).toEqual(moment(point));
    }
    expect(placeRedundant(of, moment(7 + 3e-12))).toEqual(moment(7 + 3e-12));
    const overhung = beam({
      supports: [
        { at: 2, kind: 'pin' },
        { at: 7, kind: 'roller' },
      ],
    });
    expect(placeRedundant(overhung, moment(3e-12))).toEqual(moment(0));
    expect(checkRedundants(of, [moment(3 + 3e-12), rotation(0)])).toEqual([]);
  });

  test('a hinge made by a release is what the rest turns about', () => {
    expect(words(propped, [moment(8)])).toContain(
      'The part between 8.000 m and 9.000 m turns about the released moment at 8.000 m.',
    );
  });

  test('the mechanism that is left is drawn', () => {
    const [fault] = checkRedundants(fixedEnds, [vertical(0), vertical(1)]);
    expect(fault?.motion).toEqual([
      { x: 0, deflection: 1 },
      { x: 9, deflection: 1 },
    ]);
    expect(releaseMechanism(fixedEnds, [rotation(0)])).toBeNull();
  });
});

test('a moment is released at the point it coincides with', () => {
  expect(placeRedundant(threeSpans, moment(3 + 5e-12))).toEqual(moment(3));
  expect(placeRedundant(threeSpans, moment(4))).toEqual(moment(4));
  expect(placeRedundant(threeSpans, vertical(1))).toEqual(vertical(1));
});

test('a redundant is named after its support', () => {
  expect(nameRedundant(propped, vertical(1))).toBe('the vertical reaction of the roller at 7.000 m');
  expect(nameRedundant(propped, rotation(0))).toBe('the moment reaction of the fixed support at 0.000 m');
  expect(nameRedundant(propped, moment(2.5))).toBe('the moment at 2.500 m');
});
