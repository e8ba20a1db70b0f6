const NEAR = 0.03; // a slip of units leaves the value itself, so the factor is met within the table's own rounding
const POUND_PER_FOOT = 1.48816; // kg/m
const UNITS: Readonly<Record<number, string>> = { 1: '', 2: '²', 3: '³', 4: '⁴', 6: '⁶' };

const isNear = (ratio: number, factor: number) => Math.abs(ratio / factor - 1) < NEAR;

/** "mm⁴ for cm⁴", or the bare power of ten. Null where the ratio is none. */
function powerOfTen(ratio: number, power: number): string | null {
  const exponent = Math.round(Math.log10(ratio));
  if (exponent === 0 || !isNear(ratio, 10 ** exponent)) return null;
  const sup = UNITS[power];
  if (sup !== undefined && power > 0) {
    if (exponent === power) return `The value looks like mm${sup} under a heading of cm${sup}`;
    if (exponent === -power)
      return `The value looks like dm${sup} under a heading of cm${sup}, or cm${sup} under mm${sup}`;
  }
  const times = Math.abs(exponent);
  return `The value is 10^${times} times too ${exponent > 0 ? 'large' : 'small'}: look at the unit of its heading`;
}

/** "in⁴ for cm⁴" and the like; the slip may go either way, and the heading may be in mm or in cm. */
function inches(ratio: number, power: number): string | null {
  if (power === 0) {
    if (isNear(ratio, 1 / POUND_PER_FOOT)) return 'The value looks like lb/ft under a heading of kg/m';
    return isNear(ratio, POUND_PER_FOOT) ? 'The value looks like kg/m under a heading of lb/ft' : null;
  }
  const sup = UNITS[power] ?? '';
  for (const [unit, factor] of [
    ['mm', 25.4 ** power],
    ['cm', 2.54 ** power],
  ] as const) {
    if (isNear(ratio, 1 / factor)) return `The value looks like in${sup} under a heading of ${unit}${sup}`;
    if (isNear(ratio, factor)) return `The value looks like ${unit}${sup} under a heading of in${sup}`;
  }
  return null;
}

/**
 * The slip of units that explains a value `ratio` times its expected one; `power` is that of the length in it (4 of
 * a second moment, 0 of a mass). Null where no slip does.
 */
export function slipCause(ratio: number, power: number): string | null {
  if (!(ratio > 0)) return null;
  return powerOfTen(ratio, power) ?? inches(ratio, power);
}
