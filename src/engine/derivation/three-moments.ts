import {
  type ChartTerm,
  chartTerms,
  constant,
  divide,
  type Expression,
  expand,
  multiply,
  negate,
  power,
  simplest,
  subtract,
  symbol,
  symbolsOf,
  texOf,
} from '../chart/index';
import { defineRedundants, FEW } from './compatibility';
import { type NamedBeam, type NamedSupport, settlementOf } from './named-beam';
import { type Piece, partOn } from './pieces';
import { supportMoment, supportMomentTex } from './reactions';
import { momentAt } from './statics';
import { calculate, chartsOf } from './step';
import { aligned, equationsTex, type System, solutionSteps } from './system';
import type { DerivationStep } from './types';
import type { Unknown } from './unknown';
import type { Worked } from './values';
import { listed, negativeNote } from './words';

/** A span between two supports of a continuous beam. */
type Span = { left: NamedSupport; right: NamedSupport; length: Expression; ei: Expression };

/** The load term of a span at one of its ends: its letter, and what it is; null for a span without load. */
type LoadTerm = { tex: string; value: Expression; terms: ChartTerm[] };

/**
 * The three-moment equations of a continuous beam whose support moments are the redundants: the compatibility of the
 * slopes over every inner support, times 6EI. Null where the usual form does not hold: more than one EI, shear, springs,
 * couples over supports, more redundants than are worked in full.
 */
export function threeMomentSteps(worked: Worked, pieces: readonly Piece[] | null): DerivationStep[] | null {
  const { beam, unknowns } = worked;
  if (!pieces || unknowns.length > FEW || !isUsual(beam, unknowns, pieces)) return null;
  const spans = pieces.map(({ vertical: [left, right], ei }): Span => {
    const length = expand(subtract(right!.at, left!.at));
    return { left: left!, right: right!, length, ei };
  });
  const loads = spans.map((span) => [loadTerm(beam, span, 'left'), loadTerm(beam, span, 'right')] as const);
  if (loads.flat().some((term) => term === null)) return null;
  const known = loads as readonly (readonly [LoadTerm, LoadTerm])[];
  const outer = outerMoments(worked, spans);
  defineRedundants(worked);
  return [...loadSteps(beam, spans, known), ...outer, ...equations(worked, spans, known)];
}

function isUsual(
  { groups, letters, beam }: NamedBeam,
  unknowns: readonly Unknown[],
  pieces: readonly Piece[],
): boolean {
  const ei = new Set(pieces.map((piece) => symbolsOf(piece.ei).join()));
  const isPlain = pieces.every(
    ({ released, ga, vertical }) =>
      released.kind === 'simple' &&
      ga === null &&
      vertical.every(({ support }) => support.vertical.kind === 'rigid'),
  );
  const supports = new Set(pieces.flatMap(({ vertical }) => vertical.map(({ x }) => x)));
  const hasCouple = groups.some(({ numeric }) => numeric.kind === 'couple' && supports.has(numeric.at));
  const isInternal = unknowns.every(({ kind, support }) => kind === 'internal' && support !== null);
  return (
    unknowns.length > 0 &&
    isInternal &&
    isPlain &&
    ei.size === 1 &&
    !hasCouple &&
    beam.hinges.length === 0 &&
    letters.has('EI')
  );
}

/** 6EI times the slope of the span's end under its own loads, so that a load that sags it is positive. */
function loadTerm(beam: NamedBeam, { left, right, ei }: Span, end: 'left' | 'right'): LoadTerm | null {
  const [at, other] = end === 'left' ? [left, right] : [right, left];
  const released = { kind: 'simple', left: left.at, right: right.at } as const;
  const own = beam.groups
    .flatMap(({ fine }) => fine)
    .flatMap((load) => partOn(beam, load, left.x, right.x) ?? []);
  const found = own.map((load) => chartTerms(released, load, at.at, 'slope', beam.setting(ei)));
  if (!found.every((terms) => terms !== null)) return null;
  const times = multiply(constant(end === 'left' ? 6 : -6), ei);
  const terms = found.flat().map((term) => ({ ...term, value: multiply(term.value, times) }));
  return { tex: `K_{${at.letter}${other.letter}}`, value: terms.flatMap(({ value }) => value), terms };
}

