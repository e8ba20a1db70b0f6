import { describe, expect, test } from 'vitest';
import { cantileverTerms } from './cantilever';
import {
  divide,
  evaluate,
  expand,
  expandable,
  multiply,
  negate,
  oriented,
  power,
  powerOf,
  simplest,
  symbol,
} from './expression';
import { formula } from './formula';
import { common, fromDecimal, raised, rational, sum } from './rational';
import { CHART } from './register';
import { compare } from './setting';
import { texOf } from './tex';

const VALUES: Record<string, number> = { a: 1.7, b: 0.6, c: 3.1, d: 0.45, L: 2.1 };
const value = (name: string) => VALUES[name] ?? Number.NaN;
const tex = (expression: ReturnType<typeof formula>) => texOf(expression);

describe('rational', () => {
  test('adds over a common denominator', () => {
    expect(sum(rational(1, 2), rational(1, 3))).toEqual({ n: 5, d: 6 });
    expect(sum(rational(3, 4), rational(-1, 4))).toEqual({ n: 1, d: 2 });
  });

  test('keeps the sign above the line', () => {
    expect(rational(3, -6)).toEqual({ n: -1, d: 2 });
  });

  test('is raised to powers above and below zero', () => {
    expect(raised(rational(2, 3), 3)).toEqual({ n: 8, d: 27 });
    expect(raised(rational(2, 3), -3)).toEqual({ n: 27, d: 8 });
    expect(raised(rational(-2, 3), -2)).toEqual({ n: 9, d: 4 });
    expect(raised(rational(2, 3), 0)).toEqual({ n: 1, d: 1 });
  });

  test('has a largest common part', () => {
    expect(common(rational(4, 9), rational(10, 6))).toEqual({ n: 1, d: 9 });
    expect(common(rational(-8), rational(12))).toEqual({ n: 4, d: 1 });
  });

  test('reads decimals as written', () => {
    expect(fromDecimal('12.50')).toEqual({ n: 25, d: 2 });
    expect(fromDecimal('7')).toEqual({ n: 7, d: 1 });
  });

  test.each([
    [1, 0],
    [0.5, 1],
    [2 ** 53, 1],
  ])('refuses %s/%s', (n, d) => {
    expect(() => rational(n, d)).toThrow(RangeError);
  });
});

describe('formula', () => {
  test('reads powers below zero', () => {
    expect(evaluate(formula('3*a^-2'), value)).toBeCloseTo(3 / 1.7 ** 2, 14);
    expect(tex(formula('a^-2'))).toBe('\\dfrac{1}{a^2}');
  });

  test('says where it does not understand', () => {
    expect(() => formula('a$')).toThrow('"a$" is not understood at character 2');
    expect(() => formula('a b')).toThrow('"a b" is not understood from "b"');
  });
});

describe('a product', () => {
  test('takes out what its terms share', () => {
    expect(tex(multiply(formula('a*b+a*c'), symbol('d')))).toBe('ad\\,(b+c)');
    expect(tex(multiply(formula('6*a^2*b-4*a'), symbol('d')))).toBe('2ad\\,(3ab-2)');
    expect(evaluate(multiply(formula('a*b+a*c'), symbol('d')), value)).toBeCloseTo(1.7 * 0.45 * 3.7, 14);
  });

  test('has factors that begin with what is positive', () => {
    expect(tex(multiply(formula('-a-b'), symbol('c')))).toBe('-c\\,(a+b)');
    expect(tex(multiply(formula('b-a'), symbol('c')))).toBe('c\\,(b-a)');
    expect(tex(multiply(formula('-a+b'), symbol('c')))).toBe('c\\,(b-a)');
    expect(tex(multiply(formula('-a-b+c'), symbol('d')))).toBe('d\\,(c-a-b)');
  });

  test('collects factors that are alike', () => {
    expect(tex(multiply(formula('(a+b)*c'), formula('b+a')))).toBe('c\\,(b+a)^2');
    expect(tex(multiply(formula('(a+b)*(c+d)'), formula('c+d')))).toBe('(a+b)\\,(c+d)^2');
    expect(tex(divide(formula('(a+b)^2*c'), formula('a+b')))).toBe('c\\,(a+b)');
  });

  test('of itself is a square, a cube, or 1', () => {
    const x = formula('(a+b)*c+d');
    expect(evaluate(power(x, 3), value)).toBeCloseTo((2.3 * 3.1 + 0.45) ** 3, 9);
    expect(tex(power(x, 0))).toBe('1');
    expect(tex(power(formula('2*a*(b+c)'), -2))).toBe('\\dfrac{1}{4a^2\\,(b+c)^2}');
  });

  test('says why it cannot be divided by', () => {
    expect(() => power([], -1)).toThrow('division by zero');
    expect(() => power(formula('a*(b+c)+d'), -1)).toThrow('division by a sum of fractions');
  });
});

