import type { BeamDocument } from '@/engine/model/index';
import { type Dice, dice } from './random';
import { randomBeam } from './random-beam';

/** `refused`: an answer to it would be wrong. `judged`: it may be a beam after all, and then its answer must be proven. */
export type Hostile = { family: string; verdict: 'refused' | 'judged'; body: unknown };

type Family = { name: string; verdict: Hostile['verdict']; make: (roll: Dice, seed: number) => unknown };

const SEGMENT = { from: 0, to: 9, ei: 2e7 };
const plain = () => ({
  length: 9,
  segments: [{ ...SEGMENT }],
  supports: [
    { at: 0, kind: 'fixed' },
    { at: 7, kind: 'roller' },
  ],
  hinges: [3],
  loads: [
    { kind: 'point', at: 3, p: 12000 },
    { kind: 'line', from: 0, to: 9, w0: 8000, w1: 8000 },
  ],
  stations: 5,
});

/** No quantity, in JSON or beyond it, and no text of one. */
const NO_QUANTITIES: readonly unknown[] = [
  Number.NaN,
  Number.POSITIVE_INFINITY,
  Number.NEGATIVE_INFINITY,
  1e308,
  -1e308,
  1e21,
  null,
  true,
  false,
  {},
  [],
  [1],
  { value: 1 },
  '',
  ' ',
  'NaN',
  'Infinity m',
  '1e999 m',
  'four metres',
  '1,234 m',
  '1,2,3 m',
  '--3 m',
  '0x10 m',
  '3 parsecs',
  '3 m; DROP TABLE beam',
  '<script>alert(1)</script>',
  '3 m\u0000',
  '\ud800',
  '٣ m',
  '9'.repeat(100_000),
  `${' '.repeat(100_000)}m`,
  `${'1 '.repeat(50_000)}m`,
  `${'('.repeat(50_000)}1${')'.repeat(50_000)} m`,
  `${'1/'.repeat(30_000)}2 in`,
  `${'m·'.repeat(30_000)}m`,
  10n,
  Symbol('m'),
  () => 1,
];

/** Places of a quantity in the plain document, which is no beam without it. */
const PLACES = [
  'length',
  'segments.0.from',
  'segments.0.to',
  'segments.0.ei',
  'supports.0.at',
  'supports.1.at',
  'hinges.0',
  'loads.0.at',
  'loads.0.p',
  'loads.1.from',
  'loads.1.to',
  'loads.1.w0',
  'loads.1.w1',
] as const;

/** Shapes that stand where a list or a record is wanted. */
const SHAPES: readonly unknown[] = [null, 0, 'beam', true, [[]], [null], [[[]]], { 0: {} }, { length: 1 }];
const LISTS = ['supports', 'loads', 'hinges', 'segments'] as const;

const OWN_PROTOTYPE = '{"__proto__":{"length":9,"kind":"fixed"},"at":0}';
const KEYS = ['__proto__', 'constructor', 'prototype', 'toString', 'hasOwnProperty', '', '/~', 'lenght'];

function put(document: unknown, place: string, value: unknown): unknown {
  const keys = place.split('.');
  const last = keys.pop()!;
  const holder = keys.reduce<unknown>((inner, key) => Reflect.get(inner as object, key), document);
  Object.defineProperty(holder, last, { value, enumerable: true, configurable: true, writable: true });
  return document;
}

function nested(depth: number, wrap: (inner: unknown) => unknown): unknown {
  let value: unknown = 1;
  for (let k = 0; k < depth; k++) value = wrap(value);
  return value;
}

/** A beam of the seeded series as plain data, to be spoilt. */
const drawn = (seed: number): BeamDocument => structuredClone(randomBeam(seed));

/** A random beam that holds too little: one support that does not hold rotation, or none that holds up. */
function loosened(roll: Dice, seed: number): BeamDocument {
  const beam = drawn(seed);
  const { at } = roll.pick(beam.supports);
  const kind = roll.pick(['pin', 'roller', 'guided', 'free'] as const);
  return { ...beam, supports: [{ at, kind }], hinges: [] };
}

