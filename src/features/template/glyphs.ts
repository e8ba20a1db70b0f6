/** The small drawings of the catalogue's filters. */
import type { Load, SupportDocument } from '@/engine/model';
import type { Arrangement, LoadKind } from '@/engine/template';

export interface Glyph {
  readonly length: number;
  readonly supports: readonly SupportDocument[];
  readonly loads?: readonly Load[];
}

const fixed = (at: number): SupportDocument => ({ at, kind: 'fixed' });
const pin = (at: number): SupportDocument => ({ at, kind: 'pin' });
const roller = (at: number): SupportDocument => ({ at, kind: 'roller' });
const of = (...supports: SupportDocument[]): Glyph => ({ length: 1, supports });
const under = (...loads: Load[]): Glyph => ({ length: 1, supports: [], loads });

export const ARRANGEMENT_GLYPHS: Record<Arrangement, Glyph> = {
  'simple-span': of(pin(0), roller(1)),
  cantilever: of(fixed(0)),
  'propped-cantilever': of(fixed(0), roller(1)),
  'fixed-ends': of(fixed(0), fixed(1)),
  overhang: of(pin(0), roller(0.7)),
  'multi-span': of(pin(0), roller(0.5), roller(1)),
};

export const LOAD_GLYPHS: Record<LoadKind, Glyph> = {
  uniform: under({ kind: 'line', from: 0, to: 1, w0: 1, w1: 1 }),
  point: under({ kind: 'point', at: 0.5, p: 1 }),
  triangular: under({ kind: 'line', from: 0, to: 1, w0: 0, w1: 1 }),
  couple: under({ kind: 'couple', at: 0.5, m: -1 }),
  settlement: { length: 1, supports: [pin(0), { at: 0.5, kind: 'roller', rise: -0.01 }] },
  temperature: under({ kind: 'curvature', from: 0, to: 1, kappa: 1 }),
};
