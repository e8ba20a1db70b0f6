import { useMemo } from 'react';
import type { Piecewise } from '@/engine/polynomial/index';
import { valueAt } from './geometry/curve';
import type { NamedLength } from './geometry/dimensions';
import { lengthRows, NamedLengths, ROW } from './schematic/NamedLengths';
import { SchematicFrame, SchematicMember, spread } from './schematic/SchematicFrame';
import { SchematicLoads } from './schematic/SchematicLoads';
import { type SchematicMark, SchematicMarks } from './schematic/SchematicMarks';
import { type SchematicBeam, schematicCurve } from './schematic/schematic-layout';
import type { MomentSide } from './signs';

export type SchematicProps = {
  beam: SchematicBeam;
  /** What the drawing shows, for those who do not see it; without it the drawing is decoration. */
  label?: string | undefined;
  moment?: Piecewise | undefined;
  deflected?: Piecewise | undefined;
  momentSide?: MomentSide | undefined;
  /** `glyph` for choices, `row` for lists and equations, `card` for a title card with names and dimensions. */
  size?: 'glyph' | 'row' | 'card' | undefined;
  width?: number | undefined;
  mark?: SchematicMark | undefined;
  /** Names of the loads by their place in the beam, and of lengths; drawn on a card. */
  loadNames?: readonly (string | undefined)[] | undefined;
  lengths?: readonly NamedLength[] | undefined;
};

const SIZES = {
  glyph: {
    width: 58,
    height: 34,
    base: 20,
    reach: 7,
    loads: 0.7,
    support: 0.5,
    margin: 10,
    wall: { thick: 6, beyond: 8 },
  },
  row: {
    width: 232,
    height: 72,
    base: 33,
    reach: 18,
    loads: 1,
    support: 0.7,
    margin: 26,
    wall: { thick: 10, beyond: 13 },
  },
  card: {
    width: 310,
    height: 118,
    base: 54,
    reach: 26,
    loads: 1.4,
    support: 0.9,
    margin: 26,
    wall: { thick: 12, beyond: 21 },
  },
} as const;

/** A small drawing of a beam: supports and loads on one heavy line, and a diagram or deflected shape over it. */
export function Schematic(props: SchematicProps) {
  const { beam, moment, deflected, mark, loadNames, lengths, momentSide: side = 'tension' } = props;
  const size = SIZES[props.size ?? 'row'];
  const { base, reach } = size;
  const width = props.width ?? size.width;
  const toX = useMemo(() => spread(width, size, beam.length), [width, size, beam.length]);
  const rows = lengthRows(lengths ?? [], { toX, width });
  const height = size.height + Math.max(0, rows.length - 2) * ROW;
  const { momentCurve, shape } = useMemo(() => {
    const at = { toX, base, side };
    return {
      momentCurve: moment && schematicCurve(moment, 'moment', { ...at, reach }),
      shape: deflected && schematicCurve(deflected, 'deflection', { ...at, reach: reach + 3 }),
    };
  }, [toX, base, reach, side, moment, deflected]);
  const deflectedAt = (x: number) => (deflected && shape ? shape.toY(valueAt(deflected, x)) : base);
  return (
    <SchematicFrame width={width} height={height} label={props.label}>
      {momentCurve && <path className="hatch-moment" d={momentCurve.hatch} />}
      {momentCurve && <path className="curve-moment schematic-curve" d={momentCurve.line} />}
      {shape && <path className="curve-deflection" d={shape.line} />}
      <SchematicMember beam={beam} toX={toX} size={size} />
      <SchematicLoads
        loads={beam.loads ?? []}
        length={beam.length}
        toX={toX}
        base={base}
        scale={size.loads}
        names={loadNames}
      />
      {mark && <SchematicMarks mark={mark} toX={toX} base={base} width={width} deflectedAt={deflectedAt} />}
      <NamedLengths rows={rows} toX={toX} width={width} from={base + 32} />
    </SchematicFrame>
  );
}