/** More hinges than what holds the beam, evenly spread: some part of it must turn. */
function folded(roll: Dice, seed: number): BeamDocument {
  const beam = drawn(seed);
  const hinges = Array.from(
    { length: 2 * beam.supports.length + roll.whole(1, 4) },
    (_, k, n = 2 * beam.supports.length + 5) => (beam.length * (k + 0.37)) / n,
  );
  return { ...beam, hinges, loads: [] };
}

/** Twins of points of a beam, 1e-15 to 1e-5 of its length away. */
function crowded(roll: Dice, seed: number): BeamDocument {
  const beam = drawn(seed);
  const beside = (x: number) => x + roll.sign() * beam.length * roll.logBetween(1e-15, 1e-5);
  const inside = (x: number) => Math.min(beam.length, Math.max(0, x));
  const supports = [
    ...beam.supports,
    ...beam.supports.slice(0, 2).map(({ at }) => ({ at: inside(beside(at)), kind: 'roller' as const })),
  ];
  const loads = (beam.loads ?? []).map((load) => ('at' in load ? { ...load, at: beside(load.at) } : load));
  return { ...beam, supports, hinges: (beam.hinges ?? []).map(beside), loads };
}

function stiffened(roll: Dice, seed: number): BeamDocument {
  const beam = drawn(seed);
  const far = () => 10 ** roll.between(-12, 12);
  return {
    ...beam,
    segments: (beam.segments ?? []).map((one) => ({
      ...one,
      ei: one.ei * far(),
      ga: roll.chance(0.3) ? far() : null,
    })),
    supports: beam.supports.map((one) => ({
      ...one,
      ...(one.kv === undefined ? {} : { kv: one.kv * far() }),
      ...(one.kr === undefined ? {} : { kr: one.kr * far() }),
    })),
  };
}

/** Every length of the beam blown up or shrunk, and its loads by another factor. */
function resized(roll: Dice, seed: number): BeamDocument {
  const beam = drawn(seed);
  const [f, g] = [10 ** roll.between(-14, 14), 10 ** roll.between(-14, 14)];
  return {
    ...beam,
    length: beam.length * f,
    segments: (beam.segments ?? []).map((s) => ({ ...s, from: s.from * f, to: s.to * f })),
    supports: beam.supports.map((s) => ({ ...s, at: s.at * f })),
    hinges: (beam.hinges ?? []).map((x) => x * f),
    loads: (beam.loads ?? []).map((load) =>
      'at' in load
        ? { ...load, at: load.at * f, ...(load.kind === 'point' ? { p: load.p * g } : { m: load.m * g }) }
        : { ...load, from: load.from * f, to: load.to * f },
    ),
  };
}

/** Redundants of no beam, or of another. */
const REDUNDANTS: readonly unknown[] = [
  [{ support: 9, component: 'vertical' }],
  [{ support: -1, component: 'vertical' }],
  [{ support: 0.5, component: 'vertical' }],
  [{ support: 1e300, component: 'vertical' }],
  [{ support: 0, component: 'constructor' }],
  [{ support: 1, component: 'rotation' }],
  [{ at: 7, component: 'moment' }],
  [{ at: 0, component: 'moment' }],
  [{ at: Number.NaN, component: 'moment' }],
  [{ at: -4, component: 'moment' }],
  [
    { support: 1, component: 'vertical' },
    { support: 1, component: 'vertical' },
  ],
  'vertical',
  [[]],
  [null],
];
const STATIONS: readonly unknown[] = [
  0,
  1,
  -5,
  2.5,
  1e9,
  5002,
  Number.NaN,
  '11',
  [Number.NaN],
  [-1],
  [9.1],
  [null],
  {},
];

