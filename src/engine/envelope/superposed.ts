import type { Combination } from '../combination/index';
import type { Piecewise } from '../polynomial/index';
import { Adverse, casesOf } from './cases';
import { between, type Curves, curvesOf } from './curves';
import { GoverningSearch } from './governing';
import { envelopeCurve } from './outline';
import { SourceReactions } from './reactions';
import { type EnvelopeExtreme, ExtremeSearch } from './search';
import type { Source } from './sources';
import { StationReader } from './stations';
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
  private readonly reactions: SourceReactions;

  constructor(
    private readonly sources: readonly Source[],
    private readonly elementary: readonly Elementary[],
  ) {
    this.curves = byQuantity((quantity) => curvesOf(elementary.map(({ diagrams }) => diagrams[quantity])));
    this.reactions = new SourceReactions(sources, elementary);
  }

  /** The envelope over the combinations at the positions, in its extremes and in the reactions. */
  envelope(combinations: readonly Combination[], positions: readonly number[]): Envelope {
    const adverse = new Adverse(casesOf(this.sources, combinations));
    const search = new ExtremeSearch(adverse);
    const governing = new GoverningSearch(adverse);
    const extremes = byQuantity((quantity) => extremesOf(search, this.curves[quantity], combinations));
    const reader = new StationReader(governing, this.sources.length);
    const sizes = byQuantity((quantity) => magnitudeOf(extremes[quantity]));
    const read = (quantity: Quantity, x: number) => reader.read(this.curves[quantity], x, sizes[quantity]);
    return {
      stations: positions.map(
        (x): EnvelopeStation => ({ x: x + 0, ...byQuantity((quantity) => read(quantity, x)) }),
      ),
      extremes,
      reactions: this.reactions.envelope(governing),
    };
  }

  /** Every combination by itself. */
  combined(combinations: readonly Combination[]): CombinationEnvelope[] {
    const adverse = new Adverse(casesOf(this.sources, combinations));
    const search = new ExtremeSearch(adverse);
    const extremes = byQuantity((quantity) => extremesOfEach(search, this.curves[quantity], combinations));
    return combinations.map((combination, c) => ({
      combination,
      extremes: byQuantity((quantity) => extremes[quantity][c]!),
      reactions: this.reactions.envelope(new GoverningSearch(adverse, c, c + 1)),
    }));
  }

  /** Each group's own reactions, support by support. */
  groupReactions(): readonly Record<string, GroupReaction>[] {
    return this.reactions.groups;
  }

  /** The extremes of a quantity between two of its breaks, such as the ends of a span. */
  extremesBetween(
    quantity: Quantity,
    [from, to]: readonly [number, number],
    combinations: readonly Combination[],
  ): Range<GoverningExtreme> {
    const { breaks } = this.curves[quantity];
    const curves = between(this.curves[quantity], breaks.indexOf(from), breaks.indexOf(to));
    return extremesOf(this.searchOver(combinations), curves, combinations);
  }

  /** Of anything that is linear in the loads, by its curve under one source: the extremes in every combination. */
  measured(
    of: (diagrams: Diagrams) => Piecewise,
    combinations: readonly Combination[],
  ): Range<GoverningExtreme>[] {
    const curves = curvesOf(this.elementary.map(({ diagrams }) => of(diagrams)));
    return extremesOfEach(this.searchOver(combinations), curves, combinations);
  }

  /** The most and the least all along the beam, as exact curves. */
  outline(quantity: Quantity, combinations: readonly Combination[]): { upper: Piecewise; lower: Piecewise } {
    const cases = casesOf(this.sources, combinations);
    const curves = this.curves[quantity];
    return { upper: envelopeCurve(curves, cases, 1), lower: envelopeCurve(curves, cases, -1) };
  }

  private searchOver(combinations: readonly Combination[]): ExtremeSearch {
    return new ExtremeSearch(new Adverse(casesOf(this.sources, combinations)));
  }
}

function extremesOf(
  search: ExtremeSearch,
  curves: Curves,
  combinations: readonly Combination[],
): Range<GoverningExtreme> {
  search.take(curves);
  return named(search.extremes(), combinations);
}

function extremesOfEach(
  search: ExtremeSearch,
  curves: Curves,
  combinations: readonly Combination[],
): Range<GoverningExtreme>[] {
  search.take(curves);
  return combinations.map((_, c) => named(search.extremes(c, c + 1), combinations));
}

const named = (
  { max, min }: Range<EnvelopeExtreme>,
  combinations: readonly Combination[],
): Range<GoverningExtreme> => ({
  max: { ...max, combination: combinations[max.combination]!.name },
  min: { ...min, combination: combinations[min.combination]!.name },
});

const magnitudeOf = ({ max, min }: Range<{ value: number }>): number =>
  Math.max(Math.abs(max.value), Math.abs(min.value));
