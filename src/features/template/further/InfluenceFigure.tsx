import { useMemo, useRef } from 'react';
import { figure } from '@/components/drawing/format';
import { levels } from '@/components/drawing/geometry/stacking';
import { textWidth } from '@/components/drawing/geometry/text-width';
import { Bubble } from '@/components/drawing/marks/Bubble';
import { arrowPath } from '@/components/drawing/marks/paths';
import { namedSupports, origin } from '@/components/drawing/names';
import { DRAWING_FORMATS } from '@/components/drawing/quantity-format';
import { SchematicMember } from '@/components/drawing/schematic/SchematicFrame';
import { xOf } from '@/components/drawing/strip/frame';
import { StationAxis } from '@/components/drawing/strip/StationAxis';
import { useWidth } from '@/components/drawing/use-width';
import type { InfluenceLine } from '@/engine/influence';
import type { Beam } from '@/engine/model';
import type { UnitSystemName } from '@/engine/quantity';
import { type InfluenceLayout, layInfluence, type StandingTrain } from './influence-layout';
import type { Script } from './script';

interface InfluenceFigureProps {
  readonly beam: Beam;
  readonly influence: InfluenceLine;
  readonly script: Script;
  readonly train: StandingTrain | null;
  readonly system: UnitSystemName;
  /** The drawing in a sentence. */
  readonly label: string;
  /** Before the page lives. */
  readonly width?: number;
}

const SUPPORT = { margin: 0, support: 0.85, wall: { thick: 12, beyond: 16 } };

/** The member with the train where it is worst, and under it the influence line on the same axis. */
export function InfluenceFigure(props: InfluenceFigureProps) {
  const { beam, influence, script, train, system, label } = props;
  const host = useRef<HTMLElement>(null);
  const width = Math.round(useWidth(host, props.width ?? 1000));
  const layout = useMemo(
    () => layInfluence(beam, influence, script, train, width),
    [beam, influence, script, train, width],
  );
  const { frame, base, axis, height, section } = layout;
  const { quantity } = script;
  return (
    <figure ref={host} className="min-w-0">
      <svg className="drawing" viewBox={`0 0 ${width} ${height}`} role="img" aria-label={label}>
        <SchematicMember beam={beam} toX={(x) => xOf(frame, x)} size={{ ...SUPPORT, base: layout.member }} />
        {namedSupports(beam).map(({ letter, support }) => (
          <Bubble
            key={letter}
            x={xOf(frame, support.at) + 22}
            y={layout.member + 20}
            letter={letter}
            radius={9}
          />
        ))}
        {section !== null && <path className="construction" d={`M${section} ${layout.member + 4}V${base}`} />}
        {layout.hatch !== '' && <path className={`hatch-${quantity}`} d={layout.hatch} />}
        <path className="thin" d={`M${frame.x0 - 8} ${base}H${frame.x1 + 8}`} />
        <path className={`curve-${quantity}`} d={layout.line} />
        <Wheels layout={layout} quantity={quantity} system={system} />
        {layout.labels.map(({ x, y, anchor, text, leader, from }) => (
          <g key={`${x} ${y}`}>
            {leader && <path className="leader" d={`M${from[0]} ${from[1]}L${leader[0]} ${leader[1]}`} />}
            <text x={x} y={y} textAnchor={anchor} className={`peak text-${quantity}`}>
              {text}
            </text>
          </g>
        ))}
        <StationAxis frame={frame} format={DRAWING_FORMATS[system]} y={axis} from={origin(beam)} />
      </svg>
    </figure>
  );
}

/** Rows that figures over the arrows may stand in; what finds no room in them is in the table alone. */
const ROWS = 2;

function Wheels({
  layout: { wheels, member, base },
  quantity,
  system,
}: {
  readonly layout: InfluenceLayout;
  readonly quantity: Script['quantity'];
  readonly system: UnitSystemName;
}) {
  const largest = Math.max(...wheels.map(({ force }) => force));
  const texts = wheels.map(({ force }) => figure(DRAWING_FORMATS[system], 'force', force));
  const rows = rowsOf(wheels, texts);
  return wheels.map(({ x, y, force }, i) => {
    const tail = member - 4 - (20 + 20 * (force / largest));
    const row = rows[i] ?? 0;
    return (
      // biome-ignore lint/suspicious/noArrayIndexKey: a wheel is known by its place in the train
      <g key={i}>
        <path className="load-point" d={arrowPath(x, tail, x, member - 3, 9, 2.4)} />
        {row < ROWS && (
          <text x={x} y={member - 50 - row * 15} textAnchor="middle" className="figure">
            {texts[i]}
          </text>
        )}
        <path className="fine" d={`M${x} ${base}V${y}`} />
        <circle cx={x} cy={y} r={2.8} className={`dot-${quantity}`} />
      </g>
    );
  });
}

/** The row of each figure, so that none stands in another; wheels come from the front backwards, either way. */
function rowsOf(wheels: readonly { readonly x: number }[], texts: readonly string[]): number[] {
  const order = wheels.map((_, i) => i).sort((a, b) => wheels[a]!.x - wheels[b]!.x);
  const ranges = order.map((i) => {
    const half = textWidth(texts[i]!, 13.5) / 2;
    return [wheels[i]!.x - half, wheels[i]!.x + half] as const;
  });
  const found = levels(ranges, 6);
  return wheels.map((_, i) => found[order.indexOf(i)] ?? 0);
}