const FAMILIES: readonly Family[] = [
  {
    name: 'no quantity in its place',
    verdict: 'refused',
    make: (roll) => put(plain(), roll.pick(PLACES), roll.pick(NO_QUANTITIES)),
  },
  {
    name: 'no list in its place',
    verdict: 'refused',
    make: (roll) => put(plain(), roll.pick(LISTS), roll.pick(SHAPES)),
  },
  {
    name: 'no document',
    verdict: 'refused',
    make: (roll) => roll.pick([null, undefined, 0, '', 'beam', [], [plain()], true, Number.NaN, 9n, {}]),
  },
  {
    name: 'nested deeply',
    verdict: 'refused',
    make: (roll) => {
      const depth = roll.pick([100, 5_000, 20_000]);
      const value = roll.chance(0.5)
        ? nested(depth, (inner) => [inner])
        : nested(depth, (inner) => ({ supports: inner }));
      return roll.chance(0.3) ? value : put(plain(), roll.pick([...PLACES, ...LISTS]), value);
    },
  },
  {
    name: 'unknown and prototype keys',
    verdict: 'refused',
    make: (roll) => {
      const document = plain();
      if (roll.chance(0.2)) return put(document, 'supports.0', JSON.parse(OWN_PROTOTYPE));
      const at = roll.pick(['', 'segments.0.', 'supports.1.', 'loads.0.', 'loads.1.']);
      return put(document, `${at}${roll.pick(KEYS)}`, roll.pick<unknown>([{ length: 9 }, 1, null, 'fixed']));
    },
  },
  {
    name: 'unknown kinds',
    verdict: 'refused',
    make: (roll) => {
      const kind = roll.pick<unknown>([...KEYS, 'Fixed', 'fixed ', 'hinge', null, 1, ['fixed']]);
      return put(plain(), roll.pick(['supports.0.kind', 'loads.0.kind']), kind);
    },
  },
  {
    name: 'off the beam, backwards, twice, or not positive',
    verdict: 'refused',
    make: (roll) => {
      const spoil = roll.pick<[string, unknown]>([
        ['length', 0],
        ['length', -9],
        ['length', -0],
        ['segments.0.ei', 0],
        ['segments.0.ei', -2e7],
        ['segments.0.ga', 0],
        ['segments.0.to', 8],
        ['segments.0.from', 1],
        ['supports.0.at', -1e-6],
        ['supports.0.at', 7],
        ['supports.1.at', 9.000001],
        ['supports.1.kv', 1e6],
        ['supports.1.rotation', 0.01],
        ['supports.1.kr', -1],
        ['hinges.0', 0],
        ['hinges.0', 9],
        ['hinges.1', 3],
        ['loads.0.at', 10],
        ['loads.1.from', 9.5],
        ['loads.1.to', -1],
        ['ei', 1],
        ['supports', []],
        ['segments', []],
      ]);
      return put(plain(), ...spoil);
    },
  },
  {
    name: 'longer than the limits',
    verdict: 'refused',
    make: (roll) => {
      const [list, one] = roll.pick<[string, unknown]>([
        ['loads', { kind: 'point', at: 1, p: 1 }],
        ['supports', { at: 1, kind: 'roller' }],
        ['hinges', 1],
        ['segments', SEGMENT],
        ['stations', 1],
      ]);
      return put(
        plain(),
        list,
        Array.from({ length: roll.pick([5_002, 20_000]) }, () => one),
      );
    },
  },
  {
    name: 'redundants of another beam',
    verdict: 'refused',
    make: (roll) => ({ ...plain(), hinges: [], redundants: roll.pick(REDUNDANTS) }),
  },
  {
    name: 'stations that are none',
    verdict: 'refused',
    make: (roll) => ({ ...plain(), stations: roll.pick(STATIONS) }),
  },
  { name: 'mechanisms: held too little', verdict: 'refused', make: loosened },
  { name: 'mechanisms: hinged too often', verdict: 'refused', make: folded },
  { name: 'points that almost coincide', verdict: 'judged', make: crowded },
  { name: 'stiffnesses far apart', verdict: 'judged', make: stiffened },
  { name: 'lengths and loads of no beam', verdict: 'judged', make: resized },
];

/** The hostile bodies of the seeded series, the families in turn. */
export function* hostileBodies(count: number): Generator<Hostile & { seed: number }> {
  for (let seed = 1; seed <= count; seed++) {
    const { name, verdict, make } = FAMILIES[seed % FAMILIES.length]!;
    yield { seed, family: name, verdict, body: make(dice(seed), seed) };
  }
}
