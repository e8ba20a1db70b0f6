import type { Beam } from '@/engine/model/index';
import type { Piecewise } from '@/engine/polynomial/index';
import { type DrawingFormat, figure } from '../format';
import { type Point, pathOf, polylineOf, spansOf } from '../geometry/curve';
import { hatchOf } from '../geometry/hatch';
import { type LabelWish, placeLabels } from '../geometry/labels';
import type { Peak } from '../geometry/peaks';
import { fitOrdinates, timesDrawn } from '../geometry/scale';
import { textWidth } from '../geometry/text-width';
import { letterAt, namedSupports } from '../names';
import { lift, type MomentSide, type Quantity, signRule, toScreen } from '../signs';
import type { Figure } from './figures';
import { type Frame, xOf } from './frame';

/** One curve, or the upper and lower curves of an envelope, in the engine's units and signs. */
export type Diagram = {
  quantity: Quantity;
  curves: readonly Piecewise[];
  peaks: readonly Peak[];
  /** Lines under the sign rule: the limit, the set of combinations. */
  notes: readonly string[];
};

export const TITLE: Record<Quantity, string> = {
  shear: 'Shear',
  moment: 'Moment',
  slope: 'Slope',
  deflection: 'Deflection',
};
export const SYMBOL: Record<Quantity, string> = { shear: 'V', moment: 'M', slope: 'θ', deflection: 'δ' };
export const PURPOSE = {
  shear: 'force',
  moment: 'moment',
  slope: 'slope',
  deflection: 'deflection',
} as const;

const HATCH: Record<Quantity, { angle: number; pitch: number }> = {
  shear: { angle: 90, pitch: 5 },
  moment: { angle: -45, pitch: 6 },
  slope: { angle: 0, pitch: 4 },
  deflection: { angle: 45, pitch: 7 },
};

export type DiagramLayout = {
  quantity: Quantity;
  top: number;
  /** Under the head that a phone puts over each strip. */
  plotTop: number;
  bottom: number;
  base: number;
  toY: (value: number) => number;
  curves: readonly Piecewise[];
  hatch: string;
  lines: string[];
  dots: Point[];
  labels: (Figure & { leader: Point | null; from: Point; peak: Peak })[];
  notes: string[];
};

type Context = { beam: Beam; frame: Frame; format: DrawingFormat; side: MomentSide };

/** The distance between the supports on either side of x; for an overhang, its length. */
function spanAt(beam: Beam, x: number): { length: number; words: string } {
  const held = beam.supports.filter(({ vertical }) => vertical.kind !== 'free').map(({ at }) => at);
  const left = Math.max(...held.filter((at) => at <= x));
  const right = Math.min(...held.filter((at) => at >= x));
  if (Number.isFinite(left) && Number.isFinite(right)) return { length: right - left, words: 'span' };
  return { length: Number.isFinite(left) ? beam.length - left : right, words: 'length' };
}

function placeWords({ beam, format, frame }: Context, peak: Peak): string {
  const unit = frame.mode === 'phone' ? '' : format.unit('length');
  const letter = (x: number) => letterAt(namedSupports(beam), x, beam.length);
  const station = (x: number) => letter(x) ?? format.value('length', x);
  if (peak.to !== undefined) return `from ${station(peak.x)} to ${station(peak.to)}`;
  const place = letter(peak.x);
  if (place !== undefined) return `at ${place}`;
  if (frame.mode !== 'phone' && peak.x === 0) return 'at the left end';
  if (frame.mode !== 'phone' && peak.x === beam.length) return 'at the right end';
  return `at ${format.value('length', peak.x)}${unit === '' ? '' : ` ${unit}`}`;
}

function peakText(context: Context, quantity: Quantity, peak: Peak): string {
  const { beam, format, frame } = context;
  const place = placeWords(context, peak);
  if (peak.kind === 'zero') return frame.mode === 'phone' ? `0 ${place}` : `contraflexure ${place}`;
  const shown = toScreen(quantity, peak.value);
  const of = peak.of ? `, ${peak.of}` : '';
  if (frame.mode === 'phone') return `${format.value(PURPOSE[quantity], shown)} ${place}`;
  const text = `${figure(format, PURPOSE[quantity], shown)} ${place}${of}`;
  if (quantity !== 'deflection' || peak.rank !== 0) return text;
  const span = spanAt(beam, peak.x);
  if (span.length === 0) return text; // a support that moves, and no deflection of a span
  return `${text}, ${span.words} / ${Math.floor(span.length / Math.abs(peak.value))}`;
}

