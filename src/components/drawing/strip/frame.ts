import type { Quantity } from '../signs';

/** Where a strip is shown. On a phone the gutters fold away and values stand over the strips; on paper there is no plumb line. */
export type StripMode = 'screen' | 'phone' | 'print';

/** Lengths in px that differ between the three. */
type Metrics = {
  gutterLeft: number;
  gutterRight: number;
  pad: number;
  depthMost: number;
  head: number;
  axis: number;
  heights: Record<Quantity, number>;
  /** Of a strip without a result. */
  empty: number;
  /** From one line of notes to the next. */
  notePitch: number;
  comb: number;
  combStacked: number;
  combPitch: number;
  supportScale: number;
  /** Distances from the left and right ends to the bubble and to the reaction arrow. */
  bubble: [left: number, right: number];
  reaction: [left: number, right: number];
};

const METRICS: Record<StripMode, Metrics> = {
  screen: {
    gutterLeft: 136,
    gutterRight: 136,
    pad: 44,
    depthMost: 44,
    head: 0,
    axis: 46,
    heights: { shear: 116, moment: 130, slope: 80, deflection: 92 },
    empty: 56,
    notePitch: 14,
    comb: 26,
    combStacked: 17,
    combPitch: 22,
    supportScale: 1,
    bubble: [58, 46],
    reaction: [92, 80],
  },
  phone: {
    gutterLeft: 14,
    gutterRight: 14,
    pad: 30,
    depthMost: 16,
    head: 24,
    axis: 44,
    heights: { shear: 92, moment: 104, slope: 66, deflection: 76 },
    empty: 24,
    notePitch: 14,
    comb: 26,
    combStacked: 15,
    combPitch: 15,
    supportScale: 0.85,
    bubble: [19, 19],
    reaction: [0, 0],
  },
  print: {
    gutterLeft: 96,
    gutterRight: 78,
    pad: 30,
    depthMost: 30,
    head: 0,
    axis: 28,
    heights: { shear: 80, moment: 92, slope: 64, deflection: 74 },
    empty: 44,
    notePitch: 16,
    comb: 18,
    combStacked: 14,
    combPitch: 18,
    supportScale: 0.9,
    bubble: [42, 30],
    reaction: [72, 56],
  },
};

/** The x axis that every strip shares. */
export type Frame = Metrics & {
  mode: StripMode;
  width: number;
  length: number;
  x0: number;
  x1: number;
  perMetre: number;
};

export function frameOf(mode: StripMode, width: number, length: number): Frame {
  const metrics = METRICS[mode];
  const x0 = metrics.gutterLeft + metrics.pad;
  const x1 = Math.max(x0 + 40, width - metrics.gutterRight - metrics.pad);
  return { ...metrics, mode, width, length, x0, x1, perMetre: (x1 - x0) / length };
}

/** x of a station, to a hundredth of a px. */
export const xOf = (frame: Frame, metres: number): number =>
  Math.round((frame.x0 + metres * frame.perMetre) * 100) / 100;
