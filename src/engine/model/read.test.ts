import { describe, expect, test } from 'vitest';
import { readBeam } from './read';
import type { BeamDocument } from './types';

const simple: BeamDocument = {
  length: 9,
  ei: 2e7,
  supports: [
    { at: 0, kind: 'pin' },
    { at: 9, kind: 'roller' },
  ],
};

const read = (changes: Partial<BeamDocument>) => readBeam({ ...simple, ...changes });

/** "path code" of every fault. */
function faults(changes: Partial<BeamDocument>): string[] {
  const reading = read(changes);
  return reading.ok ? [] : reading.faults.map(({ path, code }) => `${path.join('.')} ${code}`);
}

function message(changes: Partial<BeamDocument>): string {
  const reading = read(changes);
  return reading.ok ? '' : reading.faults.map((fault) => fault.message).join(' ');
}

function beam(changes: Partial<BeamDocument>) {
  const reading = read(changes);
  if (!reading.ok) throw new Error(message(changes));
  return reading.value;
}

describe('readBeam', () => {
  test('reads one stiffness as one segment, and no field as nothing', () => {
    expect(beam({})).toEqual({
      length: 9,
      segments: [{ from: 0, to: 9, ei: 2e7, ga: null }],
      supports: [
        {
          at: 0,
          kind: 'pin',
          vertical: { kind: 'rigid', movement: 0 },
          rotation: { kind: 'free' },
          horizontal: true,
        },
        {
          at: 9,
          kind: 'roller',
          vertical: { kind: 'rigid', movement: 0 },
          rotation: { kind: 'free' },
          horizontal: false,
        },
      ],
      hinges: [],
      loads: [],
      degree: 0,
    });
  });

  test('reads an empty list of segments beside ei as none', () => {
    expect(beam({ segments: [] })).toEqual(beam({}));
    expect(beam({ segments: [], ga: 5e6 })).toEqual(beam({ ga: 5e6 }));
  });

  test('counts restraints against movement and rotation, springs included, less 2 and the hinges', () => {
    const supports: BeamDocument['supports'] = [
      { at: 0, kind: 'fixed' },
      { at: 4, kind: 'free', kv: 1e6 },
      { at: 9, kind: 'pin', kr: 1e6 },
    ];
    expect(beam({ supports }).degree).toBe(3);
    expect(beam({ supports, hinges: [6, 2] })).toMatchObject({ degree: 1, hinges: [2, 6] });
  });

  test('gives a spring its ground movement and a rigid support its prescribed one', () => {
    const { supports } = beam({
      supports: [
        { at: 0, kind: 'fixed', rise: -0.01, rotation: 0.002 },
        { at: 9, kind: 'free', kv: 5e6, rise: 0.003 },
      ],
    });
    expect(supports[0]).toMatchObject({
      vertical: { kind: 'rigid', movement: -0.01 },
      rotation: { kind: 'rigid', movement: 0.002 },
    });
    expect(supports[1]?.vertical).toEqual({ kind: 'spring', stiffness: 5e6, movement: 0.003 });
  });

  test('brings positions within 1e-12 of the length to one point, supports first', () => {
    const { supports, hinges, loads, segments } = beam({
      supports: [
        { at: 1e-12, kind: 'fixed' },
        { at: 3, kind: 'roller' },
        { at: 9 + 1e-12, kind: 'roller' },
      ],
      hinges: [3 + 4e-12],
      ei: undefined,
      segments: [
        { from: 0, to: 3 - 4e-12, ei: 1e7 },
        { from: 3, to: 9, ei: 2e7 },
      ],
      loads: [
        { kind: 'line', from: 3 - 8e-12, to: 3 + 8e-12, w0: 5, w1: 5 },
        { kind: 'point', at: 3 + 3e-11, p: 1 },
      ],
    });
    expect(supports.map(({ at }) => at)).toEqual([0, 3, 9]);
    expect(hinges).toEqual([3]);
    expect(segments.map(({ from, to }) => [from, to])).toEqual([
      [0, 3],
      [3, 9],
    ]);
    expect(loads).toMatchObject([{ from: 3, to: 3 }, { at: 3 + 3e-11 }]);
  });

  test('takes degenerate input for ordinary: zero loads, zero lengths, loads on supports and ends', () => {
    const loads: BeamDocument['loads'] = [
      { kind: 'point', at: 0, p: 0 },
      { kind: 'line', from: 9, to: 9, w0: 1, w1: 1 },
      { kind: 'line', from: 0, to: 9, w0: 0, w1: 0 },
      { kind: 'couple', at: 9, m: 5 },
      { kind: 'couple', at: 9, m: 5 },
    ];
    const segments = [
      { from: 9, to: 9, ei: 1 },
      { from: 0, to: 9, ei: 2 },
    ];
    expect(beam({ loads }).loads).toEqual(loads);
    expect(beam({ ei: undefined, segments }).segments).toEqual([{ from: 0, to: 9, ei: 2, ga: null }]);
  });

  test.each<[string, Partial<BeamDocument>, string[]]>([
    ['a length of zero', { length: 0 }, ['length not_positive']],
    ['a negative length', { length: -3 }, ['length not_positive']],
    ['a length that is not finite', { length: Number.NaN }, ['length not_finite']],
    ['a length beyond sense', { length: 1e21 }, ['length out_of_range']],
    ['no support', { supports: [] }, ['supports required']],
    [
      'a support off the beam',
      { supports: [...simple.supports, { at: 9.1, kind: 'pin' }] },
      ['supports.2.at out_of_range'],
    ],
    [
      'two supports at one point',
      { supports: [...simple.supports, { at: 9, kind: 'free' }] },
      ['supports.2.at duplicate'],
    ],
    [
      'a spring where the kind holds',
      { supports: [{ at: 0, kind: 'fixed', kv: 1, kr: 1 }] },
      ['supports.0.kv restrained', 'supports.0.kr restrained'],
    ],
    [
      'a spring of no stiffness',
      {
        supports: [
          { at: 0, kind: 'fixed' },
          { at: 9, kind: 'free', kv: 0 },
        ],
      },
      ['supports.1.kv not_positive'],
    ],
    [
      'a movement that nothing holds',
      {
        supports: [
          { at: 0, kind: 'guided', rise: 1 },
          { at: 9, kind: 'pin', rotation: 1 },
        ],
      },
      ['supports.0.rise unrestrained', 'supports.1.rotation unrestrained'],
    ],
    [
      'a movement that is not finite',
      { supports: [{ at: 0, kind: 'fixed', rise: Infinity }] },
      ['supports.0.rise not_finite'],
    ],
    ['a length of nothing', { length: 1e-21 }, ['length out_of_range']],
    ['a hinge nowhere', { hinges: [Number.NaN] }, ['hinges.0 not_finite']],
    [
      'a spring whose ground is nowhere',
      { supports: [{ at: 0, kind: 'free', kv: 1, rise: Number.NaN }] },
      ['supports.0.rise not_finite'],
    ],
    ['no stiffness', { ei: undefined }, ['ei required']],
    ['EI of zero', { ei: 0 }, ['ei not_positive']],
    ['a negative GA', { ga: -1 }, ['ga not_positive']],
    [
      'segments beside ei and ga',
      { ga: null, segments: [{ from: 0, to: 9, ei: 1 }] },
      ['ei conflict', 'ga conflict'],
    ],
    ['no segment', { ei: undefined, segments: [] }, ['segments required']],
    ['no segment, and GA alone', { ei: undefined, ga: 1e6, segments: [] }, ['ei required']],
    [
      'segments with gaps',
      {
        ei: undefined,
        segments: [
          { from: 1, to: 2, ei: 1 },
          { from: 3, to: 8, ei: 1 },
        ],
      },
      ['segments.0.from gap', 'segments.1.from gap', 'segments gap'],
    ],
    [
      'segments that overlap',
      {
        ei: undefined,
        segments: [
          { from: 0, to: 5, ei: 1 },
          { from: 4, to: 9, ei: 1 },
        ],
      },
      ['segments.1.from overlap'],
    ],
    [
      'a segment backwards',
      { ei: undefined, segments: [{ from: 9, to: 0, ei: 1 }] },
      ['segments.0.from order'],
    ],
    ['a hinge at an end', { hinges: [0, 9] }, ['hinges.0 out_of_range', 'hinges.1 out_of_range']],
    [
      'two hinges at one point',
      {
        supports: [
          { at: 0, kind: 'fixed' },
          { at: 9, kind: 'fixed' },
        ],
        hinges: [4, 4],
      },
      ['hinges.1 duplicate'],
    ],
    [
      'a fixed support at a hinge',
      { supports: [...simple.supports, { at: 5, kind: 'fixed' }], hinges: [5] },
      ['supports.2.kind at_hinge'],
    ],
    [
      'a rotation spring at a hinge',
      { supports: [...simple.supports, { at: 5, kind: 'pin', kr: 2 }], hinges: [5] },
      ['supports.2.kr at_hinge'],
    ],
    [
      'a couple at a hinge',
      { hinges: [5], loads: [{ kind: 'couple', at: 5, m: 0 }] },
      ['loads.0.at at_hinge'],
    ],
    ['a load backwards', { loads: [{ kind: 'line', from: 5, to: 4, w0: 1, w1: 1 }] }, ['loads.0.from order']],
    [
      'loads off the beam',
      {
        loads: [
          { kind: 'point', at: -1, p: 1 },
          { kind: 'curvature', from: 0, to: 10, kappa: 1 },
        ],
      },
      ['loads.0.at out_of_range', 'loads.1.to out_of_range'],
    ],
    [
      'loads that are not finite',
      { loads: [{ kind: 'line', from: 0, to: 9, w0: Number.NaN, w1: Infinity }] },
      ['loads.0.w0 not_finite', 'loads.0.w1 not_finite'],
    ],
    ['a station off the beam', { stations: [0, 9.5] }, ['stations.1 out_of_range']],
    ['a single station', { stations: 1 }, ['stations out_of_range']],
    ['half a station', { stations: 2.5 }, ['stations out_of_range']],
  ])('refuses %s', (_, changes, expected) => {
    expect(faults(changes)).toEqual(expected);
  });

  test('collects the faults of every part', () => {
    const changes: Partial<BeamDocument> = {
      ei: -1,
      supports: [{ at: 12, kind: 'pin' }],
      hinges: [0],
      loads: [{ kind: 'point', at: Number.NaN, p: Number.NaN }],
    };
    expect(faults(changes)).toEqual([
      'supports.0.at out_of_range',
      'hinges.0 out_of_range',
      'ei not_positive',
      'loads.0.at not_finite',
      'loads.0.p not_finite',
    ]);
  });

  test('says what is wrong and what to do', () => {
    expect(message({ supports: [{ at: 12, kind: 'pin' }] })).toBe(
      '12.000 m is off the beam. Give a position from 0 to 9.000 m.',
    );
    expect(message({ loads: [{ kind: 'point', at: -0.00012345, p: 1 }] })).toBe(
      '−0.00012345 m is off the beam. Give a position from 0 to 9.000 m.',
    );
    expect(message({ supports: [{ at: 0, kind: 'fixed', kr: 1 }] })).toBe(
      'A fixed support holds rotation already. Remove kr, or choose a kind that leaves it free.',
    );
  });
});

