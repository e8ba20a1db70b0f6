import type { ReactNode } from 'react';
import type { Map1 } from '../geometry/curve';
import { arrowPath } from '../marks/paths';
import { type Seat, SupportMark } from '../marks/Supports';
import { type SchematicBeam, schematicSupports } from './schematic-layout';

/** Measures of a small drawing, px. */
export type SchematicSize = {
  margin: number;
  base: number;
  support: number;
  wall: { thick: number; beyond: number };
};

/** x on a small drawing whose member runs from margin to margin. */
export const spread =
  (width: number, { margin }: SchematicSize, length: number) =>
  (metres: number): number =>
    margin + ((width - 2 * margin) * metres) / length;

function seatOf(at: number, length: number, x: number, { base, support, wall }: SchematicSize): Seat {
  const end = at < length * 1e-6 ? 'left' : at > length * (1 - 1e-6) ? 'right' : null;
  return { x, top: base - 1.5, centre: base, underside: base + 1.5, end, scale: support, wall };
}

/** The member as one heavy line, with its supports, their movements and its hinges. */
export function SchematicMember({
  beam,
  toX,
  size,
}: {
  beam: SchematicBeam;
  toX: Map1;
  size: SchematicSize;
}) {
  const { base } = size;
  const reach = size.support / 0.7;
  const supports = schematicSupports(beam);
  return (
    <>
      <path className="schematic-member" d={`M${toX(0)} ${base}H${toX(beam.length)}`} />
      {supports.map((each) => (
        <SupportMark key={each.at} support={each} seat={seatOf(each.at, beam.length, toX(each.at), size)} />
      ))}
      {supports.map(({ at, rise }) => {
        if (rise === 0) return null;
        const x = toX(at) + 15 * reach;
        const [near, far] = [base + 5 * reach, base + 22 * reach];
        const [from, to] = rise < 0 ? [near, far] : [far, near];
        return <path key={at} className="thin filled" d={arrowPath(x, from, x, to, 6, 2)} />;
      })}
      {(beam.hinges ?? []).map((at) => (
        <circle key={at} cx={toX(at)} cy={base} r={3.4} className="hinge" />
      ))}
    </>
  );
}

/** A small drawing's own sheet. Without a label it is decoration beside words that say the same. */
export function SchematicFrame({
  width,
  height,
  label,
  children,
}: {
  width: number;
  height: number;
  label: string | undefined;
  children: ReactNode;
}) {
  return (
    <svg
      className="drawing schematic"
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role={label ? 'img' : undefined}
      aria-label={label}
      aria-hidden={label ? undefined : true}
    >
      {children}
    </svg>
  );
}
