import {
  divide,
  type Expression,
  evaluate,
  expandable,
  multiply,
  negate,
  oriented,
  power,
  powerOf,
  symbolsOf,
  texOf,
} from '../chart/index';
import { placeWords } from './display';
import type { NamedBeam } from './named-beam';
import { placeOf, placeTex } from './spot';
import { momentAt } from './statics';
import { calculate, type Frame, withResult, written } from './step';
import { numberTex } from './symbols';
import type { DerivationStep } from './types';
import { inUnit } from './units';
import type { Worked } from './values';

const PEAK = 'x_m';

/** The largest sagging moment, where it is within a span, and why it is there: the shear is zero. */
export function peakSteps(worked: Worked): DerivationStep[] {
  const { beam, solution } = worked;
  const { value, at } = solution.extremes.moment.max;
  const x = at[0]!;
  const isPlain = !beam.beam.hinges.includes(x) && !beam.supports.some((s) => s.x === x);
  if (value <= 0 || x === 0 || x === beam.beam.length || !isPlain) return [];
  if (beam.groups.some(({ numeric }) => numeric.kind === 'couple' && numeric.at === x)) return [];
  const place = placeOf(beam, x, PEAK);
  const moment = momentAt(beam, worked.parts, { x, at: place });
  const { letters } = beam;
  return [
    ...(letters.has(PEAK) ? zeroShear(beam, moment, x) : []),
    calculate(letters, {
      id: 'largest-moment',
      title: `Largest sagging moment, ${placeWords(x, letters.units.of('length', 'base'))}`,
      left: `M(${placeTex(beam, place)})`,
      expression: moment,
      value,
      kind: 'moment',
      scale: 'base',
    }),
  ];
}

/** V = dM/dx = c₁ + 2c₂x + 3c₃x² = 0 at x_m; the moment's coefficients from its formula. */
function zeroShear(beam: NamedBeam, moment: Expression, x: number): DerivationStep[] {
  const expanded = expandable(moment);
  if (!expanded) return [];
  const { letters } = beam;
  const shear = [1, 2, 3].map((p) => powerOf(expanded, PEAK, p, p));
  const [constant, linear, square] = shear as [Expression, Expression, Expression];
  const common = { id: 'zero-shear', title: 'Where the shear is zero, and the moment largest' };
  const frame: Frame = { ...common, left: PEAK, kind: 'length', scale: 'base' };
  if (square.length === 0)
    return [calculate(letters, { ...frame, expression: rootOf(beam, constant, linear), value: x })];
  if (linear.length === 0) return [squareRoot(beam, frame, negate(divide(constant, square)), x)];
  const symbols = shearTex(beam, shear);
  const root = quadratic(beam, shear, x);
  const { unit, shown, numbers, result } = written(letters, frame, { value: x, largest: x, ...root });
  return [
    {
      ...common,
      symbols: `${symbols}=0\\quad\\Rightarrow\\quad ${PEAK}`,
      numbers: withResult(letters, frame, numbers, result),
      value: x,
      unit,
      display: shown,
    },
  ];
}

/** −c₁/2c₂: term by term where the load cancels in one of them, else as one fraction. */
function rootOf({ letters }: NamedBeam, constant: Expression, linear: Expression): Expression {
  const apart = divide(negate(constant), linear);
  const below = symbolsOf(linear);
  const isShared = apart.every(({ powers }) => below.every((name) => (powers.get(name) ?? 0) < 0));
  if (isShared || linear.length > 1) return multiply(negate(constant), power(linear, -1));
  return apart.toSorted((a, b) => Math.sign(letters.of([b])) - Math.sign(letters.of([a])));
}

/** x_m = √… where the load rises from nothing. */
function squareRoot({ letters }: NamedBeam, frame: Frame, inside: Expression, x: number): DerivationStep {
  const ordered = oriented(inside, letters.value);
  const root = (tex: string) => `\\sqrt{${tex}}`;
  const { unit, shown, numbers, result } = written(letters, frame, {
    value: x,
    largest: x,
    total: (figures) => Math.sqrt(evaluate(ordered, (tex) => letters.shown(tex, 'base', figures))),
    tex: (figures) => root(texOf(ordered, letters.numbers('base', figures))),
  });
  return {
    id: frame.id,
    title: frame.title,
    symbols: `${PEAK}=${root(texOf(ordered, letters.symbols()))}`,
    numbers: withResult(letters, frame, numbers, result),
    value: x,
    unit,
    display: shown,
  };
}

/** The shear as the sum that is set to zero. */
function shearTex({ letters }: NamedBeam, [constant, linear, square]: readonly Expression[]): string {
  const times = (terms: Expression, power: string) =>
    terms.map((term) => {
      const tex = texOf([term], letters.symbols());
      return `${tex}${power}`;
    });
  const parts = [...times(constant!, ''), ...times(linear!, `\\,${PEAK}`), ...times(square!, `\\,${PEAK}^2`)];
  return parts.map((tex, k) => (k === 0 || tex.startsWith('-') ? tex : `+${tex}`)).join('');
}

/** The root that lies at x, written out with numbers. */
function quadratic({ letters }: NamedBeam, shear: readonly Expression[], x: number) {
  const units = [letters.units.of('force', 'base'), letters.units.of('line', 'base')];
  const length = inUnit(1, letters.units.of('length', 'base'));
  const numbers = [
    inUnit(letters.of(shear[0]!), units[0]!),
    inUnit(letters.of(shear[1]!), units[1]!),
    inUnit(letters.of(shear[2]!), units[1]!) / length,
  ] as const;
  const at = (figures: number) =>
    numbers.map((n) => Number(n.toPrecision(figures))) as [number, number, number];
  const rootOf = (figures: number, sign: 1 | -1) => {
    const [c, b, a] = at(figures);
    return (-b + sign * Math.sqrt(b * b - 4 * a * c)) / (2 * a);
  };
  const want = inUnit(x, letters.units.of('length', 'base'));
  const sign = Math.abs(rootOf(17, 1) - want) < Math.abs(rootOf(17, -1) - want) ? 1 : -1;
  return {
    total: (figures: number) => rootOf(figures, sign),
    tex: (figures: number) => rootTex(at(figures), sign),
  };
}

function rootTex([c, b, a]: readonly [number, number, number], sign: 1 | -1): string {
  const plain = (n: number) => (n < 0 ? `-${numberTex(-n)}` : numberTex(n));
  const bracket = (n: number) => (n < 0 ? `(${plain(n)})` : plain(n));
  return `\\dfrac{${plain(-b)}${sign < 0 ? '-' : '+'}\\sqrt{${bracket(b)}^2-4\\times${bracket(a)}\\times${bracket(c)}}}{2\\times${bracket(a)}}`;
}
