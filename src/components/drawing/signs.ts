/**
 * The one place where the engine's signs are turned into those of screens and sheets.
 *
 * | quantity   | engine          | shown as                | drawn                          |
 * | ---------- | --------------- | ----------------------- | ------------------------------ |
 * | shear      | left end up     | the same                | positive up                    |
 * | moment     | sagging         | the same                | positive down, on the tension side |
 * | slope      | anticlockwise   | clockwise positive      | positive down                  |
 * | deflection | upward          | downward positive       | positive down                  |
 */

export const QUANTITIES = ['shear', 'moment', 'slope', 'deflection'] as const;
export type Quantity = (typeof QUANTITIES)[number];

/** Which face of the member the moment diagram lies on: a practice's choice, stated on the sheet. */
export type MomentSide = 'tension' | 'compression';

const SHOWN = { shear: 1, moment: 1, slope: -1, deflection: -1 } as const;

/** The value as screens and sheets print it. Its own inverse. */
export function toScreen(quantity: Quantity, engineValue: number): number {
  return SHOWN[quantity] * engineValue;
}

/** +1 where a positive engine value is drawn above the baseline, −1 where it is drawn below. */
export function lift(quantity: Quantity, side: MomentSide = 'tension'): 1 | -1 {
  return quantity === 'moment' && side === 'tension' ? -1 : 1;
}

const SIGN_RULE = { shear: 'left end up: +', slope: 'clockwise: +', deflection: 'down: +' } as const;

/** What the gutter of a strip says about its sign. */
export function signRule(quantity: Quantity, side: MomentSide = 'tension'): string {
  if (quantity !== 'moment') return SIGN_RULE[quantity];
  return side === 'tension' ? 'sagging: +' : 'sagging: +, drawn above';
}

/** An arrow along the member's normal: the sense it points in, and its size. */
export type VerticalArrow = { points: 'up' | 'down'; size: number };

/** A support's force on the beam, engine positive upward. */
export function forceArrow(upward: number): VerticalArrow {
  return { points: upward < 0 ? 'down' : 'up', size: Math.abs(upward) };
}

/** A load on the beam, engine positive downward. */
export function loadArrow(downward: number): VerticalArrow {
  return forceArrow(-downward);
}

/** A couple on the beam, engine positive anticlockwise. */
export function turnArrow(anticlockwise: number): { turns: 'clockwise' | 'anticlockwise'; size: number } {
  return { turns: anticlockwise < 0 ? 'clockwise' : 'anticlockwise', size: Math.abs(anticlockwise) };
}
