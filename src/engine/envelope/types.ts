import type { Diagrams, Reaction } from '../beam/index';
import type { Combination } from '../combination/index';

export const QUANTITIES = ['shear', 'moment', 'slope', 'deflection'] as const;
export type Quantity = (typeof QUANTITIES)[number];

/** A value with the loads that give it. */
export type Governing = {
  value: number;
  /** The combination's name. */
  combination: string;
  /** Indices of the loaded pattern spans; of a span whose share is nothing there, none. */
  pattern: number[];
  /** Indices of the supports that the beam lifts off; only where supports cannot pull. */
  lifted?: number[];
};

export type Range<T> = { max: T; min: T };

/** At a jump the larger, for max, of the two sides. */
export type EnvelopeStation = { x: number } & Record<Quantity, Range<Governing>>;

/** `at`: ascending, every position where the arrangement named attains the value. */
export type GoverningExtreme = Governing & { at: number[] };

/** Of one load group, unfactored, without the supports' own movements; a patterned group's most and least. */
export type GroupReaction = {
  vertical: number | Range<number>;
  moment: number | Range<number>;
};

export type EnvelopeReaction = {
  at: number;
  max: Record<'vertical' | 'moment', Governing>;
  min: Record<'vertical' | 'moment', Governing>;
  groups: Record<string, GroupReaction>;
};

export type Envelope = {
  stations: EnvelopeStation[];
  extremes: Record<Quantity, Range<GoverningExtreme>>;
  reactions: EnvelopeReaction[];
};

export type { Diagrams };

/** What one combination comes to over all patterns of its loads. */
export type CombinationEnvelope = { readonly combination: Combination } & Pick<
  Envelope,
  'extremes' | 'reactions'
>;

/** What superposition asks of a solved source. All sources of a beam have the same breaks. */
export type Elementary = { readonly diagrams: Diagrams; readonly reactions: readonly Reaction[] };

export type ReactionComponent = Exclude<keyof Reaction, 'at'>;

/** The same of all four quantities. */
export const byQuantity = <T>(of: (quantity: Quantity) => T): Record<Quantity, T> => ({
  shear: of('shear'),
  moment: of('moment'),
  slope: of('slope'),
  deflection: of('deflection'),
});
