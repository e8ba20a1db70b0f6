import type { Combination } from '../combination/index';
import { COINCIDENT } from '../model/index';
import { type Piecewise, pieceAt } from '../polynomial/index';
import { Adverse, type Cases, casesOf } from './cases';
import { between, type Curves, curvesOf, valuesAt } from './curves';
import { governingOf } from './governing';
import { envelopeCurve } from './outline';
import { groupReactions, reactionsOf } from './reactions';
import { type EnvelopeExtreme, ExtremeSearch } from './search';
import type { Source } from './sources';
import {
  byQuantity,
  type CombinationEnvelope,
  type Diagrams,
  type Elementary,
  type Envelope,
  type EnvelopeStation,
  type GoverningExtreme,
  type GroupReaction,
  type Quantity,
  type Range,
} from './types';

/**
 * A linear beam, solved source by source: what any of its combinations comes to over all patterns. Exact per quantity
 * and place: what always acts plus the adverse shares of the spans, and no others.
 */
export class SuperposedBeam {
  private readonly curves: Record<Quantity, Curves>;

  constructor(
    private readonly sources: readonly Source[],
    private readonly elementary: readonly Elementary[],
  ) {
    this.curves = byQuantity((quantity) => curvesOf(elementary.map(({ diagrams }) => diagrams[quantity])));
  }

  /** The envelope over the combinations at the positions, in its extremes and in the reactions. */
  envelope(combinations: readonly Combination[], positions: readonly number[]): Envelope {
    const cases = casesOf(this.sources, combinations);
    const adverse = new Adverse(cases);
    const extremes = byQuantity((quantity) => extremesOf(this.curves[quantity], cases));
    const read = byQuantity((quantity) =>
      reader(this.curves[quantity], adverse, magnitudeOf(extremes[quantity])),
    );
    return {
      stations: positions.map(
        (x): EnvelopeStation => ({ x: x + 0, ...byQuantity((quantity) => read[quantity](x)) }),
      ),
      extremes,
      reactions: reactionsOf(this.sources, this.elementary, cases)(),
    };
  }

  /** Every combination by itself. */
  combined(combinations: readonly Combination[]): CombinationEnvelope[] {
    const cases = casesOf(this.sources, combinations);
    const searches = byQuantity((quantity) => new ExtremeSearch(this.curves[quantity], cases));
    const reactions = reactionsOf(this.sources, this.elementary, cases);
    return combinations.map((combination, c) => ({
      combination,
      extremes: byQuantity((quantity) => named(searches[quantity].extremes(c, c + 1), cases)),
      reactions: reactions(c, c + 1),
    }));
  }

  /** Each group's own reactions, support by support. */
  groupReactions(): Record<string, GroupReaction>[] {
    return groupReactions(this.sources, this.elementary);
  }

  /** The extremes of a quantity between two of its breaks, such as the ends of a span. */
  extremesBetween(
    quantity: Quantity,
    [from, to]: readonly [number, number],
    combinations: readonly Combination[],
  ): Range<GoverningExtreme> {
    const { breaks } = this.curves[quantity];
    const [first, last] = [breaks.indexOf(from), breaks.indexOf(to)];
    return extremesOf(between(this.curves[quantity], first, last), casesOf(this.sources, combinations));
  }

  /** Of anything that is linear in the loads, by its curve under one source: the extremes in every combination. */
  measured(
    of: (diagrams: Diagrams) => Piecewise,
    combinations: readonly Combination[],
  ): Range<GoverningExtreme>[] {
    const cases = casesOf(this.sources, combinations);
    const curves = curvesOf(this.elementary.map(({ diagrams }) => of(diagrams)));
    const search = new ExtremeSearch(curves, cases);
    return combinations.map((_, c) => named(search.extremes(c, c + 1), cases));
  }

  /** The most and the least all along the beam, as exact curves. */
  outline(quantity: Quantity, combinations: readonly Combination[]): { upper: Piecewise; lower: Piecewise } {
    const cases = casesOf(this.sources, combinations);
    const curves = this.curves[quantity];
    return { upper: envelopeCurve(curves, cases, 1), lower: envelopeCurve(curves, cases, -1) };
  }
}

const extremesOf = (curves: Curves, cases: Cases): Range<GoverningExtreme> =>
  named(new ExtremeSearch(curves, cases).extremes(), cases);

const named = ({ max, min }: Range<EnvelopeExtreme>, cases: Cases): Range<GoverningExtreme> => ({
  max: { ...max, combination: cases.combinations[max.combination]!.name },
  min: { ...min, combination: cases.combinations[min.combination]!.name },
});

const magnitudeOf = ({ max, min }: Range<{ value: number }>): number =>
  Math.max(Math.abs(max.value), Math.abs(min.value));

/** Reads the envelope of one quantity at a position, on both sides of a break. */
function reader(curves: Curves, adverse: Adverse, largest: number): (x: number) => EnvelopeStation[Quantity] {
  const { breaks, count } = curves;
  const last = breaks.length - 2;
  const tolerance = COINCIDENT * (breaks.at(-1)! - breaks[0]!);
  const sides = [new Float64Array(count), new Float64Array(count)] as const;
  return (x) => {
    const k = pieceAt(curves, x);
    const [from, to] = [breaks[k]!, breaks[k + 1]!];
    const onLeft = x - from <= tolerance && k > 0;
    const onRight = !onLeft && to - x <= tolerance && k < last;
    if (!onLeft && !onRight) {
      valuesAt(curves, k, Math.min(Math.max((x - from) / (to - from), 0), 1), sides[0]);
      return governingOf(adverse, sides.slice(0, 1), largest);
    }
    const right = onLeft ? k : k + 1;
    valuesAt(curves, right - 1, 1, sides[0]);
    valuesAt(curves, right, 0, sides[1]);
    return governingOf(adverse, sides, largest);
  };
}
