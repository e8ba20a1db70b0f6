import type { Field, Local } from './field';
import type { LetteredBeam, Spot } from './lettered-beam';
import { movementAt, segmentAt } from './movement';
import { formula } from './node';
import { valueAt } from './read';
import type { Redundants } from './redundants';
import { slopeBeyond } from './root';
import type { Quantity, Side, Trace } from './types';
import { curvatureAt, loadingLetters, stiffnessLetters } from './work';

/** Of one set of loads. */
export class CaseField implements Field {
  constructor(readonly redundants: Redundants) {}

  get beam(): LetteredBeam {
    return this.redundants.beam;
  }

  at(quantity: Quantity, spot: Spot, side: Side): Trace {
    const { built } = this.redundants;
    if (quantity === 'moment') return built.moment(spot, side);
    if (quantity === 'shear') return built.shear(spot, side);
    const trace = movementAt(this.redundants, spot, quantity, side);
    if (!trace) return this.beyondHinge(spot);
    return quantity === 'slope' ? this.sheared(trace, spot, side) : trace;
  }

  local(x: number): Local {
    const { built } = this.redundants;
    return {
      ...loadingLetters(built, x),
      ...stiffnessLetters(built, x),
      kappa: curvatureAt(built, x),
    };
  }

  reaction(support: number, component: 'vertical' | 'moment'): Trace | null {
    return this.redundants.built.reaction(support, component);
  }

  /** The slope of the axis: where the beam shears, the turn of its section and V/GA. */
  private sheared(turn: Trace, spot: Spot, side: Side): Trace {
    const { built } = this.redundants;
    const { from, ga } = segmentAt(this.beam, spot.x, side);
    if (ga === null || valueAt(built.diagrams.shear, spot.x, side) === 0) return turn;
    const { GA } = stiffnessLetters(built, from);
    return formula(
      {
        label: `Slope ${this.beam.givens.placeWords(spot.x)}`,
        symbol: '\\theta',
        value: -valueAt(built.diagrams.slope, spot.x, side) + 0,
        measure: 'slope',
      },
      { method: 'definition', tree: ['+', '\\psi', ['/', 'V', 'GA']] },
      () => [
        { name: '\\psi', trace: turn },
        { name: 'V', trace: built.shear(spot, side) },
        { name: 'GA', trace: GA! },
      ],
    );
  }

  /** The slope just left of a hinge, from the nearest place at its left. */
  private beyondHinge(spot: Spot): Trace {
    const { slope } = this.redundants.built.diagrams;
    const before = slope.breaks.findLast((x) => x < spot.x) ?? 0;
    const value = -valueAt(slope, spot.x, 'left') + 0;
    return slopeBeyond(this, before, spot, value);
  }
}
