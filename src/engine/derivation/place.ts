import { add, constant, type Expression, expand, multiply, subtract, symbolsOf, ZERO } from '../chart/index';
import type { Letters } from './symbols';
import type { NamedLength } from './types';

/** Positions along the beam as formulas of its lengths. */
export class Places {
  private readonly known: { readonly x: number; readonly at: Expression; isStart: boolean }[] = [
    { x: 0, at: ZERO, isStart: true },
  ];

  /** What each numbered letter of a length is the distance between. */
  readonly distances = new Map<string, { readonly from: number; readonly to: number }>();

  constructor(
    private readonly letters: Letters,
    private readonly length: number,
    lengths: readonly NamedLength[],
  ) {
    this.name(lengths);
  }

  /** The position as a formula; null where it has none yet. */
  find(x: number): Expression | null {
    return this.known.find((place) => this.isSame(place.x, x))?.at ?? null;
  }

  /** The position of a support, a hinge or an end: its distance from the one before it gets a letter. */
  span(x: number, before: number): Expression {
    const found = this.known.find((place) => this.isSame(place.x, x));
    if (found) found.isStart = true;
    if (found) return found.at;
    const from = this.find(before) ?? this.load(before);
    return this.remember(x, add(from, this.distance('L', before, x)), true);
  }

  /**
   * The position of anything else: halfway between supports and ends it is half of that length, and elsewhere its
   * distance from the one at its left gets a letter.
   */
  load(x: number): Expression {
    const found = this.find(x);
    if (found) return found;
    const starts = this.known.filter(({ isStart }) => isStart).sort((a, b) => a.x - b.x);
    const from = starts.findLast((place) => place.x < x)!;
    const next = starts.find((place) => place.x > x);
    if (next && this.isSame(x - from.x, next.x - x)) {
      const half = multiply(constant({ n: 1, d: 2 }), expand(subtract(next.at, from.at)));
      return this.remember(x, expand(add(from.at, half)));
    }
    return this.remember(x, add(from.at, this.distance('a', from.x, x)));
  }

  private distance(letter: string, from: number, to: number): Expression {
    const length = this.letters.number(letter, to - from, 'length');
    for (const tex of symbolsOf(length)) this.distances.set(tex, { from, to });
    return length;
  }

  /** A position with a letter of its own. */
  give(x: number, at: Expression): Expression {
    return this.remember(x, at);
  }

  /** Follows the named lengths from the left end as far as they reach; the whole beam's comes before its parts. */
  private name(lengths: readonly NamedLength[]): void {
    const isWhole = ({ from, to }: NamedLength) => this.isSame(to - from, this.length);
    const inOrder = [...lengths.filter(isWhole), ...lengths.filter((one) => !isWhole(one))];
    const usable = inOrder.filter(
      ({ from, to, tex }) => to > from && this.letters.add(tex, to - from, 'length') !== null,
    );
    for (let grown = true; grown; ) {
      grown = false;
      for (const { from, to, tex } of usable) {
        const [start, end] = [this.find(from), this.find(to)];
        const span = this.letters.define(tex, this.letters.value(tex), 'length');
        if (start && !end) this.remember(to, add(start, span));
        if (end && !start) this.remember(from, subtract(end, span));
        grown ||= (start === null) !== (end === null);
      }
    }
  }

  private remember(x: number, at: Expression, isStart = false): Expression {
    this.known.push({ x, at, isStart });
    return at;
  }

  private isSame(a: number, b: number): boolean {
    return Math.abs(a - b) <= 1e-10 * this.length;
  }
}
