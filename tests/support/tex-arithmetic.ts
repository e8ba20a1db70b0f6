/**
 * The value of arithmetic written in TeX as a derivation writes it: numbers with thin spaces, + − \times, \dfrac, \sqrt,
 * whole powers, brackets, and integrals of polynomials in x. A small reader of its own, so that what is printed is judged
 * by what is printed.
 */
export function evaluateTex(tex: string): number {
  return new Reader(tex.replaceAll(/\\Big[lr](?=[()])/g, '')).whole();
}

/** Gauss–Legendre on −1 … 1 with five points: exact for polynomials up to the ninth power. */
const GAUSS = [
  [0, 128 / 225],
  [Math.sqrt(5 - 2 * Math.sqrt(10 / 7)) / 3, (322 + 13 * Math.sqrt(70)) / 900],
  [-Math.sqrt(5 - 2 * Math.sqrt(10 / 7)) / 3, (322 + 13 * Math.sqrt(70)) / 900],
  [Math.sqrt(5 + 2 * Math.sqrt(10 / 7)) / 3, (322 - 13 * Math.sqrt(70)) / 900],
  [-Math.sqrt(5 + 2 * Math.sqrt(10 / 7)) / 3, (322 - 13 * Math.sqrt(70)) / 900],
] as const;

class Reader {
  private at = 0;

  constructor(
    private readonly tex: string,
    private readonly x: number | null = null,
  ) {}

  whole(): number {
    const result = this.sum();
    if (this.at < this.tex.length) throw new SyntaxError(`not understood from ${this.at} of ${this.tex}`);
    return result;
  }

  private take(text: string): boolean {
    const found = this.tex.startsWith(text, this.at);
    if (found) this.at += text.length;
    return found;
  }

  private need(text: string): void {
    if (!this.take(text)) throw new SyntaxError(`"${text}" expected at ${this.at} of ${this.tex}`);
  }

  private match(pattern: RegExp): RegExpExecArray | null {
    const found = pattern.exec(this.tex.slice(this.at));
    if (found) this.at += found[0].length;
    return found;
  }

  private sum(): number {
    let total = this.take('-') ? -this.product() : this.product();
    for (;;) {
      if (this.take('+')) total += this.product();
      else if (this.take('-')) total -= this.product();
      else return total;
    }
  }

  private product(): number {
    let total = this.power();
    while (this.take('\\times') || this.isNextFactor()) total *= this.power();
    return total;
  }

