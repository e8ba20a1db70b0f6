/** Where everything of an influence line's drawing goes: the member with its train above, the line below. */
import { type Point, pathOf, polylineOf, spansOf } from '@/components/drawing/geometry/curve';
import { hatchOf } from '@/components/drawing/geometry/hatch';
import { type LabelWish, type PlacedLabel, placeLabels } from '@/components/drawing/geometry/labels';
import { type Peak, peaksOf } from '@/components/drawing/geometry/peaks';
import { fitOrdinates } from '@/components/drawing/geometry/scale';
import { textWidth } from '@/components/drawing/geometry/text-width';
import { type Frame, frameOf, xOf } from '@/components/drawing/strip/frame';
import type { InfluenceLine } from '@/engine/influence';
import type { Beam } from '@/engine/model';
import { evaluate, magnitude } from '@/engine/polynomial';
import { ordinateText, type Script } from './script';

const NARROW = 560;
/** Heights, px: of the member below the tails of the arrows, and of the line's own strip. */
const HEAD = { wide: 92, narrow: 84 };
const SUPPORTS = 46;
const STRIP = { wide: 150, narrow: 124 };
const AXIS = 28;
const LABEL_SIZE = 13;

const HATCH = { shear: [90, 5], moment: [-45, 6], slope: [0, 4], deflection: [45, 7] } as const;

/** A wheel on the beam: where it stands, and the ordinate under it. */
interface WheelMark {
  readonly place: number;
  readonly x: number;
  readonly y: number;
  readonly force: number;
}

export interface InfluenceLayout {
  readonly frame: Frame;
  /** y of the member, of the line's axis, and of all. */
  readonly member: number;
  readonly base: number;
  readonly axis: number;
  readonly height: number;
  readonly line: string;
  readonly hatch: string;
  readonly labels: readonly (PlacedLabel & { readonly text: string; readonly from: Point })[];
  readonly wheels: readonly WheelMark[];
  /** x of the section, and of nothing for a reaction. */
  readonly section: number | null;
}

/** A train where it stands: null off the beam. */
export interface StandingTrain {
  readonly forces: readonly number[];
  readonly wheels: readonly (number | null)[];
}

export function layInfluence(
  beam: Beam,
  { line, quantity, extremes }: Pick<InfluenceLine, 'line' | 'quantity' | 'extremes'>,
  script: Script,
  train: StandingTrain | null,
  width: number,
): InfluenceLayout {
  const size = width < NARROW ? 'narrow' : 'wide';
  const frame = frameFor(width, beam.length);
  const member = HEAD[size];
  const top = member + SUPPORTS;
  const bottom = top + STRIP[size];
  const peaks = peaksOf(line, extremes);
  const heights = peaks.map(({ value }) => script.up * value);
  const scale = fitOrdinates(Math.min(0, ...heights), Math.max(0, ...heights), top + 24, bottom - 24);
  const toX = (x: number) => xOf(frame, x);
  const toY = (value: number) => scale.base - script.up * value * scale.perUnit;
  const spans = spansOf(line, scale.perUnit > 0 ? 0.05 / scale.perUnit : 1);
  const outline: Point[] = [[frame.x0, scale.base], ...polylineOf(spans, toX, toY), [frame.x1, scale.base]];
  const [angle, pitch] = HATCH[script.quantity];
  const wishes = peaks.map((peak) => wishFor(peak, script, scale.base, toX, toY));
  const bounds = { left: 4, right: width - 4, top: top + 2, bottom: bottom - 2 };
  const placed = placeLabels(wishes, { bounds, curves: [outline], baseline: scale.base });
  return {
    frame,
    member,
    base: scale.base,
    axis: bottom,
    height: bottom + AXIS,
    line: pathOf(spans, toX, toY, scale.base),
    hatch: scale.perUnit > 0 ? hatchOf(outline, angle, pitch) : '',
    labels: placed.map((label) => {
      const { text, at } = wishes[label.wish]!;
      return { ...label, text, from: at };
    }),
    wheels: marksOf(line, train, toX, toY),
    section: 'at' in quantity ? toX(quantity.at) : null,
  };
}

/** The member from margin to margin: nothing stands in the gutters here. */
function frameFor(width: number, length: number): Frame {
  const margin = width < NARROW ? 26 : 44;
  const [x0, x1] = [margin, width - margin];
  return { ...frameOf('phone', width, length), x0, x1, perMetre: (x1 - x0) / length };
}

function wishFor(
  { x, to, value, rank }: Peak,
  script: Script,
  base: number,
  toX: (x: number) => number,
  toY: (value: number) => number,
): LabelWish & { text: string } {
  const y = toY(value);
  const text = ordinateText(script, value);
  const at = [toX(to === undefined ? x : (x + to) / 2), y] as const;
  return { at, width: textWidth(text, LABEL_SIZE, 600), rank, outside: y > base ? 1 : -1, text };
}

function marksOf(
  line: InfluenceLine['line'],
  train: StandingTrain | null,
  toX: (x: number) => number,
  toY: (value: number) => number,
): WheelMark[] {
  if (!train || magnitude(line) === 0) return [];
  return train.wheels.flatMap((place, i): WheelMark[] => {
    if (place === null) return [];
    const [left, right] = evaluate(line, place);
    const value = Math.abs(left) > Math.abs(right) ? left : right;
    return [{ place, x: toX(place), y: toY(value), force: train.forces[i] ?? 0 }];
  });
}
