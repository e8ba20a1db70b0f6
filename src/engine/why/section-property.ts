import { type MeasuredShape, type SectionDimensions, sectionProperties } from '../section/index';
import type { SectionProperty } from './types';

/** What the dimensions of a shape are called, in the order in which they are given; an outline and values are given whole. */
export const DIMENSIONS_OF: Readonly<Record<MeasuredShape, readonly string[]>> = {
  i: ['h', 'b', 'tw', 'tf', 'r'],
  tapered_i: ['h', 'b', 'tw', 'tf', 'r', 'toe', 'slope', 'at'],
  channel: ['h', 'b', 'tw', 'tf', 'r'],
  tapered_channel: ['h', 'b', 'tw', 'tf', 'r', 'toe', 'slope', 'at'],
  tee: ['h', 'b', 'tw', 'tf', 'r'],
  angle: ['h', 'b', 't', 'r', 'toe'],
  rhs: ['h', 'b', 't', 'ro', 'ri'],
  shs: ['h', 'b', 't', 'ro', 'ri'],
  chs: ['d', 't'],
  rectangle: ['h', 'b'],
  round: ['d'],
};

/** The property from dimensions in m by their name. */
export function propertyOf(
  { shape, property }: SectionProperty,
  dimensions: ReadonlyMap<string, number>,
): number {
  const read = Object.fromEntries(DIMENSIONS_OF[shape].map((name) => [name, dimensions.get(name)]));
  return sectionProperties({ shape, ...read } as SectionDimensions)[property];
}