describe('multiplying out', () => {
  test('leaves no sum to a power', () => {
    expect(tex(expand(formula('a*(b-c)^2')))).toBe('ab^2-2abc+ac^2');
    expect(expandable(formula('a*(b-c)'))).toEqual(formula('a*b-a*c'));
  });

  test('is not done where a sum stands below the line', () => {
    expect(expandable(formula('a/(b-c)'))).toBeNull();
    expect(() => expand(formula('a/(b-c)'))).toThrow(RangeError);
  });

  test('is the simplest where terms are left out by it', () => {
    expect(tex(simplest(formula('a*(L-b)+a*b')))).toBe('aL');
    expect(tex(simplest(formula('a*(L-b)')))).toBe('a\\,(L-b)');
    expect(tex(simplest(formula('a*(L-b)^2+b')))).toBe('a\\,(L-b)^2+b');
    expect(tex(simplest(formula('a*(L-b)+c/(L-c)')))).toBe('a\\,(L-b)+\\dfrac{c}{L-c}');
  });

  test('leaves what stands beside a power of a symbol', () => {
    const x = formula('3*a^2*b - a^2/2 + 5*a + b');
    expect(powerOf(x, 'a', 2)).toEqual(formula('3*b-1/2'));
    expect(powerOf(x, 'a', 2, 2)).toEqual(formula('6*b-1'));
    expect(powerOf(x, 'a', 1)).toEqual(formula('5'));
    expect(powerOf(x, 'a', 0)).toEqual(formula('b'));
  });
});

describe('oriented', () => {
  const turned = (text: string) => tex(oriented(formula(text), value));

  test('turns factors so that they are positive', () => {
    expect(turned('c*(a-L)')).toBe('-c\\,(L-a)');
    expect(turned('c*(L-a)')).toBe('c\\,(L-a)');
    expect(turned('c*(a-L)^2')).toBe('c\\,(L-a)^2');
    expect(turned('c*(a-L)^3')).toBe('-c\\,(L-a)^3');
    expect(turned('c/(a-L)')).toBe('-\\dfrac{c}{L-a}');
    expect(turned('c/(a-L)^3')).toBe('-\\dfrac{c}{(L-a)^3}');
  });

  test('writes their positive terms first', () => {
    expect(turned('c*(3*L-2*a-b+d)')).toBe('c\\,(3L+d-2a-b)');
    expect(turned('c*(2*a+b-3*L-d)')).toBe('-c\\,(3L+d-2a-b)');
  });

  test('leaves the value', () => {
    const x = formula('c*(a-L)^3*(b-c)^-1-2*d*(a-c)');
    expect(evaluate(oriented(x, value), value)).toBeCloseTo(evaluate(x, value), 14);
  });
});

describe('TeX', () => {
  test('leaves out brackets and 1 beside a sum that is alone', () => {
    expect(tex(formula('1/(a+b)'))).toBe('\\dfrac{1}{a+b}');
    expect(tex(formula('1/(c*(a+b))'))).toBe('\\dfrac{1}{c\\,(a+b)}');
    expect(tex(multiply(formula('a+b'), formula('c+d')))).toBe('(a+b)\\,(c+d)');
  });

  test('puts powers of two digits into braces', () => {
    expect(tex(formula('a^9+b^10+c^11'))).toBe('a^9+b^{10}+c^{11}');
  });

  test('orders the symbols of a product by their rank', () => {
    const atom = (name: string) => ({ tex: name });
    const rank = (name: string) => 'cab'.indexOf(name);
    expect(texOf(formula('a*b*c'), { atom, times: '', rank })).toBe('cab');
    expect(texOf(formula('b*a*c'), { atom, times: '', rank })).toBe('cab');
  });

  test('takes the sign of a negative value once for odd powers and never for even ones', () => {
    const atom = (name: string) => ({ tex: name, negative: name === 'b' });
    const written = (text: string) => texOf(formula(text), { atom, times: '' });
    expect(written('a*b')).toBe('-ab');
    expect(written('a*b^2')).toBe('ab^2');
    expect(written('-a*b^3')).toBe('ab^3');
    expect(written('a/b')).toBe('-\\dfrac{a}{b}');
    expect(tex(negate(formula('a/2')))).toBe('-\\dfrac{a}{2}');
  });
});

describe('the register', () => {
  test('knows which beam each case is of', () => {
    for (const { id, released } of CHART) expect(id.startsWith(`${released}-`)).toBe(true);
  });
});

describe('places', () => {
  const setting = (length: number) => ({ value, ei: symbol('EI'), length });

  test('within 1e-10 of the length are one', () => {
    const [near, far] = [formula('a+0.00000001'), formula('a+0.000001')];
    expect(compare(symbol('a'), near, setting(1000))).toBe(0);
    expect(compare(symbol('a'), far, setting(1000))).toBe(-1);
    expect(compare(near, symbol('a'), setting(10))).toBe(1);
  });
});

describe('a section of a cantilever', () => {
  const setting = { value, ei: symbol('EI'), length: 5 };
  const ids = (load: Parameters<typeof cantileverTerms>[0]) =>
    cantileverTerms(load, symbol('L'), 'deflection', setting)!.map(({ chart }) => chart.id);

  test('bears what stands beyond it as a force and a couple of its own', () => {
    expect(ids({ kind: 'point', a: symbol('c'), p: symbol('d') })).toEqual([
      'cantilever-point',
      'cantilever-couple',
    ]);
    expect(ids({ kind: 'point', a: symbol('L'), p: symbol('d') })).toEqual(['cantilever-point']);
    expect(
      ids({ kind: 'line', from: symbol('b'), to: symbol('c'), w0: symbol('d'), w1: symbol('d') }),
    ).toEqual(['cantilever-uniform', 'cantilever-uniform', 'cantilever-point', 'cantilever-couple']);
  });

  test('bends under a load that varies from the root as the chart prints it, wherever it ends', () => {
    const rising = { kind: 'line', from: [], to: symbol('c'), w0: [], w1: symbol('d') } as const;
    expect(ids(rising)).toEqual(['cantilever-rising']);
  });
});
