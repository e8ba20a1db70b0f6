import type { Diagrams, Reaction } from '../beam/index';
import type { Beam, Load } from '../model/index';
import { applyLoads } from './actions';
import { diagramsOf } from './diagrams';
import { ExtremeFinder } from './extremes';
import { Geometry } from './geometry';
import { factoriseRigid, solveRigid } from './rigid';
import { measureSpan } from './span';
import { SprungEquations } from './sprung';
import { hangOverhangs } from './statics';
import { FastStation, readStations } from './stations';
import { Sweep } from './sweep';

/**
 * The fast solver of continuous beams, in plain doubles, for sweeps and superposition: any spans and overhangs, rigid or
 * sprung supports, rotation free, held or sprung, steps of EI and GA, every load; no hinges, no guided supports.
 *
 *   const beam = continuousBeam(document)   // null where the beam is none of these: use solveBeam
 *   beam.solve()                            // all its loads; or beam.solve(loads), any of them, factored or not
 *   beam.diagrams(), beam.reactions()       // as objects
 *
 * All of it works in arrays that are made once; each solve overwrites the one before. Units and signs: the engine's.
 */
export class ContinuousBeam {
  private readonly geometry = new Geometry();
  private readonly sprung = new SprungEquations();
  private readonly sweep = new Sweep();
  private readonly finder = new ExtremeFinder();
  private readonly station: FastStation[] = [];
  private beam!: Beam;

  /** Another beam in the same arrays; false where it is none of the class, or too ill-conditioned for doubles. */
  take(beam: Beam): boolean {
    this.beam = beam;
    return this.geometry.take(beam) && this.factorise();
  }

  private factorise(): boolean {
    const { geometry } = this;
    const { supports, support, span, piece } = geometry;
    for (let j = 0; j + 1 < supports; j++) {
      measureSpan(span[j]!, piece, support[j]!, support[j + 1]!);
    }
    return geometry.sprung ? this.sprung.factorise(geometry) : factoriseRigid(geometry);
  }

  /** The beam under the loads; `movements: false` leaves the supports where they are, for superposition. */
  solve(loads: readonly Load[] = this.beam.loads, { movements = true }: { movements?: boolean } = {}): void {
    const { geometry } = this;
    applyLoads(geometry, loads);
    const moved = movements ? 1 : 0;
    const hanging = hangOverhangs(geometry);
    if (geometry.sprung) this.sprung.solve(geometry, moved, hanging);
    else solveRigid(geometry, moved);
    this.sweep.run(geometry, moved);
  }

  extremes(): ExtremeFinder {
    this.finder.find(this.geometry);
    return this.finder;
  }

  stations(count = 11): readonly FastStation[] {
    const { station, geometry } = this;
    while (station.length < count) station.push(new FastStation());
    const step = geometry.length / (count - 1);
    for (let i = 0; i < count; i++) station[i]!.x = i * step;
    station[count - 1]!.x = geometry.length;
    readStations(geometry, station, count);
    return station;
  }

  /** The diagrams of the last solve, as the beam solver's: every diagram of one beam has the same breaks. */
  diagrams(): Diagrams {
    return diagramsOf(this.geometry);
  }

  /** The reactions of the last solve, in the order of the document. */
  reactions(): Reaction[] {
    const { supports, support } = this.geometry;
    const reactions = this.beam.supports.map(({ at }): Reaction => ({ at, vertical: 0, moment: 0 }));
    for (let j = 0; j < supports; j++) {
      const { number, up, couple } = support[j]!;
      reactions[number]!.vertical = up + 0;
      reactions[number]!.moment = couple + 0;
    }
    return reactions;
  }
}

/** The fast solver of the beam, or null where it is none of its class: then solveBeam solves it. */
export function continuousBeam(beam: Beam): ContinuousBeam | null {
  const solver = new ContinuousBeam();
  return solver.take(beam) ? solver : null;
}
