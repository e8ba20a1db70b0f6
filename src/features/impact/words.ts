import {
  formatNumber,
  formatQuantity,
  MINUS,
  type Purpose,
  UNIT_SYSTEMS,
  type UnitSystemName,
} from '@/engine/quantity';

/** Enough to see a change of a thousandth. */
const FIGURES = 4;
/** What two ways of calculating one figure have in common: they are not to be rounded apart. */
const COMMON = 12;

/** A figure of which a small change is to be seen: "33.28 kN". */
export const figureText = (value: number | null, purpose: Purpose, system: UnitSystemName): string =>
  value === null
    ? '–'
    : formatQuantity(Number(value.toPrecision(COMMON)), UNIT_SYSTEMS[system][purpose].unit, {
        significant: FIGURES,
      });

/** "+1.0 %", "−12 %"; a dash where there is nothing to measure by. */
export function shareText(share: number | null): string {
  if (share === null) return '–';
  const text = formatNumber(100 * Math.abs(share), { significant: 2 });
  return `${share < 0 ? MINUS : '+'}${text} %`;
}

export const ratioText = (ratio: number | null): string =>
  ratio === null ? '–' : formatNumber(ratio, { places: 3 });

/** "passes, then fails": what a check does with the one and with the other. */
export function turnText(from: number | null, to: number | null): string {
  const does = (ratio: number | null) => (ratio === null ? 'is not made' : ratio <= 1 ? 'passes' : 'fails');
  return `${does(from)}, then ${does(to)}`;
}
