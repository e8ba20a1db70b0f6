import type { DrawingFormat } from '../format';
import { scaleBarOf } from './outlined';

/** Two round divisions, ending at `right`. */
export function ScaleBar({
  scale,
  right,
  y,
  format,
}: {
  scale: number;
  right: number;
  y: number;
  format: DrawingFormat;
}) {
  const { unit, metres } = format.scaleBar;
  const { division, value } = scaleBarOf(scale, metres * 1000, 24);
  const left = right - 2 * division;
  return (
    <>
      <path
        className="medium"
        d={`M${left} ${y}H${right}M${left} ${y - 4}v8M${right - division} ${y - 4}v8M${right} ${y - 4}v8`}
      />
      <text x={left - 8} y={y + 4} textAnchor="end" className="axis">
        0
      </text>
      <text x={right} y={y - 8} textAnchor="end" className="axis">{`${2 * value} ${unit}`}</text>
    </>
  );
}