describe('stability', () => {
  test.each<[string, Partial<BeamDocument>, string]>([
    ['one roller', { supports: [{ at: 3, kind: 'roller' }] }, 'It turns about the roller at 3.000 m.'],
    [
      'one spring',
      { supports: [{ at: 3, kind: 'free', kv: 1 }] },
      'It turns about the elastic support at 3.000 m.',
    ],
    [
      'a guided support alone',
      { supports: [{ at: 0, kind: 'guided' }] },
      'It slides up and down: nothing holds it vertically.',
    ],
    [
      'free points alone',
      { supports: [{ at: 0, kind: 'free' }] },
      'It slides up and down: nothing holds it vertically.',
    ],
    [
      'a hinge in a simple span',
      { hinges: [4] },
      'The part between 0.000 m and 4.000 m turns about the pin at 0.000 m, the part between 4.000 m and 9.000 m turns about the roller at 9.000 m.',
    ],
    [
      'a hinge in an overhang',
      {
        supports: [
          { at: 0, kind: 'pin' },
          { at: 6, kind: 'roller' },
        ],
        hinges: [7],
      },
      'The part between 7.000 m and 9.000 m turns about the hinge at 7.000 m.',
    ],
    [
      'a hinge over the first support of an overhang',
      {
        supports: [
          { at: 2, kind: 'pin' },
          { at: 6, kind: 'roller' },
        ],
        hinges: [2],
      },
      'The part between 0.000 m and 2.000 m turns about the pin at 2.000 m.',
    ],
    [
      'three hinges between fixed ends, which count 0',
      {
        supports: [
          { at: 0, kind: 'fixed' },
          { at: 9, kind: 'fixed' },
        ],
        hinges: [2, 4, 7],
      },
      'The part between 2.000 m and 4.000 m turns about the hinge at 2.000 m, the part between 4.000 m and 7.000 m turns about the hinge at 7.000 m.',
    ],
    [
      'a part that hangs on a part that turns itself',
      { supports: [{ at: 2, kind: 'pin' }], hinges: [4] },
      'The part between 4.000 m and 9.000 m turns about the hinge at 4.000 m.',
    ],
    [
      'a guided part hung on a part that turns',
      {
        supports: [
          { at: 0, kind: 'guided' },
          { at: 9, kind: 'roller' },
        ],
        hinges: [4],
      },
      'The part between 0.000 m and 4.000 m slides up and down, the part between 4.000 m and 9.000 m turns about the roller at 9.000 m.',
    ],
  ])('%s is a mechanism, described', (_, changes, words) => {
    const reading = read({ ...changes, horizontal: 'ignore' });
    expect(reading).toMatchObject({ ok: false, faults: [{ path: ['supports'], code: 'unstable' }] });
    expect(message({ ...changes, horizontal: 'ignore' })).toBe(
      `The beam is unstable. ${words} Add a support, make one hold more, or remove a hinge.`,
    );
  });

  test.each<[string, Partial<BeamDocument>]>([
    [
      'fixed and guided ends',
      {
        supports: [
          { at: 0, kind: 'fixed' },
          { at: 9, kind: 'guided' },
        ],
      },
    ],
    [
      'a suspended span between cantilevers',
      {
        supports: [
          { at: 0, kind: 'fixed' },
          { at: 9, kind: 'fixed' },
        ],
        hinges: [3, 6],
      },
    ],
    ['a spring against rotation alone with a roller', { supports: [{ at: 2, kind: 'roller', kr: 1e-3 }] }],
    [
      'a roller a micrometre from the hinge of a cantilever',
      {
        supports: [
          { at: 0, kind: 'fixed' },
          { at: 4.000001, kind: 'roller' },
        ],
        hinges: [4],
      },
    ],
  ])('%s is stable', (_, changes) => {
    expect(faults({ ...changes, horizontal: 'ignore' })).toEqual([]);
  });

  test('a roller exactly on the hinge of a cantilever does not hold what is beyond it', () => {
    const supports: BeamDocument['supports'] = [
      { at: 0, kind: 'fixed' },
      { at: 4, kind: 'roller' },
    ];
    expect(faults({ supports, hinges: [4] })).toEqual(['supports unstable']);
  });

  test('sideways is asked for unless told to ignore it, and said beside another movement', () => {
    const supports: BeamDocument['supports'] = [
      { at: 0, kind: 'roller' },
      { at: 9, kind: 'roller' },
    ];
    expect(message({ supports })).toMatch(
      /slides sideways: nothing holds it horizontally\. Make one support a pin/,
    );
    expect(faults({ supports, horizontal: 'ignore' })).toEqual([]);
    expect(faults({ supports: [{ at: 0, kind: 'roller' }] })).toEqual([
      'supports unstable',
      'supports unstable',
    ]);
  });

  test.each([1e-6, 1e-3, 1, 1e3, 1e9])('the verdict is the same at %d times the size', (size) => {
    const scaled = (hinge: number): BeamDocument => ({
      length: 9 * size,
      ei: 1,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 4 * size, kind: 'roller' },
      ],
      hinges: [hinge * size],
    });
    expect(readBeam(scaled(4)).ok).toBe(false);
    expect(readBeam(scaled(4 - 1e-10)).ok).toBe(true);
  });

  test('the movement is drawn as a chain with 1 as its largest deflection', () => {
    const reading = read({ hinges: [6] });
    expect(reading).toMatchObject({
      faults: [
        {
          motion: [
            { x: 0, deflection: 0 },
            { x: 6, deflection: expect.closeTo(-1, 12) },
            { x: 9, deflection: 0 },
          ],
        },
      ],
    });
  });
});