function layLabels(
  context: Context,
  layout: Omit<DiagramLayout, 'labels' | 'dots' | 'notes'>,
  peaks: readonly Peak[],
  outlines: readonly Point[][],
) {
  const { frame } = context;
  const size = frame.mode === 'print' ? 13.4 : 13;
  const middle = ({ x, to }: Peak) => (to === undefined ? x : (x + to) / 2);
  const texts = peaks.map((peak) => peakText(context, layout.quantity, peak));
  const wishes = peaks.map((peak, i): LabelWish => {
    const y = layout.toY(peak.value);
    return {
      at: [xOf(frame, middle(peak)), y],
      width: textWidth(texts[i] ?? '', size, 600),
      rank: peak.rank,
      outside: y > layout.base ? 1 : -1,
      leaderFirst: peak.kind === 'zero',
    };
  });
  const aside = frame.mode === 'phone' ? 26 : 10;
  const bounds = {
    left: frame.x0 - aside,
    right: frame.x1 + aside,
    top: layout.plotTop + 1,
    bottom: layout.bottom - 1,
  };
  const placed = placeLabels(wishes, { bounds, curves: outlines, baseline: layout.base });
  return placed.flatMap(({ wish, x, y, anchor, leader }) => {
    const from = wishes[wish]?.at ?? [x, y];
    const peak = peaks[wish];
    return peak ? [{ x, y, anchor, leader, from, peak, text: texts[wish] ?? '' }] : [];
  });
}

const ROOM = {
  screen: { above: 23, below: 24, bare: 12 },
  phone: { above: 21, below: 22, bare: 10 },
  print: { above: 17, below: 22, bare: 8 },
};

/** The strip's scale from what it holds; the values at zero are its baseline, which always shows. */
function ordinatesOf({ frame, side }: Context, diagram: Diagram, plotTop: number, bottom: number) {
  const up = lift(diagram.quantity, side);
  const heights = diagram.peaks.map(({ value }) => up * value);
  const [most, least] = [Math.max(0, ...heights), Math.min(0, ...heights)];
  const { above, below, bare } = ROOM[frame.mode];
  const scale = fitOrdinates(
    least,
    most,
    plotTop + (most > 0 ? above : bare),
    bottom - (least < 0 ? below : bare),
  );
  return { ...scale, toY: (value: number) => scale.base - up * value * scale.perUnit };
}

function notesOf({ side, frame }: Context, diagram: Diagram, times: string | null): string[] {
  const { quantity, curves, notes } = diagram;
  const first = [curves.length > 1 ? null : signRule(quantity, side), times].filter((part) => part !== null);
  // The gutter of a printed sheet is narrow.
  if (frame.mode === 'print') return [...first, ...notes];
  return [...(first.length > 0 ? [first.join(', ')] : []), ...notes];
}

/** Tall enough for the diagram and for what the gutter has to say. */
function heightOf(context: Context, diagram: Diagram): number {
  const height = context.frame.heights[diagram.quantity];
  const times = diagram.quantity === 'deflection' ? '' : null;
  return context.frame.mode === 'phone'
    ? height
    : Math.max(height, 60 + notesOf(context, diagram, times).length * context.frame.notePitch);
}

/** One strip from y = top downward. */
export function layDiagram(context: Context, diagram: Diagram, top: number): DiagramLayout {
  const { frame } = context;
  const { quantity, curves, peaks } = diagram;
  const plotTop = top + frame.head;
  const bottom = plotTop + heightOf(context, diagram);
  const { base, perUnit, toY } = ordinatesOf(context, diagram, plotTop, bottom);
  const toX = (metres: number) => xOf(frame, metres);
  const tolerance = perUnit > 0 ? 0.05 / perUnit : 1;
  const spans = curves.map((curve) =>
    spansOf(
      curve,
      tolerance,
      peaks.map(({ x }) => x),
    ),
  );
  const outlines = spans.map((each) => polylineOf(each, toX, toY));
  const { angle, pitch } = HATCH[quantity];
  const areas = outlines.map((outline): Point[] => [[frame.x0, base], ...outline, [frame.x1, base]]);
  const layout = {
    quantity,
    top,
    plotTop,
    bottom,
    base,
    toY,
    curves,
    hatch: perUnit > 0 ? areas.map((area) => hatchOf(area, angle, pitch)).join('') : '',
    lines: spans.map((each) => pathOf(each, toX, toY, base)),
  };
  const labels = layLabels(context, layout, peaks, areas);
  const kept = new Set(labels.map(({ from }) => from));
  const dots = peaks
    .filter(({ rank }) => rank < 100)
    .map((peak): Point => [toX(peak.x), toY(peak.value)])
    .concat([...kept].filter(([, y]) => y === base));
  const times = `drawn × ${timesDrawn(perUnit, frame.perMetre)}`;
  const notes = notesOf(context, diagram, quantity === 'deflection' && perUnit > 0 ? times : null);
  return { ...layout, labels, dots, notes };
}
