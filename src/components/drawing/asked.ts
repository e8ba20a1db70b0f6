import type { Quantity } from './signs';

/** A number of the drawing that a person asks about. Engine's units and signs. */
export type AskedFigure =
  | { readonly kind: 'reaction'; readonly support: number; readonly component: 'vertical' | 'moment' }
  | {
      readonly kind: 'peak';
      readonly quantity: Quantity;
      readonly x: number;
      readonly value: number;
      readonly isZero: boolean;
    };

/** A cell of the table of stations: of one curve, or of the upper or lower one of an envelope. */
export type AskedStation = {
  readonly quantity: Quantity;
  readonly x: number;
  readonly side: 'left' | 'right';
  readonly bound: 'upper' | 'lower' | null;
};
