import type { Load } from '@/engine/model/index';
import type { Map1 } from '../geometry/curve';
import { type CombRow, combRows, oneWayParts } from '../geometry/stacking';
import { arrowPath, combPaths } from '../marks/paths';
import { Rich } from '../marks/Rich';
import { Turn } from '../strip/Loads';
import { relativeHeight } from './schematic-layout';

type Props = {
  loads: readonly Load[];
  /** Of the beam, m. */
  length: number;
  toX: Map1;
  base: number;
  scale: number;
  names?: readonly (string | undefined)[] | undefined;
};

const largestOf = (sizes: readonly number[]): number => Math.max(0, ...sizes.map(Math.abs));

function Name({
  x,
  y,
  text,
  anchor = 'start',
}: {
  x: number;
  y: number;
  text: string | undefined;
  anchor?: 'start' | 'end';
}) {
  if (!text) return null;
  return (
    <text x={x} y={y} textAnchor={anchor} className="figure">
      <Rich text={text} />
    </text>
  );
}

/** Where a row writes each of its names: the first of its loads that goes by it. */
const namedIn = (row: CombRow, names: Props['names']): ReadonlySet<number> =>
  new Set(
    [...new Set(row.loads.map(({ index }) => names?.[index]))].map(
      (name) => row.loads.find(({ index }) => names?.[index] === name)?.index ?? -1,
    ),
  );

function Combs({ loads, toX, base, scale, names }: Props) {
  const rows = combRows(loads);
  const tallest = (rows.length > 1 ? 9 : 11) * scale;
  let y = base - 2;
  return rows.flatMap((row) => {
    // Rows of uniform load are all of one height; a row that varies needs more to show it, and one scale.
    const isEven = row.loads.every(({ load }) => load.w0 === load.w1);
    const most = isEven ? tallest : 18 * scale;
    const tall = (w: number) => (isEven ? most : w === 0 ? 0 : Math.max(3, (Math.abs(w) / row.most) * most));
    const foot = y;
    const named = namedIn(row, names);
    y -= most + (names?.some(Boolean) ? 13 : 4);
    return row.loads.flatMap(({ load, index }) =>
      oneWayParts(load).map(({ from, to, w0, w1 }, part) => {
        const upward = w0 + w1 < 0;
        const { arrows, cap } = combPaths([toX(from), toX(to)], foot, [tall(w0), tall(w1)], {
          step: 13,
          upward,
        });
        const sense = upward ? ' upward' : '';
        const rises = Math.abs(w1) > Math.abs(w0);
        return (
          <g key={`${index} ${from}`}>
            <path className={`load${sense}`} d={arrows} />
            <path className={`load-cap${sense}`} d={cap} />
            {part === 0 && named.has(index) && (
              <Name
                x={rises ? toX(to) - 2 : toX(from) + 2}
                y={foot - Math.max(tall(w0), tall(w1)) - 5}
                text={names?.[index]}
                anchor={rises ? 'end' : 'start'}
              />
            )}
          </g>
        );
      }),
    );
  });
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

/** A couple's name stands over its arc: beside it within the span, and beyond the beam at an end. */
function Couple({
  at,
  clockwise,
  name,
  toX,
  base,
  scale,
  length,
}: Props & { at: number; clockwise: boolean; name: string | undefined }) {
  const radius = 10 * scale;
  const x = toX(at);
  const end = at < length * 1e-6 ? 'left' : at > length * (1 - 1e-6) ? 'right' : null;
  const aside = { left: -2, right: 2, within: 12 * scale }[end ?? 'within'];
  return (
    <>
      <Turn x={x} y={base} radius={radius} clockwise={clockwise} className="load-couple" />
      <Name
        x={x + aside}
        y={end ? base - radius - 5 : base - radius}
        text={name}
        anchor={end === 'left' ? 'end' : 'start'}
      />
    </>
  );
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
            <Couple key={index} {...props} at={load.at} clockwise={load.m < 0} name={names?.[index]} />
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
