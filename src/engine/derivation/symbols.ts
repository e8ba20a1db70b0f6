import { type Expression, evaluate, symbol, type Writer } from '../chart/index';
import { formatNumber, fromUnit } from '../quantity/index';

/** Kinds of symbol, with the unit each is written in where movements are in m and rad, and where in mm and mrad. */
const UNITS = {
  line: ['kN/m', 'kN/m'],
  force: ['kN', 'kN'],
  moment: ['kNm', 'kNm'],
  curvature: ['1/m', '1/m'],
  length: ['m', 'm'],
  deflection: ['m', 'mm'],
  rotation: ['rad', 'mrad'],
  'deflection per force': ['m/kN', 'mm/kN'],
  'deflection per moment': ['m/kNm', 'mm/kNm'],
  'rotation per force': ['rad/kN', 'mrad/kN'],
  'rotation per moment': ['rad/kNm', 'mrad/kNm'],
  'force per deflection': ['kN/m', 'kN/mm'],
  'force per rotation': ['kN/rad', 'kN/mrad'],
  'moment per deflection': ['kNm/m', 'kNm/mm'],
  'moment per rotation': ['kNm/rad', 'kNm/mrad'],
  spring: ['kN/m', 'kN/m'],
  'rotational spring': ['kNm/rad', 'kNm/rad'],
  shear: ['kN', 'kN'],
  bending: ['kNm2', 'kNm2'],
  number: ['', ''],
} as const;

export type Kind = keyof typeof UNITS;
const KINDS = Object.keys(UNITS);
/** Movements in m and rad, as the closed forms give them; or in mm and mrad, as results are handed on. */
export type Scale = 'metre' | 'milli';

export const unitOf = (kind: Kind, scale: Scale): string => UNITS[kind][scale === 'metre' ? 0 : 1];

/** SI value of 1 of each unit: read once, not at every number. */
const FACTORS: ReadonlyMap<string, number> = new Map(
  Object.values(UNITS)
    .flat()
    .map((unit) => [unit, fromUnit(1, unit)]),
);

/** An SI value in one of the derivation's units. */
export const inUnit = (si: number, unit: string): number => si / (FACTORS.get(unit) ?? Number.NaN);

/** SI of a value in one of the derivation's units. */
export const toSi = (value: number, unit: string): number => value * (FACTORS.get(unit) ?? Number.NaN);

/** A letter of the derivation: its TeX is its name. `given`: to be explained; not a result, and not on the drawing. */
export type Letter = { tex: string; value: number; kind: Kind; given: boolean };

/** Every letter with its SI value. In a product they stand in the order of UNITS: loads, lengths, stiffness. */
export class Letters {
  private readonly found = new Map<string, Letter>();

  /** The letter as an expression; null where the same letter already stands for another value. */
  add(tex: string, value: number, kind: Kind, given = false): Expression | null {
    const known = this.found.get(tex);
    if (known && (known.kind !== kind || Math.abs(known.value - value) > 1e-12 * Math.abs(value)))
      return null;
    if (!known) this.found.set(tex, { tex, value, kind, given });
    return symbol(tex);
  }

  /** A letter that nothing else may carry. */
  define(tex: string, value: number, kind: Kind, given = false): Expression {
    const added = this.add(tex, value, kind, given);
    if (!added) throw new RangeError(`the letter ${tex} stands for two things`);
    return added;
  }

  /** The letter with the next free number: L_1, L_2 … */
  number(letter: string, value: number, kind: Kind): Expression {
    for (let k = 1; ; k++) {
      const tex = k < 10 ? `${letter}_${k}` : `${letter}_{${k}}`;
      if (!this.found.has(tex)) return this.define(tex, value, kind, true);
    }
  }

  readonly value = (tex: string): number => this.letter(tex).value;

  of(expression: Expression): number {
    return evaluate(expression, this.value);
  }

  letter(tex: string): Letter {
    const letter = this.found.get(tex);
    if (!letter) throw new RangeError(`no letter ${tex} was introduced`);
    return letter;
  }

  givens(): Letter[] {
    return [...this.found.values()].filter(({ given }) => given);
  }

  readonly rank = (tex: string): number => KINDS.indexOf(this.letter(tex).kind);

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

  /** The value that `numbers` writes. */
  shown(tex: string, scale: Scale, figures: number): number {
    const { value, kind } = this.letter(tex);
    return Number(inUnit(value, unitOf(kind, scale)).toPrecision(figures));
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
