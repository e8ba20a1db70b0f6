import { common, ONE, product, type Rational, raised, rational, sum } from './rational';

/**
 * Formulas as exact algebra: sums of terms like  3/8 · w · L⁴ · (3L − a)² · EI⁻¹.  One object gives a formula's value,
 * its TeX with symbols and its TeX with numbers, so that the three cannot differ; and a chart's formula becomes the
 * beam's by substitution, with what cancels cancelled and every other factor kept as the chart prints it.
 */
export type Powers = ReadonlyMap<string, number>;
export type Monomial = { readonly coefficient: Rational; readonly powers: Powers };
/** A sum raised to a whole power: at least two monomials without a common factor, the first one positive. */
export type Factor = { readonly sum: readonly Monomial[]; readonly power: number; readonly key: string };
/** Two terms that differ by their coefficient alone have the same key. */
export type Term = Monomial & { readonly factors: readonly Factor[]; readonly key: string };
/** The sum of its terms; none is zero, no two are alike. */
export type Expression = readonly Term[];

export const ZERO: Expression = [];

export const constant = (value: Rational | number): Expression => {
  const coefficient = typeof value === 'number' ? rational(value) : value;
  return coefficient.n === 0 ? ZERO : [termOf(coefficient, new Map(), [])];
};

export const symbol = (name: string): Expression => [termOf(ONE, new Map([[name, 1]]), [])];

/** The sum, like terms collected, in the order in which they first appear. */
export function add(...summands: readonly Expression[]): Expression {
  const terms = summands.flat();
  if (terms.length < 2) return terms;
  const found = new Map<string, Term>();
  for (const term of terms) {
    const alike = found.get(term.key);
    const { coefficient, powers, factors } = alike ?? term;
    found.set(term.key, alike ? termOf(sum(coefficient, term.coefficient), powers, factors) : term);
  }
  return [...found.values()].filter(({ coefficient }) => coefficient.n !== 0);
}

export const negate = (a: Expression): Expression =>
  a.map(({ coefficient, powers, factors }) => termOf(product(coefficient, rational(-1)), powers, factors));

export const subtract = (a: Expression, b: Expression): Expression => add(a, negate(b));

/** The product. A plain sum stays one factor, (3L − a); a sum of terms with factors of their own is multiplied out. */
export function multiply(a: Expression, b: Expression): Expression {
  const [left, right] = [asTerm(a), asTerm(b)];
  if (left && right) return [multiplyTerms(left, right)];
  return add(...a.map((x) => b.map((y) => multiplyTerms(x, y))));
}

/** a / b, term by term of a. Fails with RangeError where b is zero or a sum that is no single factor. */
export function divide(a: Expression, b: Expression): Expression {
  const inverse = power(b, -1);
  return add(...a.map((term) => multiply([term], inverse)));
}

/** aᵏ for a whole k. */
export function power(a: Expression, k: number): Expression {
  if (k === 0) return constant(1);
  const term = asTerm(a);
  if (term) {
    const powers = new Map([...term.powers].map(([name, p]) => [name, p * k] as const));
    const factors = term.factors.map((factor) => ({ ...factor, power: factor.power * k }));
    return [termOf(raised(term.coefficient, k), powers, factors)];
  }
  if (k < 0) throw new RangeError(a.length === 0 ? 'division by zero' : 'division by a sum of fractions');
  return multiply(a, power(a, k - 1));
}

/** Every named symbol replaced. Sums that a substitution reaches are collected anew: 6L² − 4Lx + x² is 3L² at x = L. */
export function substitute(a: Expression, replacements: Readonly<Record<string, Expression>>): Expression {
  const replaced = (name: string) => replacements[name] ?? symbol(name);
  const monomial = ({ coefficient, powers }: Monomial, join: (x: Expression, y: Expression) => Expression) =>
    [...powers].reduce((total, [name, p]) => join(total, power(replaced(name), p)), constant(coefficient));
  const factor = ({ sum: monomials, power: p }: Factor) =>
    power(add(...monomials.map((m) => expand(monomial(m, multiply)))), p);
  return add(
    ...a.map((term) =>
      term.factors.reduce((total, f) => multiply(total, factor(f)), monomial(term, multiply)),
    ),
  );
}

/** Multiplied out into monomials. Fails with RangeError where a sum stands in a denominator. */
export function expand(a: Expression): Expression {
  return add(
    ...a.map((term) => {
      if (term.factors.length === 0) return [term];
      let total: Expression = [termOf(term.coefficient, term.powers, [])];
      for (const { sum: monomials, power: p } of term.factors) {
        if (p < 0) throw new RangeError('a sum in a denominator cannot be multiplied out');
        for (let k = 0; k < p; k++) {
          total = add(...total.map((x) => monomials.map((y) => multiplyTerms(x, plain(y)))));
        }
      }
      return total;
    }),
  );
}

/** Whether it can be multiplied out: no sum stands in a denominator. */
const isWhole = (a: Expression): boolean => a.every(({ factors }) => factors.every(({ power: p }) => p > 0));

/** Multiplied out where that leaves no more terms than there are, else as it is; one term stays one product. */
export function simplest(a: Expression): Expression {
  const collected = add(a);
  const expanded = isWhole(collected) ? expand(collected) : collected;
  return collected.length > 1 && expanded.length <= collected.length ? expanded : collected;
}

