import type { Beam, Restraint, Segment } from '../model/index';
import { Piece, Span, Support } from './records';

/** Positions up to this many are put in order one by one, which for few is faster than the library's sort. */
const FEW = 24;

/**
 * A continuous beam as records in order from left to right: supports that hold it up, spans between those, and pieces
 * between the points where anything starts, stops or acts. Piece k lies between points k and k + 1; the one after the
 * last stands for the right end of the beam. The records are reused: there may be more than `supports` and `points`.
 */
export class Geometry {
  length = 0;
  points = 0;
  supports = 0;
  /** Shear just left of the first support, of the overhang's loads. */
  hanging = NaN;
  /** Whether any support is a spring against vertical movement. */
  sprung = false;
  /** Whether any support holds rotation; whether M jumps, there or at a couple; whether θ does, where the beam shears. */
  holds = false;
  turned = false;
  shears = false;
  readonly piece: Piece[] = [];
  readonly support: Support[] = [];
  readonly span: Span[] = [];
  /** V, M, θ and v just inside the left end of every piece, then just inside its right end: 8 numbers a piece. */
  states = new Float64Array(8 * 16);

  private marks = new Float64Array(16);
  private marked = 0;

  /**
   * Takes the beam in; false where it is none of the class: hinges, or rotation held where nothing holds the beam up.
   * The positions of its own loads become points, so that a solve may apply any of them.
   */
  take(beam: Beam): boolean {
    if (beam.hinges.length > 0 || !this.takeSupports(beam)) return false;
    this.length = beam.length;
    this.markPositions(beam);
    this.mergePoints();
    this.takeSegments(beam.segments);
    return true;
  }

  /** The number of the point at x. Fails with RangeError where there is none. */
  pointAt(x: number): number {
    const { piece } = this;
    let low = 0;
    let high = this.points - 1;
    if (x === 0) return 0;
    if (x === this.length) return high;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (piece[middle]!.from < x) low = middle + 1;
      else high = middle;
    }
    if (piece[low]!.from !== x) throw new RangeError(`no load of the beam acts or ends at ${x} m`);
    return low;
  }

  /** Length of the shortest piece, m. */
  shortest(): number {
    const { piece, points, length } = this;
    let shortest = length;
    for (let k = 0; k + 1 < points; k++) if (piece[k]!.length < shortest) shortest = piece[k]!.length;
    return shortest;
  }

  private takeSupports({ supports }: Beam): boolean {
    const { support, span } = this;
    while (support.length < supports.length) {
      support.push(new Support());
      span.push(new Span());
    }
    let count = 0;
    this.sprung = false;
    this.holds = false;
    for (let i = 0; i < supports.length; i++) {
      const { at, vertical, rotation } = supports[i]!;
      if (vertical.kind === 'free') {
        if (rotation.kind !== 'free') return false;
        continue;
      }
      const record = support[count]!;
      record.number = i;
      record.at = at;
      this.restrain(record, vertical, rotation);
      this.sortIn(count++);
    }
    this.supports = count;
    return true;
  }

  /** Brings support j, the last so far, to its place. */
  private sortIn(j: number): void {
    const { support } = this;
    const record = support[j]!;
    for (; j > 0 && support[j - 1]!.at > record.at; j--) support[j] = support[j - 1]!;
    support[j] = record;
  }

  private restrain(
    record: Support,
    vertical: Exclude<Restraint, { kind: 'free' }>,
    rotation: Restraint,
  ): void {
    record.rise = vertical.movement;
    record.give = 0;
    record.held = false;
    record.turn = 0;
    record.turnGive = 0;
    if (vertical.kind === 'spring') {
      record.give = 1 / vertical.stiffness;
      this.sprung = true;
    }
    if (rotation.kind !== 'free') {
      this.holds = true;
      record.held = true;
      record.turn = rotation.movement;
      if (rotation.kind === 'spring') record.turnGive = 1 / rotation.stiffness;
    }
  }

  /** Positions of steps, loads, and supports that hold nothing: ascending, repeats included. */
  private markPositions({ segments, supports, loads }: Beam): void {
    const most = segments.length + supports.length + 2 * loads.length;
    if (most > this.marks.length) this.marks = new Float64Array(2 * most);
    const { marks } = this;
    let count = 0;
    for (let i = 0; i + 1 < segments.length; i++) marks[count++] = segments[i]!.to;
    if (this.supports < supports.length) {
      for (let i = 0; i < supports.length; i++) {
        if (supports[i]!.vertical.kind === 'free') marks[count++] = supports[i]!.at;
      }
    }
    for (let i = 0; i < loads.length; i++) {
      const load = loads[i]!;
      if (load.kind === 'point' || load.kind === 'couple') marks[count++] = load.at;
      else {
        marks[count++] = load.from;
        marks[count++] = load.to;
      }
    }
    this.marked = count;
    if (count > FEW) marks.subarray(0, count).sort();
    else this.sortFew();
  }

  private sortFew(): void {
    const { marks, marked } = this;
    for (let i = 1; i < marked; i++) {
      const x = marks[i]!;
      let j = i;
      for (; j > 0 && marks[j - 1]! > x; j--) marks[j] = marks[j - 1]!;
      marks[j] = x;
    }
  }

  private mergePoints(): void {
    const { piece, support, marks, marked, supports, length } = this;
    while (piece.length < marked + supports + 2) piece.push(new Piece());
    if (8 * piece.length > this.states.length) this.states = new Float64Array(16 * piece.length);
    let last = 0;
    let x = 0;
    let j = 0;
    piece[0]!.from = 0;
    for (let i = 0; i <= marked; i++) {
      const next = i < marked ? marks[i]! : length;
      for (; j < supports && support[j]!.at <= next; j++) {
        const { at } = support[j]!;
        if (at > x) {
          piece[last]!.length = at - x;
          x = at;
          piece[++last]!.from = x;
        }
        support[j]!.point = last;
      }
      if (next > x) {
        piece[last]!.length = next - x;
        x = next;
        piece[++last]!.from = x;
      }
    }
    this.points = last + 1;
  }

  private takeSegments(segments: readonly Segment[]): void {
    const { piece } = this;
    const last = this.points - 1;
    this.shears = false;
    let k = 0;
    for (let i = 0; i < segments.length; i++) {
      const { to, ei, ga } = segments[i]!;
      const bending = 1 / ei;
      const shearing = ga === null ? 0 : 1 / ga;
      if (ga !== null) this.shears = true;
      for (; k < last && piece[k]!.from < to; k++) {
        piece[k]!.bending = bending;
        piece[k]!.shearing = shearing;
      }
    }
  }
}
