import {
  formatFor,
  formatQuantity,
  fromUnit,
  MINUS,
  type Purpose,
  THIN_SPACE,
  UNIT_SYSTEMS,
  type UnitSystemName,
} from '../quantity/index';

const POWERS: Record<string, string> = { '²': '^2', '³': '^3', '⁴': '^4', '⁶': '^6' };

/** A figure with its unit, as the unit system shows its purpose, written for TeX. */
export const texFigure = (value: number, purpose: Purpose, system: UnitSystemName): string =>
  texOf(formatFor(value, purpose, system));

function texOf(quantity: string): string {
  const [number = '', unit = ''] = quantity.split('\u00a0');
  const figure = number.replaceAll(THIN_SPACE, '\\,').replace(MINUS, '-');
  const shown = unit.replaceAll('·', '\\cdot ').replaceAll(/[²³⁴⁶]/g, (sign) => POWERS[sign] ?? sign);
  return unit === '' ? figure : `${figure}\\,\\mathrm{${shown}}`;
}

type Term = { readonly value: number; readonly purpose: Purpose };
const FEWEST = 3;
const MOST = 8;

/** A stress as a quotient and what it comes to: with as many figures as it takes to come to what is shown. */
export function texQuotient(over: Term, under: Term, result: Purpose, system: UnitSystemName): string {
  const unitOf = ({ purpose }: Term) => UNIT_SYSTEMS[system][purpose].unit;
  const written = (term: Term, significant: number) =>
    formatQuantity(term.value, unitOf(term), { significant });
  const readBack = (term: Term, text: string) =>
    fromUnit(Number(text.split('\u00a0')[0]?.replaceAll(THIN_SPACE, '').replace(MINUS, '-')), unitOf(term));
  const shown = formatFor(over.value / under.value, result, system);
  let figures = FEWEST;
  let [top, bottom] = [written(over, figures), written(under, figures)];
  while (
    figures < MOST &&
    formatFor(readBack(over, top) / readBack(under, bottom), result, system) !== shown
  ) {
    figures++;
    [top, bottom] = [written(over, figures), written(under, figures)];
  }
  return `\\frac{${texOf(top)}}{${texOf(bottom)}} = ${texOf(shown)}`;
}
