import { type ForceMethodParts, forceMethod } from '../beam/index';
import { type Expression, symbolsOf } from '../chart/index';
import { stillBeam } from '../combination/index';
import { fixingSense, fixingTex, type NamedBeam, nameBeam, type Worked, work } from '../derivation/index';
import type { LineLoad, Load } from '../model/index';
import type { Givens } from './givens';
import { constant, formula, leaf, Once, renamed } from './node';
import { valueAt } from './read';
import { positive, total } from './tree';
import type { Part, Trace } from './types';

/** A load of the subject's beam, or a part of one; without a place in its list, a unit load. */
export type CaseLoad = { readonly load: Load; readonly index: number | null };

/** A place along the beam and where it comes from. */
export type Spot = { readonly x: number; readonly trace: Trace };

/** A place that was chosen, not given. */
export const station = (x: number, label: string): Trace =>
  leaf({ label, symbol: 'x', value: x, measure: 'position' }, { kind: 'station' });

const SAME = 1e-12;

/** The subject's beam under some loads, worked in letters, each of which says what was given for it. */
export class LetteredBeam {
  readonly named: NamedBeam;
  readonly worked: Worked;
  private readonly letters = new Once();
  private readonly chosen = new Map<string, Trace>();
  private readonly spots: Spot[] = [];
  private split: ForceMethodParts | null = null;

  constructor(
    readonly givens: Givens,
    readonly loads: readonly CaseLoad[],
    moves: boolean,
    /** A place that the template does not give. */
    spot?: Spot,
  ) {
    if (spot) this.know(spot);
    const { subject } = givens;
    const { dimensions, loadNames, beam: document } = subject.instance;
    const beam = {
      ...(moves ? subject.beam : stillBeam(subject.beam)),
      loads: loads.map(({ load }) => load),
    };
    const texOf = (index: number | null) => (index === null ? '' : (loadNames[index]?.tex ?? ''));
    const names = { lengths: dimensions, loads: loads.map(({ index }) => ({ tex: texOf(index) })) };
    const { redundants, system } = { redundants: document.redundants, system: subject.system };
    this.named = nameBeam({ beam, names, redundants, system });
    this.worked = work(this.named, redundants);
    this.nameForces();
  }

  /** The released beam under the loads and under unit redundants. */
  get released(): ForceMethodParts {
    const { beam } = this.named;
    this.split ??= forceMethod(
      beam,
      this.worked.unknowns.map(({ redundant }) => redundant),
    );
    return this.split;
  }

  /** A place that the template does not give is remembered. */
  know(spot: Spot): void {
    this.spots.push(spot);
  }

  /** The place as a formula; one that has none yet gets a letter. */
  at(spot: Spot): Expression {
    const { x, trace } = spot;
    const { places, letters } = this.named;
    const found = places.find(x);
    if (found) return found;
    let tex = 'x';
    for (let k = 2; letters.has(tex); k++) tex = `x_{${k}}`;
    this.chosen.set(tex, trace);
    this.know(spot);
    return places.give(x, letters.define(tex, x, 'length'));
  }

  /** A place where something starts, stops or acts. */
  position(x: number): Trace {
    const { givens } = this;
    const found = givens.position(x) ?? this.spots.find((spot) => givens.isSame(spot.x, x))?.trace;
    return found ?? station(x, 'Section of a redundant');
  }

  spot(x: number): Spot {
    return { x, trace: this.position(x) };
  }

  /** What was given for a letter: a length, a load, a stiffness, a movement of a support. */
  given(tex: string): Trace {
    return this.letters.get(tex, () => {
      const found =
        this.chosen.get(tex) ??
        this.load(tex) ??
        this.stiffness(tex) ??
        this.support(tex) ??
        this.length(tex);
      if (!found) throw new RangeError(`the letter ${tex} was not given`);
      return renamed(found, { symbol: tex });
    });
  }

  /** In a product, what a letter stands behind. */
  readonly rank = (tex: string): number => (this.named.letters.has(tex) ? this.named.letters.rank(tex) : 0);

  private nameForces(): void {
    const { letters, supports } = this.named;
    const { unknowns, values, solution, parts } = this.worked;
    unknowns.forEach(({ tex, kind }, i) => {
      letters.add(tex, values[i]!, kind === 'reaction' ? 'force' : 'moment', 'found');
    });
    for (const { tex, kind, x } of parts.flatMap(({ actions }) => actions)) {
      const support = supports.find((one) => fixingTex(one) === tex);
      const reaction = solution.reactions[supports.find((one) => one.x === x)?.index ?? -1];
      const isShear = tex.startsWith('V');
      const force = isShear ? valueAt(solution.diagrams.shear, x, 'right') : (reaction?.vertical ?? 0);
      const couple = support ? (reaction?.moment ?? 0) * fixingSense(this.named, support) : 0;
      letters.add(tex, kind === 'force' ? force : couple, kind === 'force' ? 'force' : 'moment', 'found');
    }
  }

