import type { Beam, Restraint, Segment } from '../model/index';

/** Points a workspace has room for at first; it doubles as it must. */
const ROOM = 16;

/**
 * A continuous beam as arrays, without its loads: points where anything starts, stops or acts, pieces between them,
 * supports that hold the beam up, and spans between those. All ascending; piece k lies between points k and k + 1,
 * span j between supports j and j + 1. The arrays are reused and may be longer than what they hold.
 */
export class Geometry {
  length = 0;
  points = 0;
  /** Positions of the points, m. */
  x = new Float64Array(ROOM);
  /** Of each piece: its length, 1/EI, and 1/GA (0 where it does not shear). */
  h = new Float64Array(ROOM);
  bending = new Float64Array(ROOM);
  shearing = new Float64Array(ROOM);

  supports = 0;
  /** Of each support: its number in the document, its point, and its position. */
  number = new Int32Array(ROOM);
  point = new Int32Array(ROOM);
  at = new Float64Array(ROOM);
  /** 1/k against vertical movement (0: rigid) and the prescribed rise. */
  give = new Float64Array(ROOM);
  rise = new Float64Array(ROOM);
  /** 1 where rotation is held, 1/k against it (0: rigid), and the prescribed rotation. */
  held = new Uint8Array(ROOM);
  turnGive = new Float64Array(ROOM);
  turn = new Float64Array(ROOM);
  /** Whether any support is a spring against vertical movement. */
  sprung = false;

  private marks = new Float64Array(ROOM);

  /**
   * Takes the beam in; false where it is none of the class: hinges, or rotation held where nothing holds the beam up.
   * The positions of its own loads become points, so that a solve may apply any of them.
   */
  take(beam: Beam): boolean {
    if (beam.hinges.length > 0 || !this.takeSupports(beam)) return false;
    this.length = beam.length;
    this.mergePoints(this.collectMarks(beam));
    this.takeSegments(beam.segments);
    return true;
  }

  /** The number of the point at x. Fails with RangeError where there is none. */
  pointAt(x: number): number {
    const positions = this.x;
    let low = 0;
    let high = this.points - 1;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (positions[middle]! < x) low = middle + 1;
      else high = middle;
    }
    if (positions[low] !== x) throw new RangeError(`no load of the beam acts or ends at ${x} m`);
    return low;
  }

  private takeSupports({ supports }: Beam): boolean {
    this.fitSupports(supports.length);
    const { number, at } = this;
    let count = 0;
    for (let i = 0; i < supports.length; i++) {
      const support = supports[i]!;
      if (support.vertical.kind === 'free') {
        if (support.rotation.kind !== 'free') return false;
        continue;
      }
      let j = count++;
      for (; j > 0 && at[j - 1]! > support.at; j--) {
        at[j] = at[j - 1]!;
        number[j] = number[j - 1]!;
      }
      at[j] = support.at;
      number[j] = i;
    }
    this.supports = count;
    this.sprung = false;
    for (let j = 0; j < count; j++)
      this.restrain(j, supports[number[j]!]!.vertical, supports[number[j]!]!.rotation);
    return true;
  }

  private restrain(j: number, vertical: Restraint, rotation: Restraint): void {
    this.give[j] = vertical.kind === 'spring' ? 1 / vertical.stiffness : 0;
    this.rise[j] = vertical.kind === 'free' ? 0 : vertical.movement;
    this.held[j] = rotation.kind === 'free' ? 0 : 1;
    this.turnGive[j] = rotation.kind === 'spring' ? 1 / rotation.stiffness : 0;
    this.turn[j] = rotation.kind === 'free' ? 0 : rotation.movement;
    if (vertical.kind === 'spring') this.sprung = true;
  }

  /** Positions strictly inside the beam, beside those of what holds it up; ascending, repeats included. */
  private collectMarks({ length, segments, supports, loads }: Beam): number {
    this.fitMarks(segments.length + supports.length + 2 * loads.length);
    const { marks } = this;
    let count = 0;
    let ascending = true;
    const mark = (x: number) => {
      if (x <= 0 || x >= length) return;
      if (count > 0 && marks[count - 1]! > x) ascending = false;
      marks[count++] = x;
    };
    for (let i = 0; i + 1 < segments.length; i++) mark(segments[i]!.to);
    for (let i = 0; i < supports.length; i++)
      if (supports[i]!.vertical.kind === 'free') mark(supports[i]!.at);
    for (let i = 0; i < loads.length; i++) {
      const load = loads[i]!;
      if (load.kind === 'point' || load.kind === 'couple') mark(load.at);
      else {
        mark(load.from);
        mark(load.to);
      }
    }
    if (!ascending) marks.subarray(0, count).sort();
    return count;
  }

  private mergePoints(marked: number): void {
    this.fitPoints(marked + this.supports + 2);
    const { x, at, point, marks, supports, length } = this;
    let last = 0;
    let j = 0;
    x[0] = 0;
    for (let i = 0; i <= marked; i++) {
      const next = i < marked ? marks[i]! : length;
      for (; j < supports && at[j]! <= next; j++) {
        if (at[j]! > x[last]!) x[++last] = at[j]!;
        point[j] = last;
      }
      if (next > x[last]!) x[++last] = next;
    }
    this.points = last + 1;
  }

  private takeSegments(segments: readonly Segment[]): void {
    const { x, h, bending, shearing } = this;
    let k = 0;
    for (let i = 0; i < segments.length; i++) {
      const { to, ei, ga } = segments[i]!;
      const bends = 1 / ei;
      const shears = ga === null ? 0 : 1 / ga;
      for (; k + 1 < this.points && x[k + 1]! <= to; k++) {
        h[k] = x[k + 1]! - x[k]!;
        bending[k] = bends;
        shearing[k] = shears;
      }
    }
  }

  private fitSupports(count: number): void {
    if (count <= this.at.length) return;
    const room = 2 * count;
    this.number = new Int32Array(room);
    this.point = new Int32Array(room);
    this.at = new Float64Array(room);
    this.give = new Float64Array(room);
    this.rise = new Float64Array(room);
    this.held = new Uint8Array(room);
    this.turnGive = new Float64Array(room);
    this.turn = new Float64Array(room);
  }

  private fitMarks(count: number): void {
    if (count > this.marks.length) this.marks = new Float64Array(2 * count);
  }

  private fitPoints(count: number): void {
    if (count <= this.x.length) return;
    const room = 2 * count;
    this.x = new Float64Array(room);
    this.h = new Float64Array(room);
    this.bending = new Float64Array(room);
    this.shearing = new Float64Array(room);
  }
}
