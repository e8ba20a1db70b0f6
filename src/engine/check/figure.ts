import { formatFor, type Purpose, THIN_SPACE, type UnitSystemName } from '../quantity/index';

const POWERS: Record<string, string> = { '²': '^2', '³': '^3', '⁴': '^4', '⁶': '^6' };

/** A figure with its unit, as the unit system shows its purpose, written for TeX. */
export function texFigure(value: number, purpose: Purpose, system: UnitSystemName): string {
  const [number = '', unit = ''] = formatFor(value, purpose, system).split('\u00a0');
  const figure = number.replaceAll(THIN_SPACE, '\\,').replace('\u2212', '-');
  const shown = unit.replaceAll('·', '\\cdot ').replaceAll(/[²³⁴⁶]/g, (sign) => POWERS[sign] ?? sign);
  return unit === '' ? figure : `${figure}\\,\\mathrm{${shown}}`;
}
