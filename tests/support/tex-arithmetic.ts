/**
 * The value of arithmetic written in TeX as a derivation writes it: numbers with thin spaces, + − \times, \dfrac, whole
 * powers, brackets. A small reader of its own, so that what is printed is judged by what is printed.
 */
export function evaluateTex(tex: string): number {
  let at = 0;
  const take = (text: string) => {
    const found = tex.startsWith(text, at);
    if (found) at += text.length;
    return found;
  };
  const need = (text: string) => {
    if (!take(text)) throw new SyntaxError(`"${text}" expected at ${at} of ${tex}`);
  };
  const sum = (): number => {
    let total = take('-') ? -product() : product();
    for (;;) {
      if (take('+')) total += product();
      else if (take('-')) total -= product();
      else return total;
    }
  };
  const product = (): number => {
    let total = power();
    while (take('\\times')) total *= power();
    return total;
  };
  const power = (): number => {
    const base = atom();
    if (!take('^')) return base;
    const [, braced, plain] = /^(?:\{(-?\d+)\}|(\d))/.exec(tex.slice(at)) ?? [];
    if (braced === undefined && plain === undefined)
      throw new SyntaxError(`an exponent expected at ${at} of ${tex}`);
    at += braced === undefined ? 1 : braced.length + 2;
    return base ** Number(braced ?? plain);
  };
  const atom = (): number => {
    if (take('(')) {
      const inside = sum();
      need(')');
      return inside;
    }
    if (take('\\dfrac{')) {
      const top = sum();
      need('}{');
      const bottom = sum();
      need('}');
      return top / bottom;
    }
    const [number] = /^\d+(?:\\,\d{3})*(?:\.\d+)?/.exec(tex.slice(at)) ?? [];
    if (number === undefined) throw new SyntaxError(`a number expected at ${at} of ${tex}`);
    at += number.length;
    return Number(number.replaceAll('\\,', ''));
  };
  const result = sum();
  if (at < tex.length) throw new SyntaxError(`not understood from ${at} of ${tex}`);
  return result;
}

/** 1000 of these is 1 of the unit that the closed forms come in. */
const HANDED_ON: Readonly<Record<string, string>> = {
  m: 'mm',
  rad: 'mrad',
  'm/kN': 'mm/kN',
  'm/kNm': 'mm/kNm',
  'rad/kN': 'mrad/kN',
  'rad/kNm': 'mrad/kNm',
};

/** What the numbers of a step come to, in its display unit: the arithmetic, and its own result after "=" if any. */
export function recalculate(numbers: string, unit: string): { arithmetic: number; result: number | null } {
  const [left = '', right] = numbers.split('=');
  const value = (text: string) => {
    const [, number = text, written] = /^(.*?)\\,\\mathrm\{(.*)\}$/.exec(text) ?? [];
    const inMetres = written === undefined ? right !== undefined : HANDED_ON[written] === unit;
    if (written !== undefined && !inMetres && written !== unit)
      throw new Error(`${written} is not handed on as ${unit}`);
    return evaluateTex(number) * (inMetres ? 1000 : 1);
  };
  return { arithmetic: value(left), result: right === undefined ? null : value(right) };
}

/** The number that a screen shows: narrow spaces, a true minus, a power of ten in superscripts. */
export function readShown(display: string): { value: number; lastDigit: number } {
  const [, mantissa = display, power = ''] = /^(.*?)(?:×10([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+))?$/.exec(display) ?? [];
  const digits = mantissa.replaceAll('\u202f', '').replace('\u2212', '-');
  const exponent = Number([...power].map((c) => (c === '⁻' ? '-' : '⁰¹²³⁴⁵⁶⁷⁸⁹'.indexOf(c))).join('') || '0');
  const decimals = digits.split('.')[1]?.length ?? 0;
  return { value: Number(digits) * 10 ** exponent, lastDigit: 10 ** (exponent - decimals) };
}
