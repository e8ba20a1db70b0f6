import type { BeamDocument, Load, Support, SupportDocument } from '@/engine/model/index';
import type { Piecewise } from '@/engine/polynomial/index';
import { type Map1, pathOf, polylineOf, spansOf } from '../geometry/curve';
import { hatchOf } from '../geometry/hatch';
import { localPeaks } from '../geometry/peaks';
import type { Held } from '../marks/Supports';
import { lift, type MomentSide, type Quantity } from '../signs';

/** A beam, validated or as written down: a template's card is drawn before anybody has checked its numbers. */
export type SchematicBeam = {
  length: number;
  supports: readonly (Support | SupportDocument)[];
  loads?: readonly Load[] | undefined;
  hinges?: readonly number[] | undefined;
};

export type SchematicSupport = Held & { at: number; rise: number };

export function schematicSupports(beam: Pick<BeamDocument, 'supports'> | SchematicBeam): SchematicSupport[] {
  return beam.supports.map((support) => {
    if ('vertical' in support) {
      const rise = support.vertical.kind === 'free' ? 0 : support.vertical.movement;
      return {
        at: support.at,
        kind: support.kind,
        vertical: support.vertical,
        rotation: support.rotation,
        rise,
      };
    }
    const { at, kind, kv, kr, rise = 0 } = support;
    return {
      at,
      kind,
      vertical: { kind: kv ? 'spring' : 'free' },
      rotation: { kind: kr ? 'spring' : 'free' },
      rise,
    };
  });
}

/** Loads at heights in px above the member: the largest of each kind is the tallest, the rest to its scale but never too low to see. */
export function relativeHeight(size: number, largest: number, tallest: number): number {
  return largest > 0 ? Math.max(0.45, Math.abs(size) / largest) * tallest : 0;
}

export type SchematicCurve = { line: string; hatch: string; toY: Map1 };

/** A diagram or deflected shape on the member's own line, its largest ordinate `reach` px away. */
export function schematicCurve(
  curve: Piecewise,
  quantity: Quantity,
  { toX, base, reach, side }: { toX: Map1; base: number; reach: number; side: MomentSide },
): SchematicCurve {
  const largest = Math.max(0, ...localPeaks(curve).map(({ value }) => Math.abs(value)));
  const perUnit = largest > 0 ? reach / largest : 0;
  const up = lift(quantity, side);
  const place: Map1 = (value) => base - up * value * perUnit;
  const spans = spansOf(curve, perUnit > 0 ? 0.1 / perUnit : 1);
  const first = curve.breaks[0] ?? 0;
  const last = curve.breaks.at(-1) ?? 0;
  const closed = quantity === 'moment' ? base : undefined;
  const area = [[toX(first), base] as const, ...polylineOf(spans, toX, place, 6), [toX(last), base] as const];
  return {
    line: largest > 0 ? pathOf(spans, toX, place, closed) : '',
    hatch: largest > 0 && quantity === 'moment' ? hatchOf(area, -45, 6) : '',
    toY: place,
  };
}
