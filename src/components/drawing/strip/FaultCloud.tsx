import { textWidth } from '../geometry/text-width';
import { cloudPath } from '../marks/paths';
import type { ElevationLayout } from './elevation-layout';
import type { Frame } from './frame';

/**
 * What stops the drawing, as it is written on it: "Span is 0 m", "Give 0.3 m to 30 m." `place` is the length's symbol, whose figure
 * is clouded.
 */
export type DrawingFault = { text: string; advice: string; place?: string | undefined };

/** How far the advice stands beside the cloud, px. */
const LEADER = 60;

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
  const reach = LEADER + textWidth(fault.advice, 13.5, 600);
  // Away from the middle, where the whole length has its figure.
  const isLeft = x < (frame.x0 + frame.x1) / 2 - 1;
  const fits = { left: x - half - reach > 6, right: x + half + reach < frame.width };
  const side = (isLeft && fits.left) || !fits.right ? -1 : 1;
  // A phone has the room for the advice only in the list under the drawing.
  const isAdvised = frame.mode !== 'phone' && fault.advice !== '' && (fits.left || fits.right);
  const [from, to] = [x + side * (half - 2), x + side * (half + LEADER - 8)];
  const low = (layout.dimensions.at(-1)?.y ?? y) + 34;
  return (
    <>
      <path className="cloud paper" d={cloudPath(x - half, y - 26, 2 * half, 44)} />
      <text x={x} y={y + 1} textAnchor="middle" className="error-text">
        {fault.text}
      </text>
      {isAdvised && (
        <>
          <path className="cloud fault-leader" d={`M${from} ${y + 4}L${to} ${low - 5}`} />
          <text x={to + side * 6} y={low} textAnchor={side > 0 ? 'start' : 'end'} className="error-text">
            {fault.advice}
          </text>
        </>
      )}
    </>
  );
}
