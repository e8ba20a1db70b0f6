import type { Mapping } from './contract';
import { planOf } from './plan';
import { readRow } from './reading';
import type { FileLine } from './stream';

const LIGHTEST = 300; // kg/m³ of woods that are built with
const HEAVIEST = 1100;
const FEW = 3;
const SPREAD = 0.03;

/** Density that the masses of a table of timber stand for, kg/m³ to three figures; null of anything else. */
export function timberDensity(mapping: Mapping, rows: readonly FileLine[]): number | null {
  const plan = planOf(mapping, []);
  const densities = rows
    .map((line) => readRow(line, plan))
    .flatMap(({ shape, values: { mass, h, b } }) =>
      shape === 'rectangle' && mass !== undefined && h !== undefined && b !== undefined
        ? [mass / (h * b)]
        : [],
    )
    .sort((a, b) => a - b);
  const middle = densities[Math.floor(densities.length / 2)] ?? 0;
  const isTimber = densities.length >= FEW && middle > LIGHTEST && middle < HEAVIEST;
  const agreeing = densities.filter((density) => Math.abs(density / middle - 1) < SPREAD).length;
  return isTimber && agreeing >= 0.8 * densities.length ? Number(middle.toPrecision(3)) : null;
}