  private load(tex: string): Trace | null {
    for (const { fine, of } of this.named.groups)
      for (const load of fine) {
        if (load.kind === 'point' && symbolsOf(load.p).includes(tex)) return this.sizes(of, 'p');
        if (load.kind === 'couple' && symbolsOf(load.m).includes(tex)) return this.sizes(of, 'm');
        if (load.kind === 'curvature' && symbolsOf(load.kappa).includes(tex)) return this.sizes(of, 'kappa');
        if (load.kind !== 'line') continue;
        const end = symbolsOf(load.w0).includes(tex)
          ? load.from
          : symbolsOf(load.w1).includes(tex)
            ? load.to
            : null;
        if (end) return this.sizes(of, this.named.letters.of(end));
      }
    return null;
  }

  /** A size of all loads that share a letter; of line loads, at a place. */
  private sizes(of: readonly number[], which: 'p' | 'm' | 'kappa' | number): Trace {
    const each = of.map((i) => this.size(this.loads[i]!, which));
    const [first] = each;
    if (each.length === 1 && first) return first;
    const symbols = each.map(({ symbol }) => symbol);
    const areTold = !symbols.includes('') && new Set(symbols).size === symbols.length;
    const names = areTold ? symbols : each.map((_, k) => `w_{${k + 1}}`);
    return formula(
      {
        label: 'Load, all groups',
        symbol: '',
        value: each.reduce((sum, { value }) => sum + value, 0),
        measure: first!.measure,
      },
      { method: 'sum', tree: total(names.map(positive)) },
      () => each.map((trace, k): Part => ({ name: names[k]!, trace })),
    );
  }

  private size({ load, index }: CaseLoad, which: 'p' | 'm' | 'kappa' | number): Trace {
    if (index === null) {
      const isForce = load.kind === 'point';
      return constant(
        {
          label: isForce ? 'Unit load, down' : 'Unit couple, clockwise',
          symbol: '',
          value: isForce ? load.p : -1,
          measure: 'ratio',
        },
        'Theorem of the unit load',
      );
    }
    const { givens } = this;
    if (typeof which !== 'number') return givens.loadSize(index, which);
    const whole = givens.subject.beam.loads[index] as LineLoad;
    if (whole.w0 === whole.w1 || givens.isSame(which, whole.from)) return givens.loadSize(index, 'w0');
    if (givens.isSame(which, whole.to)) return givens.loadSize(index, 'w1');
    return this.between(whole, index, which);
  }

  /** A load that varies in a straight line, between its ends. */
  private between({ from, to, w0, w1 }: LineLoad, index: number, x: number): Trace {
    const { givens } = this;
    return formula(
      {
        label: `Line load ${givens.placeWords(x)}`,
        symbol: '',
        value: w0 + ((w1 - w0) * (x - from)) / (to - from),
        measure: 'line_load',
      },
      {
        method: 'definition',
        tree: ['+', 'w_0', ['/', ['*', ['-', 'w_1', 'w_0'], ['-', 'x', 'x_0']], ['-', 'x_1', 'x_0']]],
      },
      () => [
        { name: 'w_0', trace: givens.loadSize(index, 'w0') },
        { name: 'w_1', trace: givens.loadSize(index, 'w1') },
        { name: 'x', trace: this.position(x) },
        { name: 'x_0', trace: this.position(from) },
        { name: 'x_1', trace: this.position(to) },
      ],
    );
  }

  private stiffness(tex: string): Trace | null {
    const { segments } = this.named;
    const k = segments.findIndex(({ ei }) => symbolsOf(ei).includes(tex));
    if (k >= 0) return this.givens.stiffness(k, tex);
    const isShear = segments.some(({ ga }) => ga && symbolsOf(ga).includes(tex));
    return isShear ? this.givens.parameters.shearStiffness(this.named.letters.value(tex)) : null;
  }

  private support(tex: string): Trace | null {
    for (const { letter, index } of this.named.supports) {
      if (tex === `k_{${letter}}`) return this.givens.spring(index, 'kv');
      if (tex === `k_{\\theta ${letter}}`) return this.givens.spring(index, 'kr');
      if (tex === `\\Delta_{${letter}}`) return this.givens.supportMovement(index, 'rise');
      if (tex === `\\varphi_{${letter}}`) return this.givens.supportMovement(index, 'rotation');
    }
    return null;
  }

  private length(tex: string): Trace | null {
    const { dimensions } = this.givens.subject.instance;
    const named = dimensions.find((one) => one.tex === tex && one.to > one.from);
    const ends = named ?? this.named.places.distances.get(tex);
    if (!ends) return null;
    if (named) {
      const { parameters } = this.givens;
      const trace = parameters.symbol(named.symbol, parameters.whole);
      if (Math.abs(trace.value - (named.to - named.from)) <= SAME * Math.abs(trace.value)) return trace;
    }
    return this.distance(ends.from, ends.to);
  }

  /** The length between two places. */
  distance(from: number, to: number): Trace {
    const end = this.position(to);
    if (from === 0) return end;
    return formula(
      {
        label: `Length from ${this.words(from)} to ${this.words(to)}`,
        symbol: '\\ell',
        value: to - from,
        measure: 'position',
      },
      { method: 'definition', tree: ['-', 'x_1', 'x_0'] },
      () => [
        { name: 'x_1', trace: end },
        { name: 'x_0', trace: this.position(from) },
      ],
    );
  }

  private words(x: number): string {
    return this.givens.placeWords(x).replace(/^at /, '');
  }
}
