/** What a material's values cannot be, however its standard prints them: a slip of a unit, a column or a digit. */
import { type DimensionName, formatQuantity, readQuantity } from '@/engine/quantity';
import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';

type Entry = Readonly<Record<string, unknown>>;
type Range = readonly [least: number, most: number];

interface Limits {
  readonly dimension: DimensionName;
  readonly unit: string;
  /** SI. */
  readonly range: Range;
}

const GPA = 1e9;
const MPA = 1e6;

// Wide around every grade in use, from memory: what lies outside was typed wrong, or in another unit.
const STEEL: Readonly<Record<string, Limits>> = {
  e: { dimension: 'modulus', unit: 'GPa', range: [150 * GPA, 250 * GPA] },
  density: { dimension: 'density', unit: 'kg/m3', range: [7000, 8500] },
  expansion: { dimension: 'expansion', unit: '1/K', range: [5e-6, 25e-6] },
};
const STEEL_STRENGTH: Limits = { dimension: 'stress', unit: 'N/mm2', range: [100 * MPA, 1500 * MPA] };
const STRENGTH: Limits = { dimension: 'stress', unit: 'N/mm2', range: [0.1 * MPA, 100 * MPA] };
const TIMBER: Readonly<Record<string, Limits>> = {
  e: { dimension: 'modulus', unit: 'GPa', range: [1 * GPA, 30 * GPA] },
  density: { dimension: 'density', unit: 'kg/m3', range: [200, 1300] },
  expansion: { dimension: 'expansion', unit: '1/K', range: [1e-6, 60e-6] },
  ...Object.fromEntries(
    ['fm', 'ft0', 'fc0', 'fc90', 'fv', 'fb', 'fb_reversed', 'ft', 'fc_perp', 'fc'].map((key) => [
      key,
      STRENGTH,
    ]),
  ),
};

/** What G is of E: of an isotropic solid 1/(2 (1 + ν)) with ν from 0 to 0.5; of timber about 1/16. */
const SHARE_OF_G: Readonly<Record<'steel' | 'timber', Range>> = {
  steel: [1 / 3, 1 / 2],
  timber: [1 / 50, 1 / 5],
};

/** Values that are at most another one, by key: a fractile, and the mean that it is of. */
const AT_MOST: readonly (readonly [key: string, mean: string, dimension: DimensionName, words: string])[] = [
  ['e05', 'e', 'modulus', 'The 5 % fractile of E is not above its mean.'],
  ['e_min', 'e', 'modulus', 'E_min is not above the mean of E.'],
  ['density_k', 'density', 'density', 'The characteristic density is not above the mean.'],
];

const isEntry = (value: unknown): value is Entry =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/** A value in SI; null where it is missing or cannot be read, which its schema says. */
function si(entry: Entry, key: string, dimension: DimensionName): number | null {
  const text = entry[key];
  const reading = typeof text === 'string' ? readQuantity(text, dimension) : null;
  return reading?.ok ? reading.value : null;
}

const fault = (path: readonly PropertyKey[], message: string): Fault => ({
  pointer: pointer(path),
  code: 'implausible',
  message,
});

/** What cannot be of a set as it is written: of each entry, of what of it can be read. */
export function implausible({ materials }: Readonly<Record<string, unknown>>): Fault[] {
  const entries: readonly unknown[] = Array.isArray(materials) ? materials : [];
  return entries.flatMap((entry, index) => {
    if (!isEntry(entry)) return [];
    const path = ['materials', index];
    const isSteel = entry['kind'] === 'steel';
    const slips = outside(entry, isSteel ? STEEL : TIMBER, path);
    return [
      ...slips,
      // G is judged by an E that may be right.
      ...(slips.some((one) => one.pointer === pointer([...path, 'e']))
        ? []
        : shareOfG(entry, isSteel ? 'steel' : 'timber', path)),
      ...aboveMean(entry, path),
      ...strengths(entry['strength'], [...path, 'strength']),
    ];
  });
}

const outside = (
  entry: Entry,
  limits: Readonly<Record<string, Limits>>,
  path: readonly PropertyKey[],
): Fault[] =>
  Object.entries(limits).flatMap(
    ([
      key,
      {
        dimension,
        unit,
        range: [least, most],
      },
    ]) => {
      const value = si(entry, key, dimension);
      if (value === null || (value >= least && value <= most)) return [];
      const [from, to] = [formatQuantity(least, unit), formatQuantity(most, unit)];
      return [fault([...path, key], `Not between ${from} and ${to}. Look at its unit and its digits.`)];
    },
  );

function shareOfG(entry: Entry, of: 'steel' | 'timber', path: readonly PropertyKey[]): Fault[] {
  const [e, g] = [si(entry, 'e', 'modulus'), si(entry, 'g', 'modulus')];
  const [least, most] = SHARE_OF_G[of];
  if (e === null || g === null || (g >= e * least && g <= e * most)) return [];
  const words = `Not between E/${Math.round(1 / least)} and E/${Math.round(1 / most)}. Look at both, and at their units.`;
  return [fault([...path, 'g'], words)];
}

const aboveMean = (entry: Entry, path: readonly PropertyKey[]): Fault[] =>
  AT_MOST.flatMap(([key, mean, dimension, words]) => {
    const [low, high] = [si(entry, key, dimension), si(entry, mean, dimension)];
    return low !== null && high !== null && low > high ? [fault([...path, key], words)] : [];
  });

function strengths(bands: unknown, path: readonly PropertyKey[]): Fault[] {
  const list: readonly unknown[] = Array.isArray(bands) ? bands : [];
  return list.flatMap((band, index) => {
    if (!isEntry(band)) return [];
    const at = [...path, index];
    const [fy, fu] = [si(band, 'fy', 'stress'), si(band, 'fu', 'stress')];
    const isBelow = fy !== null && fu !== null && fu < fy;
    return [
      ...outside(band, { fy: STEEL_STRENGTH, fu: STEEL_STRENGTH }, at),
      ...(isBelow ? [fault([...at, 'fu'], 'The tensile strength is not below the yield strength.')] : []),
    ];
  });
}
