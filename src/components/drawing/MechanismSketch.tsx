import type { DisplacedShape } from '@/engine/model/index';
import { arrowPath } from './marks/paths';
import { displacedPath } from './schematic/displaced';
import { SchematicFrame, SchematicMember, spread } from './schematic/SchematicFrame';
import { SchematicLoads } from './schematic/SchematicLoads';
import type { SchematicBeam } from './schematic/schematic-layout';

export type MechanismSketchProps = {
  beam: SchematicBeam;
  /** How it moves, as the engine found it; left out for a beam that slides sideways. */
  motion?: DisplacedShape | undefined;
  /** The same in words: "It turns about the roller at 1.800 m." */
  label: string;
  width?: number | undefined;
};

const HEIGHT = 78;
const SIZE = { margin: 26, base: 33, support: 0.7, wall: { thick: 10, beyond: 13 } };
const BASE = SIZE.base;
const REACH = 26;

/** How a beam moves that nothing holds: the member where it is, and dashed where it goes. */
export function MechanismSketch({ beam, motion, label, width = 232 }: MechanismSketchProps) {
  const toX = spread(width, SIZE, beam.length);
  return (
    <SchematicFrame width={width} height={HEIGHT} label={label}>
      <SchematicMember beam={beam} toX={toX} size={SIZE} />
      <SchematicLoads loads={beam.loads ?? []} length={beam.length} toX={toX} base={BASE} scale={1} />
      {motion ? (
        <path className="error-line heavy" d={displacedPath(motion, toX, BASE, REACH)} />
      ) : (
        <path
          className="error-arrow"
          d={arrowPath(width / 2 - 22, BASE + 22, width / 2 + 22, BASE + 22, 8, 2.6)}
        />
      )}
    </SchematicFrame>
  );
}
