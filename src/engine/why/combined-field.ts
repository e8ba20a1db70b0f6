import type { Field, Local } from './field';
import type { LetteredBeam, Spot } from './lettered-beam';
import { formula, type Head, renamed } from './node';
import { positive, total } from './tree';
import type { Part, Quantity, Side, Trace } from './types';

/** One load case of a combination: a group's loads, on one span of a pattern or on the whole beam. */
export type Share = {
  /** As an index of its values: "G", "Q,AB". */
  readonly index: string;
  /** "G, permanent", "Q, imposed, span A–B". */
  readonly words: string;
  readonly factor: Trace;
  readonly field: Field;
};

/** Loads that act at once, each group times its factor: Σ γ·E. */
export class CombinedField implements Field {
  constructor(
    readonly beam: LetteredBeam,
    private readonly name: string,
    private readonly shares: readonly Share[],
  ) {}

  at(quantity: Quantity, spot: Spot, side: Side): Trace {
    const cases = this.shares.map(({ field }) => field.at(quantity, spot, side));
    const words = this.beam.givens.placeWords(spot.x);
    const { name, symbol, measure } = WORDS[quantity];
    return this.sum({ label: `${name} ${words}, ${this.name}`, symbol, measure }, cases);
  }

  local(x: number): Local {
    const locals = this.shares.map(({ field }) => field.local(x));
    const words = this.beam.givens.placeWords(x);
    const sum = (key: 'w' | 'r' | 'kappa', label: string, measure: Head['measure']) => {
      const cases = locals.map((local) => local[key]);
      if (cases.every((trace) => trace === null)) return null;
      return this.sum({ label: `${label} ${words}, ${this.name}`, symbol: '', measure }, cases);
    };
    const { EI, GA } = this.stiffness(x);
    return {
      w: sum('w', 'Line load', 'line_load'),
      r: sum('r', 'Growth of the line load', 'area_load'),
      kappa: sum('kappa', 'Free curvature', 'curvature'),
      EI,
      GA,
    };
  }

  reaction(support: number, component: 'vertical' | 'moment'): Trace | null {
    const cases = this.shares.map(({ field }) => field.reaction(support, component));
    const first = cases.find((trace) => trace !== null);
    if (!first) return null;
    const { label, symbol, measure } = first;
    return this.sum({ label: `${label}, ${this.name}`, symbol, measure }, cases);
  }

  /** Any quantity that adds up: its value in each case, or null where it is nothing. */
  sum(head: Omit<Head, 'value'>, cases: readonly (Trace | null)[]): Trace {
    const acting = this.shares.flatMap(({ index, words, factor }, k) => {
      const found = cases[k];
      if (!found) return [];
      const trace = renamed(found, { label: `${found.label}, ${words}` });
      return [{ index, factor, trace }];
    });
    const value = acting.reduce((sum, { factor, trace }) => sum + factor.value * trace.value, 0);
    const name = (index: string) => `{${head.symbol || 'w'}}_{\\mathrm{${index}}}`;
    const tree = total(acting.map(({ index, factor }) => positive(['*', factor.symbol, name(index)])));
    return formula({ ...head, value }, { method: 'combination', tree }, () =>
      acting.flatMap(({ index, factor, trace }): Part[] => [
        { name: factor.symbol, trace: factor },
        { name: name(index), trace },
      ]),
    );
  }

  private stiffness(x: number): Pick<Local, 'EI' | 'GA'> {
    const [first] = this.shares;
    return first ? first.field.local(x) : { EI: this.beam.givens.parameters.stiffness(), GA: null };
  }
}

const WORDS = {
  shear: { name: 'Shear', symbol: 'V', measure: 'force' },
  moment: { name: 'Moment', symbol: 'M', measure: 'moment' },
  slope: { name: 'Slope', symbol: '\\theta', measure: 'slope' },
  deflection: { name: 'Deflection', symbol: '\\delta', measure: 'deflection' },
} as const;
