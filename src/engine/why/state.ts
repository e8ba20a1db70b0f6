import type { Diagrams, Reaction } from '../beam/index';
import {
  add,
  divide,
  type Expression,
  multiply,
  type NamedLoad,
  constant as number,
  oriented,
  substitute,
  subtract,
  symbolsOf,
  ZERO,
} from '../chart/index';
import { type Part as BeamPart, equilibrium, fixingSense, fixingTex, reactionTex } from '../derivation/index';
import { evaluate, magnitude, type Piecewise } from '../polynomial/index';
import { momentFrom, shearFrom } from './cut';
import type { LetteredBeam, Spot } from './lettered-beam';
import { constant, formula, type Head, Once } from './node';
import { valueAt } from './read';
import { treeOf } from './tree';
import type { Measure, Method, Side, Trace } from './types';

/** The beam as built; released, under the loads; or released, under a unit value of one redundant, in its sense. */
export type StateKind = 'built' | 'released' | number;

const JUMP = 1e-9;

/** Reactions, shear and moment of the beam in one state, by equilibrium. */
export class State {
  private readonly once = new Once();
  private readonly parts: readonly BeamPart[];

  constructor(
    readonly beam: LetteredBeam,
    readonly kind: StateKind,
    /** How a redundant was found; asked for by the beam as built only. */
    private readonly redundant: (index: number) => Trace,
  ) {
    const { parts } = beam.worked;
    this.parts = typeof kind === 'number' ? parts.map((part) => ({ ...part, loads: [] })) : parts;
  }

  get diagrams(): Diagrams {
    return this.solved.diagrams;
  }

  /** What a support carries: up, or in its fixing sense; null where it holds nothing that way. */
  reaction(support: number, component: 'vertical' | 'moment'): Trace | null {
    const named = this.beam.named.supports.find(({ index }) => index === support)!;
    const tex = component === 'vertical' ? reactionTex(named) : fixingTex(named);
    const isHeld = this.parts.some(({ actions }) => actions.some((action) => action.tex === tex));
    const trace = isHeld ? this.letter(tex) : null;
    return trace?.value === 0 ? null : trace;
  }

  /** A force or moment that the statics name, else what was given. */
  letter(tex: string): Trace {
    const { unknowns } = this.beam.worked;
    const i = unknowns.findIndex((unknown) => unknown.tex === tex);
    if (i >= 0) return this.kind === 'built' ? this.redundant(i) : this.unitValue(i);
    const isForce = this.parts.some(({ actions }) => actions.some((action) => action.tex === tex));
    return isForce ? this.once.get(tex, () => this.balanced(tex)) : this.beam.given(tex);
  }

  moment(spot: Spot, side: Side): Trace {
    return this.section('moment', spot, side, {
      name: 'Moment',
      symbol: 'M',
      note: (words) => `Moments about the section ${words}, of what acts on one side of it.`,
    });
  }

  shear(spot: Spot, side: Side): Trace {
    return this.section('shear', spot, side, {
      name: 'Shear',
      symbol: 'V',
      note: (words) => `Vertical forces on one side of the section ${words}.`,
    });
  }

  private section(
    quantity: 'moment' | 'shear',
    spot: Spot,
    asked: Side,
    { name, symbol, note }: { name: string; symbol: string; note: (words: string) => string },
  ): Trace {
    const { x } = spot;
    const { givens, named } = this.beam;
    const side = givens.isSame(x, 0) ? 'right' : givens.isSame(x, named.beam.length) ? 'left' : asked;
    return this.once.get(`${quantity} ${x} ${side}`, () => {
      const at = this.beam.at(spot);
      const part = this.partAt(x, side);
      const sum = quantity === 'moment' ? momentFrom : shearFrom;
      const [left, right] = (['left', 'right'] as const).map((from) =>
        sum(named, part, { x, at, side, from, isSame: (place) => givens.isSame(place, x) }),
      );
      const words = givens.placeWords(x);
      const jumps = this.jumpsAt(this.diagrams[quantity], x);
      return this.worked(
        {
          label: `${this.name(name)} ${words}${jumps ? `, just ${side}` : ''}`,
          symbol: this.indexed(symbol),
          value: this.signed(valueAt(this.diagrams[quantity], x, side)),
          measure: this.measure(quantity === 'moment' ? 'moment' : 'force'),
        },
        'equilibrium',
        left!.length <= right!.length ? left! : right!,
        note(words),
      );
    });
  }

  /** Line loads just right of a place: their intensity there, and by how much it grows along the beam. */
  loading(spot: Spot): { intensity: Expression; rate: Expression } {
    const at = this.beam.at(spot);
    const lines = this.linesAt(spot.x).map(({ from, to, w0, w1 }) => {
      const growth = subtract(w1, w0);
      const rate = growth.length === 0 ? ZERO : divide(growth, subtract(to, from));
      return { rate, intensity: rate.length === 0 ? w0 : add(w0, multiply(rate, subtract(at, from))) };
    });
    return {
      intensity: add(...lines.map(({ intensity }) => intensity)),
      rate: add(...lines.map(({ rate }) => rate)),
    };
  }

