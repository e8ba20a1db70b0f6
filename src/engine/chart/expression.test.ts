import { describe, expect, test } from 'vitest';
import {
  add,
  divide,
  evaluate,
  expand,
  multiply,
  power,
  substitute,
  subtract,
  symbol,
  symbolsOf,
} from './expression';
import { formula } from './formula';
import { texOf } from './tex';

const tex = (text: string) => texOf(formula(text));

describe('formula', () => {
  test('keeps the factors that it was given', () => {
    expect(tex('P*a^2*(3*L-a)/(6*EI)')).toBe('\\dfrac{Pa^2\\,(3L-a)}{6EI}');
  });

  test('takes decimals as exact fractions', () => {
    expect(tex('0.25*L')).toBe('\\dfrac{L}{4}');
  });

  test('collects like terms and drops what cancels', () => {
    expect(tex('a*b + 2*b*a - c + c')).toBe('3ab');
    expect(tex('a - a')).toBe('0');
  });

  test.each(['', '2*', '(a', 'a)', 'a^b', '2 $ 3', 'a b'])('"%s" is refused as SyntaxError', (text) => {
    expect(() => formula(text)).toThrow(SyntaxError);
  });

  test('refuses to divide by zero', () => {
    expect(() => formula('a/(b-b)')).toThrow(RangeError);
  });
});

describe('substitute', () => {
  test('collects the sums that it reaches: the chart at x = L is wL⁴/8EI', () => {
    const chart = formula('w*x^2*(6*L^2-4*L*x+x^2)/(24*EI)');
    expect(texOf(substitute(chart, { x: symbol('L') }))).toBe('\\dfrac{wL^4}{8EI}');
  });

  test('puts a sum in as a factor where it multiplies and as terms where it is added', () => {
    const chart = formula('P*b^2*(3*L-b)/(6*EI)');
    expect(texOf(substitute(chart, { b: formula('L-a') }))).toBe('\\dfrac{P\\,(L-a)^2\\,(2L+a)}{6EI}');
  });

  test('vanishes where the sum does', () => {
    expect(substitute(formula('P*x*(L-x)'), { x: symbol('L') })).toEqual([]);
  });
});

describe('division', () => {
  test('of a gap by a flexibility gives the textbook’s redundant', () => {
    const gap = formula('w*L^4/(8*EI) + w*a*L^3/(3*EI) + w*a^2*L^2/(4*EI)');
    const flexibility = formula('L^3/(3*EI)');
    expect(texOf(divide(gap, flexibility))).toBe('\\dfrac{3wL}{8}+wa+\\dfrac{3wa^2}{4L}');
  });

  test('by a plain sum keeps the sum below the line, its common factor cancelled', () => {
    expect(texOf(divide(formula('w*L^3/24'), formula('L/3+b/3')))).toBe('\\dfrac{wL^3}{8\\,(L+b)}');
  });

  test('by a sum of fractions with factors is refused', () => {
    expect(() => divide(symbol('a'), add(formula('b/(c+d)'), symbol('e')))).toThrow(RangeError);
  });
});

describe('algebra and arithmetic agree', () => {
  const values: Record<string, number> = { a: 1.7, b: -0.6, c: 3.1, d: 0.45 };
  const value = (name: string) => values[name] ?? Number.NaN;
  const x = formula('a^2*(3*b-c)/(4*d)');
  const y = formula('(a+b)^3/c - d');

  test.each([
    ['sum', add(x, y), () => evaluate(x, value) + evaluate(y, value)],
    ['difference', subtract(x, y), () => evaluate(x, value) - evaluate(y, value)],
    ['product', multiply(x, y), () => evaluate(x, value) * evaluate(y, value)],
    ['quotient', divide(y, x), () => evaluate(y, value) / evaluate(x, value)],
    ['cube', power(y, 3), () => evaluate(y, value) ** 3],
    ['expansion', expand(formula('(a+b)^2*(c-d)')), () => (1.7 - 0.6) ** 2 * (3.1 - 0.45)],
  ] as const)('of a %s', (_, expression, want) => {
    expect(Math.abs(evaluate(expression, value) / want() - 1)).toBeLessThan(1e-11);
  });

  test('symbolsOf names each symbol once', () => {
    expect(symbolsOf(x).sort()).toEqual(['a', 'b', 'c', 'd']);
  });
});

describe('texOf', () => {
  test('writes subscripts and Greek letters, and keeps a control word off the next letter', () => {
    expect(tex('kappa*L1^2/(2*w_2)')).toBe('\\dfrac{\\kappa L_{1}^2}{2w_{2}}');
  });

  test('with numbers multiplies by a cross and gives a negative number’s sign to its term', () => {
    const writer = {
      atom: (name: string) =>
        ({ a: { tex: '2.5' }, b: { tex: '4', negative: true }, c: { tex: '33\\,180' } })[name]!,
      times: '\\times' as const,
    };
    expect(texOf(formula('a*b - a*b^3/c^2 + b^2*(a-b)'), writer)).toBe(
      '-2.5\\times4+\\dfrac{2.5\\times4^3}{(33\\,180)^2}+4^2\\times(2.5+4)',
    );
  });
});
