import { Wide } from '../linear/index';
import type { Restraint } from '../model/index';
import { dynamicStiffness, type Piece, type Vibrating } from './piece';

/** Entries of one row left of the diagonal: a piece couples (v, ψ) at its ends, and a hinge adds one rotation between. */
const BAND = 4;
/** Half-waves of a piece's part: with fewer than one, no part vibrates by itself between ends that are held. */
const LARGEST_PART = 3;
/** In the place of a pivot that is exactly zero: ω is a natural frequency to the last digit carried. */
const NO_PIVOT = Wide.of(2 ** -300);

/** What the dynamic stiffness matrix tells at ω². */
export type Count = {
  readonly omega2: number;
  /** How many natural frequencies lie below. */
  readonly below: number;
  /** ln |det|: with the sign of (−1)^below a smooth function of ω², zero at every natural frequency. */
  readonly log: number;
};

/**
 * How many natural frequencies lie below ω, by Wittrick and Williams: the negative pivots of the dynamic stiffness
 * matrix at ω, and those of the parts between held ends. There are none of the latter: a part whose wave number β times
 * its length is below π lies below the first frequency of a pinned part, sin βh = 0, and holding its ends more can only
 * raise that. So the pieces are cut into parts of βh ≤ 3 at `largest`, an ω² no smaller: determinants can be compared only
 * where the parts are the same.
 *
 * Source: W. H. Wittrick, F. W. Williams, "A general algorithm for computing natural frequencies of elastic structures",
 * Quarterly Journal of Mechanics and Applied Mathematics 24 (1971).
 */
export function countBelow({ beam, pieces, lumped }: Vibrating, omega2: number, largest: number): Count {
  const matrix = new Indefinite();
  const hinges = new Set(beam.hinges);
  const supports = new Map(beam.supports.map((support) => [support.at, support]));
  const free = (restraint: Restraint | undefined) => (restraint?.kind === 'rigid' ? null : matrix.unknown());
  const node = (at: number): Node => {
    const support = supports.get(at);
    const deflection = free(support?.vertical);
    const left = free(support?.rotation);
    matrix.hold(deflection, support?.vertical);
    matrix.hold(left, support?.rotation);
    const mass = lumped.get(at);
    if (mass) matrix.add(deflection, deflection, Wide.of(-mass).times(omega2));
    return { deflection, left, right: hinges.has(at) ? matrix.unknown() : left };
  };
  let start = node(0);
  const known = new Map<string, Wide[][]>();
  for (const piece of pieces) {
    for (const part of partsOf(piece, largest)) {
      const end = node(part.to);
      const unknowns = [start.deflection, start.right, end.deflection, end.left];
      const stiffness = stiffnessOf(part, omega2, known);
      unknowns.forEach((i, a) => {
        for (let b = 0; b <= a; b++) matrix.add(i, unknowns[b]!, stiffness[a]![b]!);
      });
      start = end;
    }
  }
  return { omega2, ...matrix.eliminate() };
}

/** Pieces that are alike have one stiffness. */
function stiffnessOf(piece: Piece, omega2: number, known: Map<string, Wide[][]>): Wide[][] {
  const { from, to, ei, ga, start, end } = piece;
  const key = [to - from, ei, ga, start, end].join();
  const stiffness = known.get(key) ?? dynamicStiffness(piece, omega2);
  known.set(key, stiffness);
  return stiffness;
}

/** The numbers of a point's unknowns; null where it is held. */
type Node = { deflection: number | null; left: number | null; right: number | null };

/** The piece cut into equal parts, each shorter than a half-wave of its heaviest mass. */
function partsOf({ from, to, start, end, ...stiffness }: Piece, omega2: number): Piece[] {
  const load = Math.max(start, end) * omega2;
  const shear = stiffness.ga === null ? 0 : load / stiffness.ga;
  const wave = Math.sqrt((shear + Math.sqrt(shear ** 2 + (4 * load) / stiffness.ei)) / 2);
  const count = Math.max(1, Math.ceil((wave * (to - from)) / LARGEST_PART));
  return Array.from({ length: count }, (_, k) => {
    const at = (t: number) => (t === count ? to : from + ((to - from) * t) / count);
    const mass = (t: number) => start + ((end - start) * t) / count;
    return { ...stiffness, from: at(k), to: at(k + 1), start: mass(k), end: mass(k + 1) };
  });
}

/** A symmetric banded matrix that need not be positive definite; row i holds the columns from i − BAND to i. */
class Indefinite {
  private readonly rows: Wide[][] = [];

  /** The number of a new unknown. */
  unknown(): number {
    return this.rows.push(new Array<Wide>(BAND + 1).fill(Wide.ZERO)) - 1;
  }

  add(i: number | null, j: number | null, value: Wide): void {
    if (i === null || j === null) return;
    const [row, column] = [Math.max(i, j), Math.min(i, j)];
    const k = column - row + BAND;
    this.rows[row]![k] = this.rows[row]![k]!.plus(value);
  }

  /** A spring on an unknown. */
  hold(i: number | null, restraint: Restraint | undefined): void {
    if (restraint?.kind === 'spring') this.add(i, i, Wide.of(restraint.stiffness));
  }

  /** By Sylvester's law the negative pivots of L D Lᵀ are as many as the negative eigenvalues. Destroys the matrix. */
  eliminate(): { below: number; log: number } {
    let below = 0;
    let log = 0;
    this.rows.forEach((row, i) => {
      const pivot = row[BAND]!.hi === 0 ? NO_PIVOT : row[BAND]!;
      if (pivot.hi < 0) below++;
      log += Math.log(Math.abs(pivot.hi));
      for (let a = i + 1; a <= Math.min(i + BAND, this.rows.length - 1); a++) {
        const below = this.rows[a]![i - a + BAND]!;
        if (below.hi === 0) continue;
        const factor = below.over(pivot);
        for (let b = i + 1; b <= a; b++) {
          const other = this.rows[b]![i - b + BAND]!;
          if (other.hi !== 0) this.add(a, b, factor.times(other).negated());
        }
      }
    });
    return { below, log };
  }
}
