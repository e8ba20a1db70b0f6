import { derivative, type MathNode, parse } from 'mathjs';
import { describe, expect, test } from 'vitest';
import type { CaseRow } from './case';
import { CASES } from './cases';
import { evaluate } from './expression';
import { chart } from './register';

/**
 * Every printed formula against statics: it solves EI δ″ = −M (δ″ = −κ of a free curvature) with M from equilibrium, on
 * both sides of a, meets itself at a, and is held where its beam is. There is one such curve. Derivatives by mathjs.
 */
const VALUES = { L: 5.3, a: 2.1, P: 3, w: 1.7, M: 2.3, kappa: 0.31, EI: 7, GA: 11, s: 0.4, t: 0.7, phi: 0.2 };
const { L, a, P, w, M, kappa, EI } = VALUES;

/** A line load by its value at t and the stretch it covers, a force or a couple at a, or a curvature as far as a. */
type Acting = { w?: (t: number) => number; to?: number; P?: number; M?: number; kappa?: number };

const LOADS: Readonly<Record<string, Acting>> = {
  point: { P },
  couple: { M },
  curvature: { kappa },
  uniform: { w: () => w, to: a },
  rising: { w: (t) => (w * t) / a, to: a },
  falling: { w: (t) => w * (1 - t / a), to: a },
};
/** The cases without an a reach over the whole span. */
const WHOLE: Readonly<Record<string, Acting>> = {
  'simple-uniform': { w: () => w, to: L },
  'simple-rising': { w: (t) => (w * t) / L, to: L },
};

const nameOf = ({ id }: CaseRow) => id.replace(/^[a-z]+-(part-)?/, '');
const charted = CASES.filter((row) => !/-(movement|shear)$/.test(row.id));

/** The clockwise moment about x of what stands beyond x, and of all of it: Simpson's rule, exact to the third degree. */
function momentBeyond({ w: load, to = 0, P: force = 0, M: couple = 0 }: Acting, x: number): number {
  const from = Math.min(x, to);
  const [h, middle] = [to - from, (from + to) / 2];
  const spread = load
    ? (h / 6) * (load(from) * (from - x) + 4 * load(middle) * (middle - x) + load(to) * (to - x))
    : 0;
  return spread + (x < a ? force * (a - x) + couple : 0);
}

function forceOf({ w: load, to = 0, P: force = 0 }: Acting): number {
  return force + (load ? (to / 6) * (load(0) + 4 * load(to / 2) + load(to)) : 0);
}

/** Sagging moment at x from the equilibrium of what is beyond x. */
function momentAt(id: string, acting: Acting, x: number): number {
  if (id.startsWith('cantilever-')) return -momentBeyond(acting, x);
  const reaction = id.startsWith('guided-') ? forceOf(acting) : momentBeyond(acting, 0) / L;
  return reaction * (L - x) - momentBeyond(acting, x);
}

const at = (formula: string | MathNode, x: number, more = {}): number =>
  (typeof formula === 'string' ? parse(formula) : formula).evaluate({ ...VALUES, x, ...more });
const slopeOf = (formula: string): MathNode => derivative(formula, 'x', { simplify: false });
const near = (actual: number, wanted: number) => expect(Math.abs(actual - wanted)).toBeLessThan(1e-11);

describe.each(charted)('$id', (row) => {
  const acting = WHOLE[row.id] ?? LOADS[nameOf(row)]!;
  const end = row.id.startsWith('cantilever-') ? 4.4 : L;
  const reach = row.beyond ? a : end;
  const sides = [
    { formulas: row.within, places: [0, 0.3, 0.7, 1].map((part) => part * reach), isWithin: true },
    ...(row.beyond
      ? [{ formulas: row.beyond, places: [0, 0.5, 1].map((part) => a + part * (end - a)), isWithin: false }]
      : []),
  ];

  test('bends as its moments and curvatures say', () => {
    for (const { formulas, places, isWithin } of sides) {
      const [deflection, slope] = formulas;
      const curvature = slopeOf(slope);
      for (const [i, x] of places.entries()) {
        near(at(slopeOf(deflection), x), at(slope, x));
        // At a itself a couple is neither within nor beyond.
        const beside = x === a ? a + (isWithin ? -1e-9 : 1e-9) : x;
        const free = isWithin ? (acting.kappa ?? 0) : 0;
        const bent = -momentAt(row.id, acting, beside) / EI - free;
        expect(Math.abs(at(curvature, x) - bent), `place ${i}`).toBeLessThan(1e-8);
      }
    }
  });

  test('meets itself at a', () => {
    row.within.forEach((formula, i) => {
      if (row.beyond) near(at(formula, a), at(row.beyond[i]!, a));
    });
  });

  test('is held where its beam is', () => {
    const [deflection, slope] = row.within;
    const [far] = row.beyond ?? row.within;
    if (!row.id.startsWith('guided-')) near(at(deflection, 0), 0);
    if (!row.id.startsWith('simple-')) near(at(slope, 0), 0);
    if (!row.id.startsWith('cantilever-')) near(at(far, L), 0);
  });

  test('is read as it is written', () => {
    const value = (name: string) => ({ ...VALUES, x: 1.3 })[name] ?? Number.NaN;
    const { within, beyond } = chart(row.id);
    const [deflection, slope] = row.within;
    near(evaluate(within.deflection, value), at(deflection, 1.3));
    near(evaluate(within.slope, value), at(slope, 1.3));
    if (!beyond || !row.beyond) return;
    near(evaluate(beyond.deflection, value), at(row.beyond[0], 1.3));
    near(evaluate(beyond.slope, value), at(row.beyond[1], 1.3));
  });
});

describe('a movement of the supports', () => {
  const { s, t, phi } = VALUES;
  const ends: Readonly<Record<string, [x: number, movement: number][]>> = {
    'cantilever-movement': [[0, s]],
    'simple-movement': [
      [0, s],
      [L, t],
    ],
    'guided-movement': [[L, t]],
  };

  test.each(CASES.filter(({ id }) => id.endsWith('-movement')))('$id is straight between them', (row) => {
    const [deflection, slope] = row.within;
    for (const [x, movement] of ends[row.id]!) near(at(deflection, x), movement);
    for (const x of [0, 1.9, L]) near(at(slopeOf(deflection), x), at(slope, x));
    near(at(slopeOf(slope), 2), 0);
    if (row.id !== 'simple-movement') near(at(slope, 0), phi);
  });
});

describe('the shear of a beam', () => {
  test.each(CASES.filter(({ id }) => id.endsWith('-shear')))('$id follows the area of its diagram', (row) => {
    const [deflection, slope] = row.within;
    const [S, T] = [1.9, 0.8];
    const moved = (x: number, area: number) => at(deflection, x, { S: area, T });
    // GA δ′ = V: what the area S to x adds is S/GA, beside a rigid turn that brings the supports back
    near((moved(3, S) - moved(3, 0)) * VALUES.GA, S);
    near(moved(4, S) - moved(2, S), 2 * at(slope, 3, { S, T }));
    if (row.id !== 'guided-shear') near(moved(0, 0), 0);
    if (row.id !== 'cantilever-shear') near(moved(L, T), 0);
    if (row.id !== 'simple-shear') near(at(slope, 3, { S, T }), 0);
  });
});
