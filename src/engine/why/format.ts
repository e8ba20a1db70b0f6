import {
  formatFor,
  formatNumber,
  fromUnit,
  type Purpose,
  UNIT_SYSTEMS,
  type UnitSystemName,
  unitText,
} from '../quantity/index';
import type { Compliance, Measure, Trace } from './types';

const NO_BREAK_SPACE = '\u00a0';
/** Figures of what is shown by itself, of what stands in a formula, and of what was given. */
const [FIGURES, WORKING, GIVEN] = [4, 5, 12];

type Unnamed = Compliance | 'acceleration' | 'ratio';

/** Units above and below the line, of what the quantities have no name for. */
const UNITS: Readonly<Record<UnitSystemName, Readonly<Record<Unnamed, readonly [string, string]>>>> = {
  metric: {
    deflection_per_force: ['mm', 'kN'],
    deflection_per_moment: ['mm', 'kNm'],
    rotation_per_force: ['mrad', 'kN'],
    rotation_per_moment: ['mrad', 'kNm'],
    acceleration: ['m', 's2'],
    ratio: ['', ''],
  },
  us: {
    deflection_per_force: ['in', 'kip'],
    deflection_per_moment: ['in', 'kip-ft'],
    rotation_per_force: ['mrad', 'kip'],
    rotation_per_moment: ['mrad', 'kip-ft'],
    acceleration: ['m', 's2'],
    ratio: ['', ''],
  },
};

const isUnnamed = (measure: Measure): measure is Unnamed => measure in UNITS.metric;

/** The unit that a measure is shown in, and its SI value. */
function unitOf(measure: Measure, system: UnitSystemName): { unit: string; factor: number } {
  if (isUnnamed(measure)) {
    const [above, below] = UNITS[system][measure];
    const factor = measure === 'acceleration' ? 1 : fromUnit(1, above) / fromUnit(1, below);
    return { unit: [above, below].filter(Boolean).map(unitText).join('/'), factor };
  }
  const { unit } = UNIT_SYSTEMS[system][measure];
  const written = unit === 'ft-in' ? 'ft' : unit;
  return { unit: unitText(written), factor: fromUnit(1, written) };
}

/** A value with its unit, as pages show it; ratios and what one redundant does to four figures. */
export function formatValue(
  { value, measure }: Pick<Trace, 'value' | 'measure'>,
  system: UnitSystemName,
): string {
  if (!isUnnamed(measure)) return formatFor(value, measure satisfies Purpose, system);
  const { unit, factor } = unitOf(measure, system);
  const number = value / factor;
  const text =
    measure === 'ratio'
      ? formatNumber(Number(number.toPrecision(FIGURES)))
      : formatNumber(number, { significant: FIGURES });
  return unit === '' ? text : `${text}${NO_BREAK_SPACE}${unit}`;
}

const WORKED = ['formula', 'solution', 'root', 'section'];

/** A value as it stands in a formula with numbers: to five figures, and in full where it was given. */
export function workingValue(
  { value, measure, how }: Pick<Trace, 'value' | 'measure' | 'how'>,
  system: UnitSystemName,
): { number: string; unit: string; isNegative: boolean } {
  const { unit, factor } = unitOf(measure, system);
  const figures = WORKED.includes(how.kind) ? WORKING : GIVEN;
  const number = Number((value / factor).toPrecision(figures));
  return { number: formatNumber(Math.abs(number)), unit, isNegative: number < 0 };
}
