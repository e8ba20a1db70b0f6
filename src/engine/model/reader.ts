import type { Fault, FaultCode } from './types';
import { metres } from './words';

/** Positions nearer than this part of the length are one. */
export const COINCIDENT = 1e-12;
/** Largest magnitude of any number, SI; far beyond any beam, and what arithmetic stays finite with. */
const LARGEST = 1e20;

export type Path = (string | number)[];

/** Collects the faults of a document while it is read. Each `read` answers null where it has reported a fault. */
export class Reader {
  readonly faults: Fault[] = [];
  private readonly points = new Map<number, number>();

  /** `length` is null where the beam's own length is at fault: then no position can be judged. */
  constructor(private readonly length: number | null) {
    if (length === null) return;
    this.snap(0);
    this.snap(length);
  }

  fail(path: Path, code: FaultCode, message: string): null {
    this.faults.push({ path, code, message });
    return null;
  }

  number(value: number, path: Path): number | null {
    if (!Number.isFinite(value))
      return this.fail(path, 'not_finite', 'This is not a finite number. Give one.');
    if (Math.abs(value) > LARGEST) {
      return this.fail(
        path,
        'out_of_range',
        `The magnitude is beyond ${LARGEST} in SI units. Check the unit.`,
      );
    }
    return value + 0; // never −0
  }

  positive(value: number, path: Path, what: string): number | null {
    const number = this.number(value, path);
    if (number === null) return null;
    if (number <= 0) return this.fail(path, 'not_positive', `${what} must be more than zero.`);
    if (number < 1 / LARGEST) {
      return this.fail(path, 'out_of_range', `${what} is below ${1 / LARGEST} in SI units. Check the unit.`);
    }
    return number;
  }

  /** A position on the beam, brought to that of a point read before which it coincides with. */
  position(value: number, path: Path): number | null {
    const x = this.number(value, path);
    if (x === null || this.length === null) return null;
    const tolerance = COINCIDENT * this.length;
    if (x < -tolerance || x > this.length + tolerance) {
      const range = `0 to ${metres(this.length)}`;
      return this.fail(path, 'out_of_range', `${metres(x)} is off the beam. Give a position from ${range}.`);
    }
    return this.snap(x);
  }

  isEnd(x: number): boolean {
    return x === 0 || x === this.length;
  }

  /** A stretch of the beam; its ends may coincide. */
  stretch(from: number, to: number, path: Path): { from: number; to: number } | null {
    const start = this.position(from, [...path, 'from']);
    const end = this.position(to, [...path, 'to']);
    if (start === null || end === null) return null;
    if (start > end) {
      const message = `It starts at ${metres(start)} and ends before that, at ${metres(end)}. Exchange the two.`;
      return this.fail([...path, 'from'], 'order', message);
    }
    return { from: start, to: end };
  }

  /** Points stand in cells as wide as the tolerance, so that only three cells can hold a coincident one. */
  private snap(x: number): number {
    const tolerance = COINCIDENT * this.length!;
    const cell = Math.floor(x / tolerance);
    for (const near of [cell, cell - 1, cell + 1]) {
      const point = this.points.get(near);
      if (point !== undefined && Math.abs(point - x) <= tolerance) return point;
    }
    this.points.set(cell, x);
    return x;
  }
}
