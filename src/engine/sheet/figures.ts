import {
  formatFeetInches,
  formatFor,
  formatNumber,
  type Purpose,
  toUnit,
  UNIT_SYSTEMS,
  type UnitSystemName,
  unitText,
} from '../quantity/index';

/** Figures of one unit system, as a sheet prints them. */
export type Figures = ReturnType<typeof figuresOf>;

/** The unit of a purpose; none where the figure carries its own marks, as feet and inches do. */
const unitIn = (unit: string): string => (unit === 'ft-in' ? '' : unitText(unit));

export function figuresOf(system: UnitSystemName) {
  const shown = (purpose: Purpose) => UNIT_SYSTEMS[system][purpose];
  return {
    system,
    /** The figure alone, rounded as its purpose is. */
    value(si: number, purpose: Purpose): string {
      const { unit, ...rounding } = shown(purpose);
      return unit === 'ft-in' ? formatFeetInches(si) : formatNumber(toUnit(si, unit), rounding);
    },
    unit: (purpose: Purpose): string => unitIn(shown(purpose).unit),
    /** Figure and unit, kept together. */
    whole: (si: number, purpose: Purpose): string => formatFor(si, purpose, system),
  };
}

/** A given value exactly as it was given, in a unit of the system: value and unit. */
export const exactly = (si: number, unit: string): [value: string, unit: string] => [
  unit === 'ft-in' ? formatFeetInches(si) : formatNumber(toUnit(si, unit)),
  unitIn(unit),
];

/** A share such as a residual: "2×10⁻¹²". */
export const shareText = (share: number): string =>
  share === 0 ? '0' : formatNumber(share, { significant: 1 });
