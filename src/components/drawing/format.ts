/** What a number on a drawing is for; the practice's unit system gives each purpose its unit and its decimals. */
export type Purpose =
  | 'length'
  | 'force'
  | 'lineLoad'
  | 'moment'
  | 'slope'
  | 'deflection'
  | 'curvature'
  | 'spring'
  | 'rotationalSpring'
  | 'sectionSize';

/** How SI numbers become figures. `value` writes the minus as U+2212 and groups thousands with a thin space. */
export type DrawingFormat = {
  value: (purpose: Purpose, si: number) => string;
  /** Empty where the figure carries its own marks, as feet and inches do. */
  unit: (purpose: Purpose) => string;
  /** The station axis, and how far the plumb line moves; all in metres but the name. */
  station: {
    unit: string;
    step: number;
    nudge: number;
    leap: number;
    snap: number;
  };
  /** The unit of scale bars beside sections, and its length in metres. */
  scaleBar: { unit: string; metres: number };
};

/** The figure with its unit: "83.1 kNm". */
export function figure(format: DrawingFormat, purpose: Purpose, si: number): string {
  const unit = format.unit(purpose);
  const value = format.value(purpose, si);
  return unit === '' ? value : `${value} ${unit}`;
}

/** A figure over a dimension line: lengths there carry no unit unless it is part of the figure. */
export function dimensionFigure(format: DrawingFormat, metres: number): string {
  return format.value('length', metres);
}

/** "a = 4.500", or the figure alone where the length has no name. */
export function named(symbol: string | undefined, text: string): string {
  return symbol === undefined ? text : `${symbol} = ${text}`;
}
