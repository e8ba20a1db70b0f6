import { type SectionDimensions, sectionProperties } from '../section/index';
import type { SectionProperty } from './types';

/** What the dimensions of a shape are called, in the order in which they are given. */
export const DIMENSIONS_OF: Readonly<Record<SectionDimensions['shape'], readonly string[]>> = {
  i: ['h', 'b', 'tw', 'tf', 'r'],
  channel: ['h', 'b', 'tw', 'tf', 'r'],
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
