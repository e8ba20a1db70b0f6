import type { DrawingFormat } from '../format';
import { ticksPath } from '../marks/paths';
import type { OutlineDetail, Thickness } from './outlined';

interface DetailsProps {
  readonly detail: OutlineDetail;
  readonly scale: number;
  /** px of the outline's left edge and of its bottom. */
  readonly left: number;
  readonly ground: number;
  readonly format: DrawingFormat;
}

const BEYOND = 14; // px that principal axes stand out of the smaller half of the outline

/** What one section alone has room for: thicknesses, centroid, shear centre and principal axes. */
export function OutlineDetails({ detail, scale, left, ground, format }: DetailsProps) {
  const at = ({ x, y }: { x: number; y: number }) => ({ x: left + x * scale, y: ground - y * scale });
  const centroid = at(detail.centroid);
  const shearCentre = detail.shearCentre && at(detail.shearCentre);
  return (
    <>
      {detail.principal && (
        <PrincipalAxes
          at={centroid}
          angle={detail.principal.angle}
          half={detail.principal.reach * scale + BEYOND}
        />
      )}
      {detail.thicknesses.map((one) => (
        <ThicknessMark
          key={`${one.along} ${one.at}`}
          thickness={one}
          scale={scale}
          left={left}
          ground={ground}
          format={format}
        />
      ))}
      <circle className="filled" cx={centroid.x} cy={centroid.y} r={2.5} />
      {shearCentre && (
        <>
          <circle className="medium on-paper" cx={shearCentre.x} cy={shearCentre.y} r={3.5} />
          <text x={shearCentre.x} y={shearCentre.y - 8} textAnchor="middle" className="note on-line">
            <tspan className="symbol">M</tspan>
          </text>
        </>
      )}
    </>
  );
}

/** u, about which the second moment is greatest, and v across it. */
function PrincipalAxes({ at, angle, half }: { at: { x: number; y: number }; angle: number; half: number }) {
  const axes = [
    { letter: 'u', turn: angle },
    { letter: 'v', turn: angle + Math.PI / 2 },
  ];
  return axes.map(({ letter, turn }) => {
    const [dx, dy] = [half * Math.cos(turn), -half * Math.sin(turn)];
    return (
      <g key={letter}>
        <path className="construction" d={`M${at.x - dx} ${at.y - dy}L${at.x + dx} ${at.y + dy}`} />
        <text x={at.x + 1.12 * dx} y={at.y + 1.12 * dy + 4} textAnchor="middle" className="note on-line">
          <tspan className="symbol">{letter}</tspan>
        </text>
      </g>
    );
  });
}

interface MarkProps extends Omit<DetailsProps, 'detail'> {
  readonly thickness: Thickness;
}

function ThicknessMark({ thickness, scale, left, ground, format }: MarkProps) {
  const { along, from, to, at } = thickness;
  const value = format.value('sectionSize', (to - from) / 1000);
  if (along === 'across') {
    const [start, end, y] = [left + from * scale, left + to * scale, ground - at * scale];
    return (
      <>
        <path className="dimension" d={`M${start - 8} ${y}H${end + 12}`} />
        <path className="dimension-tick" d={ticksPath([start, end], y)} />
        <text x={end + 15} y={y + 4} className="figure">
          {value}
        </text>
      </>
    );
  }
  const [top, bottom, x] = [ground - to * scale, ground - from * scale, left + at * scale];
  return (
    <>
      <path className="dimension" d={`M${x} ${top - 8}V${bottom + 10}`} />
      <path className="dimension-tick" d={`M${x - 3.5} ${top + 3.5}l7 -7M${x - 3.5} ${bottom + 3.5}l7 -7`} />
      <text x={x} y={bottom + 22} textAnchor="middle" className="figure">
        {value}
      </text>
    </>
  );
}
