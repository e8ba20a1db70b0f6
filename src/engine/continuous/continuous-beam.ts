import type { Diagrams, Reaction } from '../beam/index';
import type { Beam, Load } from '../model/index';
import type { Piecewise } from '../polynomial/index';
import { Actions } from './actions';
import { Curves } from './curves';
import { Flexibility } from './flexibility';
import { Geometry } from './geometry';
import { Statics } from './statics';

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
  private readonly flexibility = new Flexibility();
  private readonly actions = new Actions();
  private readonly statics = new Statics();
  private readonly curves = new Curves();
  private beam!: Beam;

  /** Another beam in the same arrays; false where it is none of the class, or too ill-conditioned for doubles. */
  take(beam: Beam): boolean {
    this.beam = beam;
    return this.geometry.take(beam) && this.flexibility.take(this.geometry);
  }

  /** The beam under the loads; `movements: false` leaves the supports where they are, for superposition. */
  solve(loads: readonly Load[] = this.beam.loads, { movements = true }: { movements?: boolean } = {}): void {
    const { geometry, flexibility, actions, statics, curves } = this;
    actions.take(geometry, loads);
    statics.take(geometry, flexibility, actions, movements ? 1 : 0);
    curves.take(geometry, actions, statics);
  }

  /** The diagrams of the last solve, as the beam solver's: every diagram of one beam has the same breaks. */
  diagrams(): Diagrams {
    const { curves, geometry } = this;
    const pieces = geometry.points - 1;
    const breaks = geometry.x.slice(0, geometry.points);
    const piecewise = (degree: number, coefficients: Float64Array): Piecewise => ({
      breaks,
      degree,
      coefficients: coefficients.slice(0, pieces * (degree + 1)),
    });
    return {
      shear: piecewise(2, curves.shear),
      moment: piecewise(3, curves.moment),
      slope: piecewise(4, curves.slope),
      deflection: piecewise(5, curves.deflection),
    };
  }

  /** The reactions of the last solve, in the order of the document. */
  reactions(): Reaction[] {
    const { geometry, statics } = this;
    const reactions = this.beam.supports.map(({ at }): Reaction => ({ at, vertical: 0, moment: 0 }));
    for (let j = 0; j < geometry.supports; j++) {
      const reaction = reactions[geometry.number[j]!]!;
      reaction.vertical = statics.up[j]! + 0;
      reaction.moment = statics.couple[j]! + 0;
    }
    return reactions;
  }
}

/** The fast solver of the beam, or null where it is none of its class: then solveBeam solves it. */
export function continuousBeam(beam: Beam): ContinuousBeam | null {
  const solver = new ContinuousBeam();
  return solver.take(beam) ? solver : null;
}
