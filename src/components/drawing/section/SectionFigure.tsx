import type { DrawingFormat } from '../format';
import { textWidth } from '../geometry/text-width';
import { ticksPath } from '../marks/paths';
import { OutlineDetails } from './OutlineDetails';
import type { OutlinedSection } from './outlined';

type Props = { section: OutlinedSection; scale: number; cx: number; ground: number; format: DrawingFormat };

function Axes({ section, scale, cx, ground }: Omit<Props, 'format'>) {
  const { outline, axes, minorAt, majorAt, detail } = section;
  const [half, tall] = [(outline.width * scale) / 2, outline.height * scale];
  const minor = cx - half + (minorAt ?? outline.width / 2) * scale;
  const middle = ground - (majorAt ?? outline.height / 2) * scale;
  // A shear centre outside the back has the axis drawn through it.
  const outside = Math.max(0, -(detail?.shearCentre?.x ?? 0) * scale);
  const start = cx - half - 8 - outside;
  const left = { x: start - 4, textAnchor: 'end', className: 'note' } as const;
  return (
    <>
      <path
        className="centre-line"
        d={`M${minor} ${ground - tall - 10}V${ground + 24}M${start} ${middle}H${cx + half + 8}`}
      />
      <text {...left} y={middle - 1}>
        <tspan className="symbol">{axes.major}</tspan>
      </text>
      <text {...left} y={middle + 12}>
        major
      </text>
      <text x={minor + 5} y={ground + 21} className="note on-line">
        <tspan className="symbol">{axes.minor}</tspan> minor
      </text>
    </>
  );
}

function Sizes({ section, scale, cx, ground, format }: Props) {
  const { width, height } = section.outline;
  const [half, tall] = [(width * scale) / 2, height * scale];
  const top = ground - tall;
  const over = top - 22;
  const right = cx + half + 20;
  const b = format.value('sectionSize', width / 1000);
  const h = format.value('sectionSize', height / 1000);
  const wide = textWidth(b, 13.5) + 4 > 2 * half;
  const upright = `M${right - 3.5} ${top + 3.5}l7 -7M${right - 3.5} ${ground + 3.5}l7 -7`;
  return (
    <>
      <path
        className="dimension-extension"
        d={`M${cx - half} ${top - 4}V${over - 4}M${cx + half} ${top - 4}V${over - 4}M${cx + half + 4} ${top}H${right + 4}`}
      />
      <path className="dimension" d={`M${cx - half} ${over}H${cx + half}M${right} ${top}V${ground}`} />
      <path className="dimension-tick" d={ticksPath([cx - half, cx + half], over) + upright} />
      <text
        x={wide ? cx + half + 6 : cx}
        y={wide ? over + 4 : over - 6}
        textAnchor={wide ? 'start' : 'middle'}
        className="figure"
      >
        {b}
      </text>
      <text
        transform={`translate(${right - 5} ${ground - tall / 2}) rotate(-90)`}
        textAnchor="middle"
        className="figure"
      >
        {h}
      </text>
    </>
  );
}

/** One section standing on its ground line, with axes and its two sizes. */
export function SectionFigure(props: Props) {
  const { section, scale, cx, ground } = props;
  const { path, width, height } = section.outline;
  return (
    <>
      <path
        className="section"
        d={path}
        transform={`translate(${cx - (width * scale) / 2} ${ground - height * scale}) scale(${scale})`}
      />
      <Axes {...props} />
      <Sizes {...props} />
      {section.detail && (
        <OutlineDetails
          detail={section.detail}
          scale={scale}
          left={cx - (width * scale) / 2}
          ground={ground}
          format={props.format}
        />
      )}
    </>
  );
}