/** One step for load terms of one formula, at the inner supports. Defines their letters. */
function loadSteps(
  beam: NamedBeam,
  spans: readonly Span[],
  loads: readonly (readonly [LoadTerm, LoadTerm])[],
): DerivationStep[] {
  const { letters } = beam;
  const alike = new Map<string, { spans: Set<string>; terms: LoadTerm[] }>();
  spans.forEach(({ left, right }, k) => {
    loads[k]!.forEach((term, end) => {
      const isInner = end === 0 ? k > 0 : k < spans.length - 1;
      if (!isInner || term.value.length === 0) return;
      const formula = texOf(term.value, letters.symbols());
      const known = alike.get(formula) ?? { spans: new Set(), terms: [] };
      known.spans.add(`${left.letter}–${right.letter}`);
      known.terms.push(term);
      alike.set(formula, known);
    });
  });
  return [...alike.values()].map(({ spans: names, terms }) => {
    const [first] = terms as [LoadTerm];
    const isOne = terms.length === 1;
    const step = calculate(letters, {
      id: `load-term-${first.tex.replaceAll(/[^A-Z]/g, '')}`,
      title: `${isOne ? 'Load term' : 'Load terms'} of ${listed([...names])}: 6EI times the slope of ${isOne ? 'its end there' : 'the ends'} under ${names.size === 1 ? 'its' : 'their'} own load`,
      left: terms.map(({ tex }) => tex).join('='),
      expression: first.value,
      kind: 'load term',
      scale: 'base',
      extra: { charts: chartsOf(first.terms), figure: { structure: 'released' } },
    });
    for (const { tex, value } of terms) letters.define(tex, letters.of(value), 'load term');
    return step;
  });
}

/** The moments over the outermost supports where the beam overhangs them; statics alone finds them. */
function outerMoments(worked: Worked, spans: readonly Span[]): DerivationStep[] {
  return [spans[0]!.left, spans.at(-1)!.right].flatMap((support) => {
    const moment = outerMoment(worked, spans, support);
    return moment.length === 0 ? [] : [supportMoment(worked.beam, support, moment)];
  });
}

/** Of what overhangs an outermost support; nothing where the beam ends there. */
function outerMoment({ beam, parts }: Worked, spans: readonly Span[], support: NamedSupport): Expression {
  if (support.x === 0 || support.x === beam.beam.length) return [];
  return momentAt(beam, parts, support, support === spans[0]!.left ? 'left' : 'right');
}

function equations(
  worked: Worked,
  spans: readonly Span[],
  loads: readonly (readonly [LoadTerm, LoadTerm])[],
): DerivationStep[] {
  const rows = worked.unknowns.map(({ x }) =>
    rowOf(
      worked,
      spans,
      loads,
      spans.findIndex(({ right }) => right.x === x),
    ),
  );
  return worked.unknowns.length === 1 ? one(worked, rows[0]!) : several(worked, rows);
}

/** M_A L₁ + 2M_B(L₁ + L₂) + M_C L₂ = right, over the support between spans k and k + 1. */
type Row = {
  /** The support moments with what multiplies them. */
  left: { tex: string; factor: Expression; isKnown: boolean; moment: Expression }[];
  right: Expression;
  /** The same, and the moments that are known, with the closed forms of the loads. */
  closed: Expression;
};

function rowOf(
  worked: Worked,
  spans: readonly Span[],
  loads: readonly (readonly [LoadTerm, LoadTerm])[],
  k: number,
): Row {
  const { beam, unknowns } = worked;
  const [before, after] = [spans[k]!, spans[k + 1]!];
  const tex = (support: NamedSupport) => supportMomentTex(support);
  const isUnknown = (support: NamedSupport) => unknowns.some(({ x }) => x === support.x);
  const both = expand([...before.length, ...after.length]);
  const left = [
    { support: before.left, factor: before.length },
    { support: before.right, factor: multiply(constant(2), both) },
    { support: after.right, factor: after.length },
  ]
    .filter(({ support }) => beam.letters.has(tex(support)))
    .map(({ support, factor }) => {
      const isKnown = !isUnknown(support);
      return {
        tex: tex(support),
        factor,
        isKnown,
        moment: isKnown ? outerMoment(worked, spans, support) : [],
      };
    });
  const terms = [loads[k]![1], loads[k + 1]![0]].filter(({ value }) => value.length > 0);
  const settled = settlements(before, after);
  const known = left.filter(({ isKnown }) => isKnown);
  return {
    left,
    right: [...terms.flatMap((term) => negate(symbol(term.tex))), ...settled],
    closed: simplest([
      ...terms.flatMap(({ value }) => negate(value)),
      ...settled,
      ...known.flatMap(({ moment, factor }) => negate(multiply(moment, factor))),
    ]),
  };
}

/** 6EI ((Δ_B − Δ_A)/L₁ + (Δ_B − Δ_C)/L₂) */
function settlements(before: Span, after: Span): Expression {
  const at = (support: NamedSupport) => settlementOf(support) ?? [];
  const over = (first: NamedSupport, second: NamedSupport, length: Expression) =>
    divide(subtract(at(first), at(second)), length);
  const turns = [
    ...over(before.right, before.left, before.length),
    ...over(after.left, after.right, after.length),
  ];
  return turns.flatMap((term) => multiply([term], multiply(constant(6), before.ei)));
}

