import { textWidth } from '../geometry/text-width';
import { cloudPath } from '../marks/paths';
import type { ElevationLayout } from './elevation-layout';
import type { Frame } from './frame';

/** What stops the drawing, as it is written on it: "L = 0", "Give a span of 1 to 18 m". */
export type DrawingFault = { text: string; advice: string };

/** A cloud over the span's dimension, with what to do beside it. */
export function FaultCloud({
  fault,
  frame,
  layout,
}: {
  fault: DrawingFault;
  frame: Frame;
  layout: ElevationLayout;
}) {
  const width = Math.max(120, textWidth(fault.text, 13.5, 600) + 50);
  const x = (frame.x0 + frame.x1) / 2;
  const y = (layout.dimensions.at(-1)?.y ?? layout.height) - 6;
  const right = x + width / 2;
  const beside = right + 60 + textWidth(fault.advice, 14, 600) < frame.width;
  return (
    <>
      <path className="cloud paper" d={cloudPath(x - width / 2, y - 26, width, 44)} />
      <text x={x} y={y + 1} textAnchor="middle" className="error-text">
        {fault.text}
      </text>
      {beside && <path className="error-leader" d={`M${right + 6} ${y - 8}L${right + 46} ${y - 22}`} />}
      <text
        x={beside ? right + 52 : x}
        y={beside ? y - 20 : y - 44}
        textAnchor={beside ? 'start' : 'middle'}
        className="error-text"
      >
        {fault.advice}
      </text>
    </>
  );
}
