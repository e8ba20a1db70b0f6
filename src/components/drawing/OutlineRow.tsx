import { useRef } from 'react';
import type { DrawingFormat } from './format';
import { groundHatch } from './geometry/hatch';
import { textWidth } from './geometry/text-width';
import { outlineLabel } from './SectionOutline';
import { commonScale, type OutlinedSection } from './section/outlined';
import { ScaleBar } from './section/ScaleBar';
import { SectionFigure } from './section/SectionFigure';
import { useWidth } from './use-width';

const MOST = 4;
const TALLEST = 172;

/** Up to four sections on one ground line at one scale, numbered as in the schedule where they are pinned there. */
export function OutlineRow({
  sections,
  format,
  isNumbered = true,
}: {
  sections: readonly OutlinedSection[];
  format: DrawingFormat;
  isNumbered?: boolean;
}) {
  const host = useRef<HTMLDivElement>(null);
  const width = useWidth(host, 600);
  const shown = sections.slice(0, MOST);
  const slot = width / Math.max(shown.length, 1);
  const narrow = slot < 150;
  const scale = shown.length > 0 ? commonScale(shown, slot, TALLEST, narrow ? 66 : 78) : 1;
  const ground = 46 + Math.max(0, ...shown.map(({ outline }) => outline.height * scale));
  const height = ground + 76;
  // Where names would meet, the numbers alone stand under their sections; the schedule names them.
  const namesFit = shown.every(({ name }) => textWidth(name, 14, 600) + 40 <= slot);
  const label = shown
    .map((section, i) => `${isNumbered ? `${i + 1}, ` : ''}${outlineLabel(section, format)}`)
    .join(' ');
  return (
    <div ref={host}>
      <svg
        className="drawing"
        viewBox={`0 0 ${width} ${height}`}
        role="img"
        aria-label={label || 'No section pinned.'}
      >
        <path className="frame-line" d={`M0 ${ground}H${width}`} />
        <path className="ground" d={groundHatch(0, ground, width, 6)} />
        {shown.map((section, i) => {
          const cx = slot * (i + 0.5) + (narrow ? 2 : 8);
          const bubble = namesFit ? cx - textWidth(section.name, 14, 600) / 2 - 16 : cx - 6;
          return (
            <g key={section.name}>
              <SectionFigure section={section} scale={scale} cx={cx} ground={ground} format={format} />
              {isNumbered && (
                <>
                  <circle cx={bubble} cy={ground + 36} r={10} className="pinned" />
                  <text x={bubble} y={ground + 40} textAnchor="middle" className="bubble-letter">
                    {i + 1}
                  </text>
                </>
              )}
              {namesFit && (
                <text x={cx} y={ground + 41} textAnchor="middle" className="strip-name">
                  {section.name}
                </text>
              )}
            </g>
          );
        })}
        {shown.length > 0 && <ScaleBar scale={scale} right={width - 2} y={ground + 66} format={format} />}
      </svg>
    </div>
  );
}
