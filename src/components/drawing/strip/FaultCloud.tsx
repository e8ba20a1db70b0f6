import { textWidth } from '../geometry/text-width';
import { cloudPath } from '../marks/paths';
import type { ElevationLayout } from './elevation-layout';
import type { Frame } from './frame';

/**
 * What stops the drawing, as it is written on it: "Span is 0 m", "Give 0.3 m to 30 m." `place` is the length's symbol, whose figure
 * is clouded.
 */
export type DrawingFault = { text: string; advice: string; place?: string | undefined };

/** A cloud over the figure that is wrong, or over the whole length, with what to do beside it. */
export function FaultCloud({
  fault,
  frame,
  layout,
}: {
  fault: DrawingFault;
  frame: Frame;
  layout: ElevationLayout;
}) {
  const half = Math.max(60, textWidth(fault.text, 13.5, 600) / 2 + 25);
  const figure = layout.figures.find(({ edits }) => edits !== undefined && edits === fault.place);
  const middle = figure?.x ?? (frame.x0 + frame.x1) / 2;
  const x = Math.max(half + 4, Math.min(frame.width - half - 4, middle));
  const y = figure ? figure.y + 4 : (layout.dimensions.at(-1)?.y ?? layout.height) - 6;
  // A phone has the room for the advice only in the list under the drawing.
  const isAdvised = frame.mode !== 'phone' && x + half + 8 + textWidth(fault.advice, 14, 600) < frame.width;
  return (
    <>
      <path className="cloud paper" d={cloudPath(x - half, y - 26, 2 * half, 44)} />
      <text x={x} y={y + 1} textAnchor="middle" className="error-text">
        {fault.text}
      </text>
      {isAdvised && (
        <text x={x + half + 8} y={y + 1} className="error-text">
          {fault.advice}
        </text>
      )}
    </>
  );
}
