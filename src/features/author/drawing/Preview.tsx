import { useMemo } from 'react';
import { type DrawingFormat, figure } from '@/components/drawing/format';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
import { DRAWING_FORMATS } from '@/components/drawing/quantity-format';
import { SchematicFrame } from '@/components/drawing/schematic/SchematicFrame';
import { schematicCurve } from '@/components/drawing/schematic/schematic-layout';
import { toScreen } from '@/components/drawing/signs';
import type { Solution } from '@/engine/beam';
import { supportLetter } from '@/engine/model';
import type { UnitSystemName } from '@/engine/quantity';
import { judgeRules } from '@/engine/template';
import { BrokenExpression } from '@/engine/template/evaluate';
import { solveProven } from '@/features/beam/solve';
import type { Sketch } from './sketch';
import type { StageLayout } from './stage-layout';

interface PreviewProps {
  readonly sketch: Sketch;
  readonly layout: StageLayout;
  readonly system: UnitSystemName;
}

const HEIGHT = 96;
const BASE = 46;
const REACH = 30;

/** Reactions and moments of the draft at the values that are shown, as the template's page will have them. */
export function Preview({ sketch, layout, system }: PreviewProps) {
  const solved = useMemo(() => solveProven(sketch.instance.beam), [sketch]);
  const rules = useMemo(() => brokenRules(sketch, solved), [sketch, solved]);
  if (!solved.ok)
    return <p className="text-ink-2">{solved.faults.map(({ message }) => message).join(' ')}</p>;
  const { solution } = solved.value;
  const format = DRAWING_FORMATS[system];
  return (
    <>
      <MomentStrip solution={solution} layout={layout} format={format} />
      <ReactionList reactions={solution.reactions} format={format} />
      {rules.length > 0 && (
        <ul className="mt-6 text-schedule text-ochre-ink">
          {rules.map((message) => (
            <li key={message}>{message}</li>
          ))}
        </ul>
      )}
    </>
  );
}

interface Solved {
  readonly solution: Solution;
  readonly layout: StageLayout;
  readonly format: DrawingFormat;
}

/** The moment on the drawing's own scale of lengths, with its extremes. */
function MomentStrip({ solution, layout, format }: Solved) {
  const { moment } = solution.diagrams;
  const { toX, width, size } = layout;
  const curve = schematicCurve(moment, 'moment', { toX, base: BASE, reach: REACH, side: 'tension' });
  const { max, min } = solution.extremes.moment;
  const peaks = [...(max.value > 0 ? [max] : []), ...(min.value < 0 ? [min] : [])].flatMap(
    ({ value, at: [x] }) => (x === undefined ? [] : [{ value, x }]),
  );
  const words = peaks.map(({ value }) => figure(format, 'moment', toScreen('moment', value)));
  return (
    <div className="[&_svg]:max-w-full">
      <SchematicFrame width={width} height={HEIGHT} label={`Moment: ${words.join(' and ') || 'none'}`}>
        <path className="thin" d={`M${size.margin} ${BASE}H${width - size.margin}`} />
        <path className="hatch-moment" d={curve.hatch} />
        <path className="curve-moment" d={curve.line} />
        {peaks.map(({ value, x }, index) => (
          <text
            key={value}
            x={Math.min(width - 40, Math.max(40, toX(x)))}
            y={curve.toY(value) + (value > 0 ? 15 : -6)}
            textAnchor="middle"
            className="peak text-moment"
          >
            {words[index]}
          </text>
        ))}
      </SchematicFrame>
    </div>
  );
}

function ReactionList({
  reactions,
  format,
}: {
  readonly reactions: Solution['reactions'];
  readonly format: DrawingFormat;
}) {
  return (
    <dl className="flex flex-wrap gap-x-20 gap-y-4 text-schedule">
      {reactions.flatMap(({ vertical, moment: turning }, index) => {
        const letter = supportLetter(index);
        return [
          { symbol: `R_{${letter}}`, text: figure(format, 'force', vertical) },
          ...(turning === 0 ? [] : [{ symbol: `M_{${letter}}`, text: figure(format, 'moment', turning) }]),
        ].map(({ symbol, text }) => (
          <div key={symbol} className="flex gap-6">
            <dt className="font-semibold">
              <RichHtml text={symbol} />
            </dt>
            <dd>{text}</dd>
          </div>
        ));
      })}
    </dl>
  );
}

/** What the draft's own rules say of these values; nothing while one of them is still being written. */
function brokenRules({ template, instance }: Sketch, solved: ReturnType<typeof solveProven>): string[] {
  try {
    return judgeRules(template, instance.scope, { solution: solved.ok ? solved.value.solution : undefined })
      .filter(({ state }) => state === 'broken')
      .map(({ message }) => message);
  } catch (error) {
    if (error instanceof BrokenExpression) return [];
    throw error;
  }
}