  /** A value from a formula in this state's letters; of a bare letter, that itself. */
  worked(head: Head, method: Method, expression: Expression, note = ''): Trace {
    const { rank, named } = this.beam;
    const turned = add(
      oriented(this.inState(expression), (tex) => (named.letters.has(tex) ? named.letters.value(tex) : 1)),
    );
    const tree = treeOf(turned, rank);
    if (typeof tree === 'string') return this.letter(tree);
    if (turned.length > 0 && symbolsOf(turned).length === 0)
      return constant(head, 'Statics of the released beam');
    return formula(head, { method, tree, note }, () =>
      symbolsOf(turned).map((name) => ({ name, trace: this.letter(name) })),
    );
  }

  private get solved(): { diagrams: Diagrams; reactions: readonly Reaction[] } {
    const { beam, kind } = this;
    if (kind === 'built') return beam.worked.solution;
    return kind === 'released' ? beam.released.loads : beam.released.units[kind]!;
  }

  /** A unit state is in the sense of its redundant. */
  signed(value: number): number {
    return typeof this.kind === 'number' ? value * this.beam.worked.unknowns[this.kind]!.sense + 0 : value;
  }

  /** A unit force makes moments that are lengths, and a unit moment forces that are one over a length. */
  measure(of: 'force' | 'moment'): Measure {
    if (typeof this.kind !== 'number') return of;
    const isForce = this.beam.worked.unknowns[this.kind]!.kind === 'reaction';
    if (of === 'moment') return isForce ? 'position' : 'ratio';
    return isForce ? 'ratio' : 'curvature';
  }

  private balanced(tex: string): Trace {
    const { named, worked, givens } = this.beam;
    const found = equilibrium(named, this.parts, worked.unknowns).find((one) => one.tex === tex)!;
    const { about, support } = found;
    const isCouple = support !== null && fixingTex(support) === tex;
    const reaction = support && this.solved.reactions[support.index]!;
    const value = reaction
      ? isCouple
        ? reaction.moment * fixingSense(named, support)
        : reaction.vertical
      : valueAt(this.diagrams.shear, this.sectionOf(tex), 'right');
    const name = support
      ? `${isCouple ? 'Fixing moment' : 'Reaction'} at ${support.letter}`
      : `Shear ${givens.placeWords(this.sectionOf(tex))}`;
    return this.worked(
      {
        label: this.name(name),
        symbol: this.indexed(tex),
        value: this.signed(value),
        measure: isCouple ? this.measure('moment') : this.reactionMeasure(),
      },
      'equilibrium',
      found.value,
      about ? `Moments about the point ${givens.placeWords(about.x)}.` : 'Vertical forces.',
    );
  }

  private reactionMeasure(): Measure {
    return typeof this.kind === 'number' ? this.measure('force') : 'reaction';
  }

  private sectionOf(tex: string): number {
    return this.parts.flatMap(({ actions }) => actions).find((action) => action.tex === tex)!.x;
  }

  private unitValue(i: number): Trace {
    const { tex, kind } = this.beam.worked.unknowns[i]!;
    const value = this.kind === i ? 1 : 0;
    return constant(
      {
        label: value === 1 ? 'Unit value of the redundant' : 'Redundant, released',
        symbol: tex,
        value,
        measure: typeof this.kind === 'number' ? 'ratio' : kind === 'reaction' ? 'force' : 'moment',
      },
      'The released beam of the force method',
    );
  }

  /** Released, a redundant is nothing or 1. */
  private inState(expression: Expression): Expression {
    if (this.kind === 'built') return expression;
    const { unknowns } = this.beam.worked;
    const replaced = unknowns.map(({ tex }, i) => [tex, this.kind === i ? number(1) : ZERO] as const);
    return substitute(expression, Object.fromEntries(replaced));
  }

  private name(what: string): string {
    const { unknowns } = this.beam.worked;
    if (this.kind === 'built' || unknowns.length === 0) return what;
    if (this.kind === 'released') return `${what} of the released beam`;
    const { letter, kind: own } = unknowns[this.kind]!;
    const unit = own === 'reaction' ? 'a unit reaction' : 'a unit moment';
    return `${what} for ${unit} at ${letter}`;
  }

  private indexed(tex: string): string {
    const { unknowns } = this.beam.worked;
    if (this.kind === 'built' || unknowns.length === 0) return tex;
    const index = this.kind === 'released' ? '0' : unknowns[this.kind]!.index;
    return `{${tex}}^{(${index})}`;
  }

  private partAt(x: number, side: Side): BeamPart {
    const holds = ({ from, to }: BeamPart) =>
      side === 'left' ? (from < x && x <= to) || (x === 0 && from === 0) : from <= x && x < to;
    return this.parts.find(holds) ?? this.parts.at(-1)!;
  }

  private jumpsAt(diagram: Piecewise, x: number): boolean {
    const [left, right] = evaluate(diagram, x);
    return Math.abs(left - right) > JUMP * magnitude(diagram);
  }

  private linesAt(x: number): Line[] {
    const { named, givens } = this.beam;
    return this.partAt(x, 'right').loads.flatMap((load): Line[] => {
      if (load.kind !== 'line') return [];
      const [from, to] = [named.letters.of(load.from), named.letters.of(load.to)];
      const isOver = (from < x || givens.isSame(from, x)) && x < to && !givens.isSame(to, x);
      return isOver ? [load] : [];
    });
  }
}

type Line = Extract<NamedLoad, { kind: 'line' }>;
