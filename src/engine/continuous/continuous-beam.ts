import type { Diagrams, Reaction } from '../beam/index';
import type { Beam, Load } from '../model/index';
import { applyLoads } from './actions';
import { diagramsOf } from './diagrams';
import { ExtremeFinder } from './extremes';
import { Geometry } from './geometry';
import { FastProof } from './proof';
import { RigidEquations } from './rigid';
import { measureSpan } from './span';
import { SprungEquations } from './sprung';
import { hangOverhangs } from './statics';
import { type Side, StationValues } from './stations';
import { Sweep } from './sweep';

/** Below this part of the length between two points a result need only be right to 1e-6, not 1e-9; as in engine/proof. */
const SHORT = 1e-4;

/** The largest and the smallest value of each quantity, each with one position where it is attained, m. */
type FastExtremes = Pick<ExtremeFinder, 'shear' | 'moment' | 'slope' | 'deflection'>;

/**
 * The fast solver of continuous beams, for sweeps, patterns and moving loads: the force method in plain doubles, its
 * redundants the moments over the supports. Any spans and overhangs, supports rigid or sprung, rotation free, held or
 * sprung, steps of EI and GA, prescribed movements, every load; no hinges and no guided supports.
 *
 *   const solver = continuousBeam(beam);           // null: not of this class, use the solver of engine/beam
 *   solver.solve();                                // under all its loads, or solver.solve(loads): any of them, factored
 *   solver.extremes().moment.max                   // exact, as are
 *   solver.stations(11), solver.diagrams(), solver.reactions()
 *   solver.take(otherBeam);                        // goes on in the same memory
 *
 * Geometry is done once in `take`, loads in `solve`, extremes and stations when they are asked for, all in the same memory:
 * what `extremes`, `stations` and `prove` answer is written over by the next. What `diagrams` and `reactions` answer is new
 * each time. Units and signs: the engine's. Right to about twelve digits; `isProven` tells where it is not.
 */
export class ContinuousBeam {
  private readonly geometry = new Geometry();
  private readonly rigid = new RigidEquations();
  private readonly sprung = new SprungEquations();
  private readonly sweep = new Sweep();
  private readonly finder = new ExtremeFinder();
  private readonly proof = new FastProof();
  private readonly values = new StationValues();
  private beam!: Beam;
  private loads: readonly Load[] = [];
  private moved = true;
  /** Whether the extremes of the last solve are found, and whether the check knows this beam. */
  private found = false;
  private prepared = false;

  /**
   * Takes a beam in, and the positions of its loads. False where it is none of the class, or doubles cannot factorise its
   * flexibility; nothing may be asked then until another beam is taken.
   */
  take(beam: Beam): boolean {
    this.beam = beam;
    this.prepared = false;
    return this.geometry.take(beam) && this.factorise();
  }

  /**
   * The beam under the loads, all of its own unless given; each must act and end where a load of its own does (RangeError).
   * `movements: false` leaves the supports where they are, for superposition.
   */
  solve(loads: readonly Load[] = this.beam.loads, options?: { movements?: boolean }): void {
    const { geometry } = this;
    this.loads = loads;
    this.moved = options?.movements !== false;
    this.found = false;
    const moved = this.moved ? 1 : 0;
    applyLoads(geometry, loads);
    hangOverhangs(geometry);
    if (geometry.sprung) this.sprung.solve(geometry, moved);
    else this.rigid.solve(geometry, moved);
    this.sweep.run(geometry, moved);
  }

  extremes(): FastExtremes {
    if (!this.found) this.finder.find(this.geometry);
    this.found = true;
    return this.finder;
  }

  /**
   * V, M, θ and v at the ends of n − 1 equal steps, or at positions; at a point just right of it unless the left side is
   * asked for.
   */
  stations(at: number | ArrayLike<number> = 11, side: Side = 'right'): StationValues {
    const { values, geometry } = this;
    if (typeof at === 'number') values.placeEvenly(geometry, at);
    else values.placeAt(at);
    values.read(geometry, side);
    return values;
  }

  /** Writes the reactions in the order of the document: N, up; N·m, anticlockwise on the beam. */
  readReactions(vertical: Float64Array, moment: Float64Array): void {
    const { supports, support } = this.geometry;
    const count = this.beam.supports.length;
    if (supports < count) {
      vertical.fill(0, 0, count);
      moment.fill(0, 0, count);
    }
    for (let j = 0; j < supports; j++) {
      const { number, up, couple } = support[j]!;
      vertical[number] = up;
      moment[number] = couple;
    }
  }

  reactions(): Reaction[] {
    const { supports } = this.beam;
    const vertical = new Float64Array(supports.length);
    const moment = new Float64Array(supports.length);
    this.readReactions(vertical, moment);
    return supports.map(({ at }, i) => ({ at, vertical: vertical[i]! + 0, moment: moment[i]! + 0 }));
  }

  /** As the beam solver's, exact piecewise polynomials, all on the same breaks: the beam's own points and its loads'. */
  diagrams(): Diagrams {
    return diagramsOf(this.geometry);
  }

  /**
   * Residuals of the last solve against equilibrium, compatibility and the direct stiffness method, which is solved anew
   * for it; written over by the next.
   */
  prove(): Pick<FastProof, 'equilibrium' | 'compatibility' | 'agreement'> {
    const { proof } = this;
    if (!this.prepared) proof.take(this.beam);
    this.prepared = true;
    this.extremes();
    proof.prove(this.geometry, this.finder, this.loads, this.moved);
    return proof;
  }

  /** Whether the last solve is proven: every residual within 1e-9, or 1e-6 where points are closer than 1e-4 of the beam. */
  isProven(): boolean {
    this.prove();
    const { geometry } = this;
    return this.proof.isWithin(geometry.shortest() < SHORT * geometry.length ? 1e-6 : 1e-9);
  }

  private factorise(): boolean {
    const { geometry } = this;
    const { supports, support, span, piece } = geometry;
    for (let j = 0; j + 1 < supports; j++) measureSpan(span[j]!, piece, support[j]!, support[j + 1]!);
    return geometry.sprung ? this.sprung.factorise(geometry) : this.rigid.factorise(geometry);
  }
}

/** The fast solver of the beam, or null where it is none of its class: then the solver of engine/beam solves it. */
export function continuousBeam(beam: Beam): ContinuousBeam | null {
  const solver = new ContinuousBeam();
  return solver.take(beam) ? solver : null;
}
