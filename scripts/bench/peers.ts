import * as math from 'mathjs';
import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import type { Beam } from '@/engine/model/index';
import { Answer, type Equations, Frame } from './frame';

/** A solver of all beams of one case, which answers in arrays that it reuses. */
export type Peer = (beam: Beam) => Answer;

/** `perSpan`: elements from support to support, or 0 for one per stretch between supports and loads. */
function peer(beam: Beam, perSpan: number, equationsOf: (unknowns: number) => Equations): Peer {
  const frame = new Frame(beam, perSpan);
  const equations = equationsOf(frame.unknowns);
  const answer = new Answer(beam.supports.length);
  return (next) => {
    frame.solve(next, equations, answer);
    return answer;
  };
}

export const mlMatrix = (beam: Beam, perSpan: number): Peer => peer(beam, perSpan, (n) => new Dense(n));

export const mathjs = (beam: Beam, perSpan: number): Peer =>
  peer(beam, perSpan, (n) => (perSpan === 0 ? new Rows(n) : new Sparse(n)));

/** ml-matrix: Cholesky of the full matrix; it has no other for symmetric ones. */
class Dense implements Equations {
  private readonly stiffness: Matrix;
  private readonly right: Matrix;
  private movements: Matrix;

  constructor(size: number) {
    this.stiffness = Matrix.zeros(size, size);
    this.right = Matrix.zeros(size, 1);
    this.movements = this.right;
  }

  clear(): void {
    this.stiffness.fill(0);
    this.right.fill(0);
  }

  add(row: number, column: number, value: number): void {
    this.stiffness.set(row, column, this.stiffness.get(row, column) + value);
  }

  load(row: number, value: number): void {
    this.right.set(row, 0, this.right.get(row, 0) + value);
  }

  solve(): void {
    this.movements = new CholeskyDecomposition(this.stiffness).solve(this.right);
  }

  movement(row: number): number {
    return this.movements.get(row, 0);
  }
}

/** mathjs on plain arrays, its fastest for few unknowns: LU. */
class Rows implements Equations {
  private readonly stiffness: number[][];
  private readonly right: number[];
  private movements: number[][] = [];

  constructor(size: number) {
    this.stiffness = Array.from({ length: size }, () => new Array<number>(size).fill(0));
    this.right = new Array<number>(size).fill(0);
  }

  clear(): void {
    for (const row of this.stiffness) row.fill(0);
    this.right.fill(0);
  }

  add(row: number, column: number, value: number): void {
    this.stiffness[row]![column]! += value;
  }

  load(row: number, value: number): void {
    this.right[row]! += value;
  }

  solve(): void {
    this.movements = math.lusolve(this.stiffness, this.right) as number[][];
  }

  movement(row: number): number {
    return this.movements[row]![0]!;
  }
}

type Columns = { values: number[]; index: number[]; ptr: number[]; size: [number, number]; datatype: string };

/** The class is there, but its types leave it out. */
const { SparseMatrix } = math as unknown as { SparseMatrix: new (columns: Columns) => math.Matrix };

/** mathjs on a sparse matrix, made of columns that hold the band. */
class Sparse implements Equations {
  private readonly band: Float64Array;
  private readonly right: number[];
  private movements: number[][] = [];

  constructor(private readonly size: number) {
    this.band = new Float64Array(7 * size);
    this.right = new Array<number>(size).fill(0);
  }

  clear(): void {
    this.band.fill(0);
    this.right.fill(0);
  }

  add(row: number, column: number, value: number): void {
    this.band[7 * column + row - column + 3]! += value;
  }

  load(row: number, value: number): void {
    this.right[row]! += value;
  }

  solve(): void {
    const { size, band } = this;
    const [values, index, ptr] = [[] as number[], [] as number[], [0]];
    for (let column = 0; column < size; column++) {
      for (let row = Math.max(0, column - 3); row <= Math.min(size - 1, column + 3); row++) {
        const value = band[7 * column + row - column + 3]!;
        if (value === 0) continue;
        values.push(value);
        index.push(row);
      }
      ptr.push(values.length);
    }
    const matrix = new SparseMatrix({ values, index, ptr, size: [size, size], datatype: 'number' });
    this.movements = (math.lusolve(matrix, this.right) as unknown as { toArray(): number[][] }).toArray();
  }

  movement(row: number): number {
    return this.movements[row]![0]!;
  }
}
