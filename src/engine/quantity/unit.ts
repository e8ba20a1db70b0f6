import { findAtom, type UnitValue } from './atoms';
import {
  DIMENSIONS,
  type Dimension,
  type DimensionName,
  equalDimensions,
  multiplyDimensions,
  raiseDimension,
} from './dimension';

type Factor = { symbol: string; power: number };

/** Angle powers that a unit may carry where the quantity is a stiffness or a change per angle; elsewhere none. */
const ANGLES: Partial<Record<DimensionName, readonly number[]>> = {
  rotation: [1],
  rotational_spring: [0, -1],
  curvature: [0, 1],
};

const TOKEN = /([a-zA-Z°%‰'"]+|1)(?:\.(?![a-zA-Z]))?(?:\^?(-?\d))?/y;
const SEPARATOR = /\s*([·.*×⋅/-]|\s)\s*/y;

/** "kN/m2" into kN¹, m⁻². Each slash divides the one symbol after it. Null where it is no unit. */
function readFactors(text: string): Factor[] | null {
  const factors: Factor[] = [];
  let at = 0;
  let sign = 1;
  for (;;) {
    TOKEN.lastIndex = at;
    const token = TOKEN.exec(text);
    if (!token) return null;
    factors.push({ symbol: token[1] ?? '', power: sign * Number(token[2] ?? 1) });
    at = TOKEN.lastIndex;
    if (at === text.length) return factors;
    SEPARATOR.lastIndex = at;
    const separator = SEPARATOR.exec(text);
    if (!separator) return null;
    at = SEPARATOR.lastIndex;
    sign = separator[1] === '/' ? -1 : 1;
  }
}

/** A run-together product such as kNm: the power belongs to the last symbol, as written. */
function splitProduct({ symbol, power }: Factor): Factor[] {
  const product = /^(kN|MN|N|kip|lb)(mm|cm|m|ft|in)$/i.exec(symbol);
  if (!product || findAtom(symbol)) return [{ symbol, power }];
  return [
    { symbol: product[1] ?? '', power: Math.sign(power) },
    { symbol: product[2] ?? '', power },
  ];
}

function multiplyUnits(a: UnitValue, b: UnitValue, power: number): UnitValue {
  return {
    factor: a.factor * b.factor ** power,
    dimension: multiplyDimensions(a.dimension, raiseDimension(b.dimension, power)),
    angle: a.angle + b.angle * power,
  };
}

const ONE: UnitValue = { factor: 1, dimension: DIMENSIONS.ratio, angle: 0 };

/**
 * Every reading of a unit as people write it: kN/m, kNm, kN·m, kN.m, N/mm2, N/mm², kip-ft, lb/ft, cm⁴, in4,
 * 1/K. More than one only for the pound, a force first and then a mass. Empty where it is no unit.
 */
export function readUnit(text: string): readonly UnitValue[] {
  const written = text
    .normalize('NFKC')
    .replaceAll(/[\u2212\u2010-\u2013]/g, '-')
    .replaceAll('^', '')
    .trim()
    .replace(/^\//, '1/');
  if (written === '') return [ONE];
  let readings: UnitValue[] = [ONE];
  for (const factor of readFactors(written)?.flatMap(splitProduct) ?? [{ symbol: '', power: 1 }]) {
    const atoms = findAtom(factor.symbol) ?? [];
    readings = readings.flatMap((reading) => atoms.map((atom) => multiplyUnits(reading, atom, factor.power)));
  }
  return readings;
}

const fits = (unit: UnitValue, name: DimensionName): boolean =>
  equalDimensions(unit.dimension, DIMENSIONS[name]) && (ANGLES[name] ?? [0]).includes(unit.angle);

export type UnitFault = { code: 'unit_unknown' } | { code: 'unit_wrong_dimension'; dimension: Dimension };

/** SI value of one `text` as a unit of the named quantity. "lb/ft" is 14.59 N/m of a line load and 1.488 kg/m of a mass. */
export function unitFactor(
  text: string,
  name: DimensionName,
): { ok: true; factor: number } | ({ ok: false } & UnitFault) {
  const readings = readUnit(text);
  const fit = readings.find((reading) => fits(reading, name));
  if (fit) return { ok: true, factor: fit.factor };
  const first = readings[0];
  return first
    ? { ok: false, code: 'unit_wrong_dimension', dimension: first.dimension }
    : { ok: false, code: 'unit_unknown' };
}

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const SHOWN: Readonly<Record<string, string>> = {
  C: '°C',
  F: '°F',
  lbf: 'lb',
  lbm: 'lb',
  plf: 'lb/ft',
  klf: 'kip/ft',
  deg: '°',
  'ft-in': '',
};

/** A unit as a person reads it: "cm4" as cm⁴, "lbf/ft" as lb/ft, "C" as °C, "kip-ft" as kip-ft. */
export function unitText(unit: string): string {
  if (Object.hasOwn(SHOWN, unit)) return SHOWN[unit] ?? '';
  return unit
    .replaceAll(/[A-Za-z]+/g, (symbol) => SHOWN[symbol] ?? symbol)
    .replaceAll(/(?<=[a-zA-Z])\d/g, (digit) => SUPERSCRIPTS[Number(digit)] ?? digit);
}
