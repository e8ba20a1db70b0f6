import type { Load } from '@/engine/model/index';
import type { Map1 } from '../geometry/curve';
import { combRows, oneWayParts } from '../geometry/stacking';
import { arrowPath, combPaths } from '../marks/paths';
import { Rich } from '../marks/Rich';
import { Turn } from '../strip/Loads';
import { relativeHeight } from './schematic-layout';

type Props = {
  loads: readonly Load[];
  toX: Map1;
  base: number;
  scale: number;
  names?: readonly (string | undefined)[] | undefined;
};

const largestOf = (sizes: readonly number[]): number => Math.max(0, ...sizes.map(Math.abs));

function Name({ x, y, text }: { x: number; y: number; text: string | undefined }) {
  if (!text) return null;
  return (
    <text x={x} y={y} className="figure">
      <Rich text={text} />
    </text>
  );
}

function Combs({ loads, toX, base, scale, names }: Props) {
  const rows = combRows(loads);
  const tallest = (rows.length > 1 ? 9 : 11) * scale;
  return rows.flatMap((row, level) =>
    row.loads.flatMap(({ load, index }) => {
      // Rows of uniform load are all of one height; a load that varies needs more to show it.
      const { w0: a, w1: b } = load;
      const tall = (w: number) =>
        a === b ? tallest : Math.max(2, (Math.abs(w) / Math.max(Math.abs(a), Math.abs(b))) * 18 * scale);
      const y = base - 2 - level * (tallest + 4);
      return oneWayParts(load).map(({ from, to, w0, w1 }) => {
        const upward = w0 + w1 < 0;
        const { arrows, cap } = combPaths([toX(from), toX(to)], y, [tall(w0), tall(w1)], {
          step: 13,
          upward,
        });
        const sense = upward ? ' upward' : '';
        return (
          <g key={`${index} ${from}`}>
            <path className={`load${sense}`} d={arrows} />
            <path className={`load-cap${sense}`} d={cap} />
            <Name x={toX(from) + 2} y={y - tallest - 5} text={names?.[index]} />
          </g>
        );
      });
    }),
  );
}

function Points({ loads, toX, base, scale, names }: Props) {
  const most = largestOf(loads.flatMap((load) => (load.kind === 'point' ? [load.p] : [])));
  return loads.map((load, index) => {
    if (load.kind !== 'point' || load.p === 0) return null;
    const x = toX(load.at);
    const tall = relativeHeight(load.p, most, 26 * scale);
    const path =
      load.p < 0
        ? arrowPath(x, base - 2, x, base - tall, 7, 2)
        : arrowPath(x, base - tall, x, base - 2, 7, 2);
    return (
      // biome-ignore lint/suspicious/noArrayIndexKey: a load is known by its place in the beam
      <g key={index}>
        <path className={`load-point${load.p < 0 ? ' upward' : ''}`} d={path} />
        <Name x={x + 6} y={base - tall + 9} text={names?.[index]} />
      </g>
    );
  });
}

/** The loads of a small drawing: no figures, only their kind, place, sense and order of size. */
export function SchematicLoads(props: Props) {
  const { loads, toX, base, scale, names } = props;
  return (
    <>
      <Combs {...props} />
      <Points {...props} />
      {loads.map((load, index) => {
        if (load.kind === 'couple' && load.m !== 0) {
          return (
            // biome-ignore lint/suspicious/noArrayIndexKey: a load is known by its place in the beam
            <g key={index}>
              <Turn
                x={toX(load.at)}
                y={base}
                radius={10 * scale}
                clockwise={load.m < 0}
                className="load-couple"
              />
              <Name x={toX(load.at) + 12 * scale} y={base - 10 * scale} text={names?.[index]} />
            </g>
          );
        }
        if (load.kind === 'curvature' && load.kappa !== 0) {
          const [from, to] = [toX(load.from), toX(load.to)];
          const bow = load.kappa > 0 ? 7 : -7;
          return (
            <path
              // biome-ignore lint/suspicious/noArrayIndexKey: a load is known by its place in the beam
              key={index}
              className="medium upward"
              d={`M${from} ${base - 14 * scale}Q${(from + to) / 2} ${base - 14 * scale + bow} ${to} ${base - 14 * scale}`}
            />
          );
        }
        return null;
      })}
    </>
  );
}
