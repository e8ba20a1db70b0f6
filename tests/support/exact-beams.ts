import { readFileSync } from 'node:fs';
import { type Solution, stationsAt } from '@/engine/beam/index';
import type { BeamDocument } from '@/engine/model/index';

type Sides<T> = T | [left: T, right: T];
type Written = {
  about: string;
  beams: {
    beam: Record<string, unknown> & { name: string };
    reactions: [vertical: string, moment: string][];
    stations: (Record<'V' | 'M' | 'theta', Sides<string>> & Record<'x' | 'v', string>)[];
  }[];
};

/** An exact answer: all values of one kind in a fixed order, rounded once from the rational. */
export type ExactBeam = { name: string; document: BeamDocument; positions: number[]; exact: Kinds };
export type Kinds = Record<'force' | 'couple' | 'shear' | 'moment' | 'slope' | 'deflection', number[]>;

const RATIONAL = /^-?\d+(\/\d+)?$/;

/** The double nearest to "a/b"; whole parts beyond 53 bits are brought below them first. */
export function fromRational(text: string): number {
  const [top = '', bottom = '1'] = text.split('/');
  const negative = top.startsWith('-');
  const [a, b] = [BigInt(negative ? top.slice(1) : top), BigInt(bottom)];
  const whole = a / b;
  const part = Number(((a % b) << 64n) / b) / 2 ** 64;
  return (negative ? -1 : 1) * (Number(whole) + part);
}

/** The beams of data/published/exact-beams.json. */
export function exactBeams(): ExactBeam[] {
  const text = readFileSync(new URL('../../data/published/exact-beams.json', import.meta.url), 'utf8');
  return (JSON.parse(text) as Written).beams.map(({ beam, reactions, stations }) => {
    const { name, ...document } = beam;
    const both = (sides: Sides<string>) => (typeof sides === 'string' ? [sides, sides] : sides);
    const of = (key: 'V' | 'M' | 'theta') =>
      stations.flatMap((station) => both(station[key]).map(fromRational));
    return {
      name,
      document: { ...(numbers(document) as BeamDocument), horizontal: 'ignore' },
      positions: stations.map(({ x }) => fromRational(x)),
      exact: {
        force: reactions.map(([vertical]) => fromRational(vertical)),
        couple: reactions.map(([, moment]) => fromRational(moment)),
        shear: of('V'),
        moment: of('M'),
        slope: of('theta'),
        deflection: stations.map(({ v }) => fromRational(v)),
      },
    };
  });
}

/** The same values of a solution, in the same order. */
export function kindsOf(solution: Solution, positions: readonly number[]): Kinds {
  const stations = stationsAt(solution, positions);
  return {
    force: solution.reactions.map(({ vertical }) => vertical),
    couple: solution.reactions.map(({ moment }) => moment),
    shear: stations.flatMap(({ shear }) => shear),
    moment: stations.flatMap(({ moment }) => moment),
    slope: stations.flatMap(({ slope }) => slope),
    deflection: stations.map(({ deflection }) => deflection),
  };
}

/** Largest difference of each kind as a part of the kind's largest exact value; reactions beside the diagrams'. */
export function differences(actual: Kinds, exact: Kinds): Kinds {
  const largest = (...lists: number[][]) => Math.max(...lists.flat().map(Math.abs));
  const force = largest(exact.force, exact.shear);
  const moment = largest(exact.couple, exact.moment);
  const scales = {
    force,
    couple: moment,
    shear: force,
    moment,
    slope: largest(exact.slope),
    deflection: largest(exact.deflection),
  };
  const of = (kind: keyof Kinds) =>
    exact[kind].map((value, i) => {
      const apart = Math.abs((actual[kind][i] ?? Number.NaN) - value);
      return apart === 0 ? 0 : apart / scales[kind];
    });
  return {
    force: of('force'),
    couple: of('couple'),
    shear: of('shear'),
    moment: of('moment'),
    slope: of('slope'),
    deflection: of('deflection'),
  };
}

function numbers(value: unknown): unknown {
  if (typeof value === 'string') return RATIONAL.test(value) ? fromRational(value) : value;
  if (Array.isArray(value)) return value.map(numbers);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(Object.entries(value).map(([key, one]) => [key, numbers(one)]));
}
