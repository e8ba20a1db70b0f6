import type { Map1 } from '../geometry/curve';

interface SegmentsProps {
  /** `ei`: share of the member's own stiffness; `share`: the same as it is written. */
  segments: readonly { from: number; to: number; ei: number; share: string }[];
  toX: Map1;
  base: number;
}

/** Half a section's depth for this share of the stiffness, px: it grows with the cube root, as a solid one's does. */
const halfDepth = (share: number): number => Math.min(9, Math.max(2.5, 4 * Math.cbrt(Math.abs(share))));

/** Lengths of another stiffness as steps in the member's depth. */
export function SchematicSegments({ segments, toX, base }: SegmentsProps) {
  return segments.map(({ from, to, ei, share }) => {
    const half = halfDepth(ei);
    return (
      <g key={`${from} ${to}`}>
        <rect
          x={toX(from)}
          y={base - half}
          width={toX(to) - toX(from)}
          height={2 * half}
          className="member"
        />
        <text x={(toX(from) + toX(to)) / 2} y={base + half + 13} textAnchor="middle" className="note">
          {share} EI
        </text>
      </g>
    );
  });
}