/** The right side with the moments that are known already. */
const onTheRight = ({ left, right }: Row): Expression => {
  const known = left.filter(({ isKnown }) => isKnown);
  return [...right, ...known.flatMap(({ tex, factor }) => negate(multiply(symbol(tex), factor)))];
};

const rightTex = ({ letter }: Unknown): string => `d_{${letter}}`;

const rowTex = (beam: NamedBeam, left: Row['left'], right: Expression): string => {
  const letters = beam.letters.symbols();
  const sides = left.map(({ tex, factor }) => texOf(multiply(factor, symbol(tex)), letters));
  return `${sides.join('+')}=${texOf(right, letters)}`;
};

const TITLE = 'Three-moment equation: the slopes on either side';

/** M_B = (−K_BA − K_BC − M_C L₂) / 2(L₁ + L₂), and in one formula. */
function one(worked: Worked, row: Row): DerivationStep[] {
  const { beam, unknowns, values } = worked;
  const unknown = unknowns[0]!;
  const own = row.left.find(({ isKnown }) => !isKnown)!;
  const right = onTheRight(row);
  const common = { left: unknown.tex, value: values[0]!, kind: 'moment', scale: 'base' } as const;
  const closed = simplest(divide(row.closed, own.factor));
  return [
    calculate(beam.letters, {
      ...common,
      id: 'compatibility',
      title: `${TITLE} of ${unknown.letter} are the same`,
      left: `${rowTex(beam, row.left, row.right)}\\quad\\Rightarrow\\quad ${unknown.tex}`,
      expression: multiply(right, power(own.factor, -1)),
      isRule: true,
      extra: {
        key: true,
        figure: { structure: 'built' },
        ...(values[0]! < 0 && { note: negativeNote(unknown) }),
      },
    }),
    calculate(beam.letters, {
      ...common,
      id: 'closed-form',
      title: 'The same in one formula',
      expression: closed,
    }),
  ];
}

function several(worked: Worked, rows: readonly Row[]): DerivationStep[] {
  const { beam, unknowns, values } = worked;
  const { letters } = beam;
  const coefficients = rows.map(({ left }, i) =>
    unknowns.map((unknown) => {
      const term = left.find(({ tex }) => tex === unknown.tex);
      if (!term) return null;
      const tex = `c_{${unknowns[i]!.letter}${unknown.letter}}`;
      letters.define(tex, letters.of(term.factor), 'length');
      return { tex, factor: term.factor };
    }),
  );
  const wholes = rows.map(onTheRight);
  const rights = wholes.map((whole, i) =>
    whole.length === 0 ? [] : letters.define(rightTex(unknowns[i]!), letters.of(whole), 'load term'),
  );
  const system: System = {
    letters,
    unknowns,
    values,
    coefficients: coefficients.map((row) => row.map((entry) => entry?.tex ?? null)),
    rights,
    kinds: unknowns.map(() => 'load term'),
  };
  return [
    matrix(worked, coefficients),
    {
      id: 'compatibility',
      title: `${TITLE} of each inner support are the same`,
      symbols: aligned(
        rows.map(({ left }, i) => {
          const right = wholes[i]!;
          const equation = rowTex(
            beam,
            left.filter(({ isKnown }) => !isKnown),
            right,
          ).replace('=', '&=');
          return right.length === 0 ? equation : `${equation}=${rightTex(unknowns[i]!)}`;
        }),
      ),
      numbers: equationsTex(system),
      value: null,
      unit: '',
      display: '',
      figure: { structure: 'built' },
    },
    ...solutionSteps(system),
  ];
}

/** 6EI·F: what a unit moment over a support turns its spans' ends by, L/3EI near it and L/6EI at their far ends. */
function matrix(
  { beam: { letters } }: Worked,
  coefficients: readonly (readonly ({ tex: string; factor: Expression } | null)[])[],
): DerivationStep {
  const write = (entry: (of: { tex: string; factor: Expression }) => string) =>
    `\\begin{bmatrix}${coefficients.map((row) => row.map((of) => (of ? entry(of) : '0')).join('&')).join('\\\\')}\\end{bmatrix}`;
  const numbers = letters.numbers('base', 6);
  return {
    id: 'matrix',
    title:
      '6EI times the flexibility matrix: a unit moment turns the ends of its spans by L/3EI, and their far ends by L/6EI',
    symbols: `6EI\\,\\mathbf{F}=${write(({ tex }) => tex)}=${write(({ factor }) => texOf(factor, letters.symbols()))}`,
    numbers: write(({ tex }) => numbers.atom(tex).tex),
    value: null,
    unit: '',
    display: '',
    note: `In ${letters.units.of('length', 'base')}. By reciprocity it is symmetric.`,
    figure: { structure: 'unit', redundant: 0 },
  };
}