  /** Factors of an integrand, and the integral behind a fraction, stand side by side. */
  private isNextFactor(): boolean {
    const rest = this.tex.slice(this.at);
    if (this.x !== null && /^\\,(?=[(x\d])/.test(rest)) return this.take('\\,');
    return /^(?:\\int|[x(])/.test(rest);
  }

  private power(): number {
    const base = this.atom();
    if (!this.take('^')) return base;
    const [, braced, plain] = this.match(/^(?:\{(-?\d+)\}|(\d))/) ?? [];
    if (braced === undefined && plain === undefined)
      throw new SyntaxError(`an exponent expected at ${this.at} of ${this.tex}`);
    return base ** Number(braced ?? plain);
  }

  private atom(): number {
    if (this.take('(')) {
      const inside = this.sum();
      this.need(')');
      return inside;
    }
    if (this.take('\\dfrac{')) {
      const top = this.sum();
      this.need('}{');
      const bottom = this.sum();
      this.need('}');
      return top / bottom;
    }
    if (this.take('\\sqrt{')) {
      const inside = this.sum();
      this.need('}');
      return Math.sqrt(inside);
    }
    if (this.take('\\int_{')) return this.integral();
    if (this.x !== null && this.take('x')) return this.x;
    const [number] = this.match(/^\d+(?:\\,\d{3})*(?:\.\d+)?/) ?? [];
    if (number === undefined) throw new SyntaxError(`a number expected at ${this.at} of ${this.tex}`);
    return Number(number.replaceAll('\\,', ''));
  }

  private integral(): number {
    const from = this.sum();
    this.need('}^{');
    const to = this.sum();
    this.need('}');
    const end = this.tex.indexOf('\\,dx', this.at);
    if (end < 0) throw new SyntaxError(`dx expected after ${this.at} of ${this.tex}`);
    const integrand = this.tex.slice(this.at, end);
    this.at = end + '\\,dx'.length;
    const [middle, half] = [(from + to) / 2, (to - from) / 2];
    const at = (x: number) => (integrand === '' ? 1 : new Reader(integrand, x).whole());
    return GAUSS.reduce((total, [place, weight]) => total + half * weight * at(middle + half * place), 0);
  }
}

/** How many of a handed-on unit are in one that the closed forms come in, by what changes: m is mm, ft is in. */
const HANDED_ON: Readonly<Record<string, readonly [string, number]>> = {
  m: ['mm', 1000],
  ft: ['in', 12],
  rad: ['mrad', 1000],
};

/** "kip-ft^2" as a derivation's unit writes it, from \mathrm{kip\text{-}ft^2}. */
const unitIn = (mathrm: string): string => mathrm.replaceAll('\\text{-}', '-').replaceAll('^', '');

/** What one of the written unit is of the displayed one. */
function factorBetween(written: string, shown: string): number {
  if (written === shown) return 1;
  const [head = '', ...rest] = written.split('/');
  const [small, factor] = HANDED_ON[head] ?? ['', Number.NaN];
  const handed = [small, ...rest].join('/');
  if (handed !== shown) throw new Error(`${written} is not handed on as ${shown}`);
  return factor;
}

const WITH_UNIT = /^(.*?)\\,\\mathrm\{((?:[^{}]|\{[^{}]*\})*)\}$/;

/**
 * What the numbers of a step come to, in its display unit: the arithmetic, and its own result after "=" if any. The
 * arithmetic is in the unit of that result.
 */
export function recalculate(numbers: string, unit: string): { arithmetic: number; result: number | null } {
  const parts = numbers.split('=');
  const last = WITH_UNIT.exec(parts.at(-1) ?? '');
  // A result of nothing is not written, nor is its unit.
  const factor = last ? factorBetween(unitIn(last[2] ?? ''), unit) : 1;
  const read = (text: string) => evaluateTex(WITH_UNIT.exec(text)?.[1] ?? text) * factor;
  return {
    arithmetic: read(parts[0] ?? ''),
    result: parts.length > 1 ? read(parts.at(-1) ?? '') : null,
  };
}

/** The number that a screen shows: narrow spaces, a true minus, a power of ten in superscripts. */
export function readShown(display: string): { value: number; lastDigit: number } {
  const [, mantissa = display, power = ''] = /^(.*?)(?:×10([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+))?$/.exec(display) ?? [];
  const digits = mantissa.replaceAll('\u202f', '').replace('\u2212', '-');
  const exponent = Number([...power].map((c) => (c === '⁻' ? '-' : '⁰¹²³⁴⁵⁶⁷⁸⁹'.indexOf(c))).join('') || '0');
  const decimals = digits.split('.')[1]?.length ?? 0;
  return { value: Number(digits) * 10 ** exponent, lastDigit: 10 ** (exponent - decimals) };
}

/** The number in TeX that stands alone, and its last digit. */
export function readNumber(tex: string): { value: number; lastDigit: number } {
  const text = WITH_UNIT.exec(tex)?.[1] ?? tex;
  const [mantissa = '', power = '0'] = text.split('\\times10^');
  const decimals = mantissa.split('.')[1]?.replaceAll('\\,', '').length ?? 0;
  const exponent = Number(power.replaceAll(/[{}]/g, ''));
  return { value: evaluateTex(text), lastDigit: 10 ** (exponent - decimals) };
}

/** The lines of an aligned display; one line is itself. */
export function linesOf(tex: string): { left: string; right: string }[] {
  const inside = tex.replace('\\begin{aligned}', '').replace('\\end{aligned}', '');
  return inside.split('\\\\[3pt]').map((line) => {
    const [left = '', ...right] = line.replace('&', '').split('=');
    return { left, right: right.join('=') };
  });
}

/** Coefficients of an equation's left side by the letter they stand before: 3.6R_{A}-0.9M_{A}. */
export function readEquation({ left, right }: { left: string; right: string }): {
  coefficients: Map<string, number>;
  right: number;
} {
  const terms = [
    ...left.matchAll(/([+-]?)((?:\d+(?:\\,\d{3})*(?:\.\d+)?)?(?:\\times10\^\{-?\d+\})?)([A-Z]_\{\w+\})/g),
  ];
  if (terms.map(([term]) => term).join('') !== left) throw new SyntaxError(`no equation: ${left}`);
  const coefficients = new Map(
    terms.map(([, sign, number = '', letter = '']) => [
      letter,
      (sign === '-' ? -1 : 1) * (number === '' ? 1 : evaluateTex(number)),
    ]),
  );
  return { coefficients, right: readNumber(right).value };
}

/** The entries of a bmatrix. */
export function readMatrix(tex: string): { value: number; lastDigit: number }[][] {
  const [, inside] = /^\\begin\{bmatrix\}(.*)\\end\{bmatrix\}$/.exec(tex) ?? [];
  if (inside === undefined) throw new SyntaxError(`no matrix: ${tex}`);
  return inside.split('\\\\').map((row) => row.split('&').map(readNumber));
}

/** A small system by Gauss elimination with pivots: a check of what is printed, with no code of the engine. */
export function solveSystem(matrix: readonly (readonly number[])[], right: readonly number[]): number[] {
  const rows = matrix.map((row, i) => [...row, right[i] ?? Number.NaN]);
  const n = rows.length;
  for (let k = 0; k < n; k++) {
    let best = k;
    for (let r = k + 1; r < n; r++) if (Math.abs(rows[r]![k]!) > Math.abs(rows[best]![k]!)) best = r;
    [rows[k], rows[best]] = [rows[best]!, rows[k]!];
    for (let r = 0; r < n; r++) {
      if (r === k) continue;
      const factor = rows[r]![k]! / rows[k]![k]!;
      for (let c = k; c <= n; c++) rows[r]![c]! -= factor * rows[k]![c]!;
    }
  }
  return rows.map((row, k) => row[n]! / row[k]!);
}
