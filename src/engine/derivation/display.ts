import { formatNumber } from '../quantity/index';
import { AS_GIVEN, numberTex, toTex } from './symbols';
import { inUnit, unitTex } from './units';

/** Figures of a result, and of the numbers it is shown to come from unless they need more. */
export const FIGURES = 4;
/** A result this small beside its largest term is what is left of a difference, and shows that term's decimals. */
const REMAINDER = 1e-3;

/**
 * An SI value in the unit, as the screen shows it: to four figures, all of a whole number's; or, where its terms cancel,
 * to the decimals that four figures of the largest of them have.
 */
export function display(si: number, unit: string, largest = Math.abs(si)): string {
  return shown(inUnit(si, unit), Math.abs(inUnit(largest, unit)), FIGURES);
}

/** The same for maths mode, with the unit; to as many figures as `like`, a display of it in another unit, has. */
export function withUnit(si: number, unit: string, largest = Math.abs(si), like = ''): string {
  const figures = Math.max(FIGURES, like.replace(/[.,].*/, '').replaceAll(/\D/g, '').length);
  const text = shown(inUnit(si, unit), Math.abs(inUnit(largest, unit)), figures);
  return `${toTex(text)}\\,${unitTex(unit)}`;
}

/** Below the noise of arithmetic: 11.025 found in two ways must round one way. */
const EXACT = 12;

function shown(found: number, reference: number, figures: number): string {
  const value = Number(found.toPrecision(EXACT));
  if (Math.abs(value) > REMAINDER * reference) return formatNumber(value, { significant: figures });
  const places = reference === 0 ? 0 : Math.max(0, figures - 1 - Math.floor(Math.log10(reference)));
  return formatNumber(Math.abs(value) < 0.5 * 10 ** -places ? 0 : value, { places });
}

/** A value as it was given, without what a change of units leaves of it; with its unit, for maths mode. */
export const given = (si: number, unit: string): string =>
  `${numberTex(Number(inUnit(si, unit).toPrecision(AS_GIVEN)))}\\,${unitTex(unit)}`;

/** A place along the beam, in words. */
export function placeWords(x: number, unit: string): string {
  return `${formatNumber(Number(inUnit(x, unit).toFixed(3)))} ${unit} from the left end`;
}
