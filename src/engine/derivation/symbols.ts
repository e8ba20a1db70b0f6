import { type Expression, evaluate, symbol, type Writer } from '../chart/index';
import { formatNumber } from '../quantity/index';
import { inUnit, type Kind, rankOf, type Scale, type Units } from './units';

/** Given: to be explained first. Drawn: a parameter or a length that the drawing explains. Found: a result. */
type Role = 'given' | 'drawn' | 'found';

/** A letter of the derivation: its TeX is its name; the value is SI. */
export type Letter = { tex: string; value: number; kind: Kind; role: Role };

/** A given number of no more figures than this is written in full. */
export const AS_GIVEN = 6;
/** Else to so many at least. */
const ROUNDED = 5;
/** What a change of units leaves of an exact number. */
const NOISE = 1e-11;

/** Every letter with its SI value. In a product they stand in the order of their kinds: loads, lengths, stiffness. */
export class Letters {
  private readonly found = new Map<string, Letter>();

  constructor(readonly units: Units) {}

  /** The letter as an expression; null where the same letter already stands for another value. */
  add(tex: string, value: number, kind: Kind, role: Role = 'drawn'): Expression | null {
    const known = this.found.get(tex);
    if (known && (known.kind !== kind || Math.abs(known.value - value) > 1e-12 * Math.abs(value)))
      return null;
    if (!known) this.found.set(tex, { tex, value, kind, role });
    return symbol(tex);
  }

  /** A letter that nothing else may carry. */
  define(tex: string, value: number, kind: Kind, role: Role = 'found'): Expression {
    const added = this.add(tex, value, kind, role);
    if (!added) throw new RangeError(`the letter ${tex} stands for two things`);
    return added;
  }

  /** The letter with the next free number: L_1, L_2 … */
  number(letter: string, value: number, kind: Kind): Expression {
    for (let k = 1; ; k++) {
      const tex = k < 10 ? `${letter}_${k}` : `${letter}_{${k}}`;
      if (!this.found.has(tex)) return this.define(tex, value, kind, 'given');
    }
  }

  has(tex: string): boolean {
    return this.found.has(tex);
  }

  readonly value = (tex: string): number => this.letter(tex).value;

  of(expression: Expression): number {
    return evaluate(expression, this.value);
  }

  /** The size of the largest of a sum's terms. */
  largest(expression: Expression): number {
    return expression.reduce((largest, term) => Math.max(largest, Math.abs(this.of([term]))), 0);
  }

  letter(tex: string): Letter {
    const letter = this.found.get(tex);
    if (!letter) throw new RangeError(`no letter ${tex} was introduced`);
    return letter;
  }

  givens(): Letter[] {
    return [...this.found.values()].filter(({ role }) => role === 'given');
  }

  readonly rank = (tex: string): number => rankOf(this.letter(tex).kind);

  symbols(): Writer {
    return { atom: (tex) => ({ tex }), times: '', rank: this.rank };
  }

  /** Values to so many significant figures, in the units of the scale. */
  numbers(scale: Scale, figures: number): Writer {
    const atom = (tex: string) => {
      const shown = this.shown(tex, scale, figures);
      return { tex: numberTex(Math.abs(shown)), negative: shown < 0 };
    };
    return { atom, times: '\\times', rank: this.rank };
  }

  /** The value that `numbers` writes: what was given as it was given, what was found to so many figures. */
  shown(tex: string, scale: Scale, figures: number): number {
    const { value, kind, role } = this.letter(tex);
    const own = inUnit(value, this.units.of(kind, scale));
    if (role === 'found') return Number(own.toPrecision(figures));
    const written = Number(own.toPrecision(AS_GIVEN));
    const isExact = Math.abs(written - own) <= NOISE * Math.abs(own);
    return isExact ? written : Number(own.toPrecision(Math.max(ROUNDED, figures)));
  }
}

/** A number as TeX: thousands parted by a thin space, a power of ten where the screen has one. */
export function numberTex(value: number): string {
  return toTex(formatNumber(value));
}

/** What the screen shows, as TeX. */
export function toTex(text: string): string {
  const superscripts = '⁰¹²³⁴⁵⁶⁷⁸⁹';
  return text
    .replaceAll('\u202f', '\\,')
    .replace('\u2212', '-')
    .replace(/×10([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)$/, (_, power: string) => {
      const digits = [...power].map((c) => (c === '⁻' ? '-' : superscripts.indexOf(c))).join('');
      return `\\times10^{${digits}}`;
    });
}