/** The value, with the symbols' values. */
export function evaluate(a: Expression, value: (name: string) => number): number {
  const monomial = ({ coefficient, powers }: Monomial) =>
    [...powers].reduce((total, [name, p]) => total * value(name) ** p, coefficient.n / coefficient.d);
  return a.reduce((total, term) => {
    const factors = term.factors.map((f) => f.sum.reduce((s, m) => s + monomial(m), 0) ** f.power);
    return total + factors.reduce((p, factor) => p * factor, monomial(term));
  }, 0);
}

/**
 * The same with every factor written so that it is positive, and its positive monomials first: −w(a − L) as w(L − a)
 * where a < L.
 */
export function oriented(a: Expression, value: (name: string) => number): Expression {
  return a.map((term) => {
    let coefficient = term.coefficient;
    const factors = term.factors.map((factor) => {
      const sign = evaluate(factor.sum.map(plain), value) < 0 ? -1 : 1;
      if (sign < 0 && factor.power % 2 !== 0) coefficient = product(coefficient, rational(-1));
      const turned = factor.sum.map((m) => ({ ...m, coefficient: product(m.coefficient, rational(sign)) }));
      const positive = turned.filter((monomial) => monomial.coefficient.n > 0);
      const rest = turned.filter((monomial) => monomial.coefficient.n < 0);
      return factorOf([...positive, ...rest], factor.power);
    });
    return termOf(coefficient, term.powers, joined(factors));
  });
}

/** Every symbol in it. */
export function symbolsOf(a: Expression): string[] {
  const names = a.flatMap((term) => [
    ...term.powers.keys(),
    ...term.factors.flatMap((f) => f.sum.flatMap((m) => [...m.powers.keys()])),
  ]);
  return [...new Set(names)];
}

/** The whole as one term, if it is one or a plain sum: the sum's common factor times what is left. */
function asTerm(a: Expression): Term | null {
  if (a.length === 1) return a[0]!;
  if (a.length === 0 || a.some(({ factors }) => factors.length > 0)) return null;
  const shared = a.reduce((divisor, { coefficient }) => common(divisor, coefficient), a[0]!.coefficient);
  const names = new Set(a.flatMap(({ powers }) => [...powers.keys()]));
  const lowest = new Map(
    [...names].map((name) => [name, Math.min(...a.map(({ powers }) => powers.get(name) ?? 0))] as const),
  );
  const lead = a.findIndex(({ coefficient }) => coefficient.n > 0);
  const content = lead < 0 ? rational(-shared.n, shared.d) : shared;
  const inverse = termOf(raised(content, -1), negated(lowest), []);
  const rest = a.map((term) => multiplyTerms(term, inverse));
  const ordered = lead > 0 ? [rest[lead]!, ...rest.filter((_, k) => k !== lead)] : rest;
  return termOf(content, nonZero(lowest), [factorOf(ordered, 1)]);
}

function multiplyTerms(a: Term, b: Term): Term {
  const powers = new Map(a.powers);
  for (const [name, p] of b.powers) powers.set(name, (powers.get(name) ?? 0) + p);
  const factors = joined([...a.factors, ...b.factors]);
  return termOf(product(a.coefficient, b.coefficient), nonZero(powers), factors);
}

/** Factors of one sum as one, with their powers added; what cancels is left out. */
function joined(factors: readonly Factor[]): Factor[] {
  const found: Factor[] = [];
  for (const factor of factors) {
    const at = found.findIndex((other) => other.key === factor.key);
    if (at < 0) found.push(factor);
    else found[at] = { ...factor, power: found[at]!.power + factor.power };
  }
  return found.filter((factor) => factor.power !== 0);
}

const plain = ({ coefficient, powers }: Monomial): Term => termOf(coefficient, powers, []);

/** Its key is made when it is first asked for: most terms are never compared. */
function termOf(coefficient: Rational, powers: Powers, factors: readonly Factor[]): Term {
  let key: string | undefined;
  return {
    coefficient,
    powers,
    factors,
    get key() {
      key ??= [powersKey(powers), ...factors.map((factor) => `(${factor.key})^${factor.power}`).sort()].join(
        '*',
      );
      return key;
    },
  };
}

function factorOf(monomials: readonly Monomial[], p: number): Factor {
  const parts = monomials.map(({ coefficient: c, powers }) => `${c.n}/${c.d}*${powersKey(powers)}`);
  return { sum: monomials, power: p, key: parts.sort().join('+') };
}

const nonZero = (powers: Powers): Powers => new Map([...powers].filter(([, p]) => p !== 0));

const negated = (powers: Powers): Powers => new Map([...powers].map(([name, p]) => [name, -p]));

const powersKey = (powers: Powers): string =>
  powers.size === 0
    ? ''
    : [...powers]
        .map(([name, p]) => `${name}^${p}`)
        .sort()
        .join('*');

/** Multiplied out; null where a sum stands in a denominator. */
export const expandable = (a: Expression): Expression | null => (isWhole(a) ? expand(a) : null);

/** Of an expression that is multiplied out, what stands beside the named symbol to the power p, `times` over. */
export const powerOf = (a: Expression, name: string, p: number, times = 1): Expression =>
  a
    .filter(({ powers }) => (powers.get(name) ?? 0) === p)
    .map((term) => {
      const powers = new Map([...term.powers].filter(([letter]) => letter !== name));
      return termOf(product(term.coefficient, rational(times)), powers, term.factors);
    });
