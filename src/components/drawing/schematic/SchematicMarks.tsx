import type { Map1 } from '../geometry/curve';
import { arrowPath } from '../marks/paths';
import { Rich } from '../marks/Rich';
import { Turn } from '../strip/Loads';

/**
 * What a picture equation points at. `gap`: the movement of the released beam at the redundant; `unit`: the unit force or couple put
 * there; a `pair` of couples acts on both sides of a cut. `label` is text such as "δ_{B0}" or "1 kN".
 */
export type SchematicMark =
  | { kind: 'gap'; at: number; component: 'vertical' | 'turn'; label: string }
  | {
      kind: 'unit';
      at: number;
      component: 'vertical' | 'turn' | 'pair';
      clockwise?: boolean;
      label: string;
      effect: string;
    };

type Props = {
  mark: SchematicMark;
  toX: Map1;
  base: number;
  width: number;
  deflectedAt: (x: number) => number;
};

function Label({ x, y, text, width }: { x: number; y: number; text: string; width: number }) {
  const end = x > width * 0.6;
  return (
    <text x={x} y={y} textAnchor={end ? 'end' : 'start'} className="figure">
      <Rich text={text} />
    </text>
  );
}

function Gap({ mark, toX, base, width, deflectedAt }: Props) {
  const x = toX(mark.at);
  if (mark.component !== 'vertical')
    return <Label x={x + (x > width * 0.6 ? -18 : 18)} y={base + 24} text={mark.label} width={width} />;
  const to = deflectedAt(mark.at);
  const aside = x > width * 0.6 ? 8 : -8;
  const sense = to < base ? -1 : 1;
  return (
    <>
      {Math.abs(to - base) > 9 && (
        <path className="thin filled" d={arrowPath(x + aside, base + sense, x + aside, to, 6, 2)} />
      )}
      <Label
        x={x + (aside > 0 ? 0 : 4)}
        y={sense > 0 ? Math.max(base + 32, to + 14) : Math.min(base - 16, to - 5)}
        text={mark.label}
        width={width}
      />
    </>
  );
}

type UnitProps = Props & { mark: SchematicMark & { kind: 'unit' } };

function UnitForce({ mark, toX, base, width, deflectedAt }: UnitProps) {
  const x = toX(mark.at);
  const aside = x > width * 0.6 ? -8 : 8;
  return (
    <>
      <path className="load-point" d={arrowPath(x, base + 28, x, base + 3, 7, 2)} />
      <Label x={x + aside} y={base + 28} text={mark.label} width={width} />
      <Label
        x={x - aside / 2}
        y={Math.min(base - 8, deflectedAt(mark.at) - 5)}
        text={mark.effect}
        width={width}
      />
    </>
  );
}

function UnitCouple({ mark, toX, base, width }: UnitProps) {
  const x = toX(mark.at);
  const pair = mark.component === 'pair';
  const clockwise = mark.clockwise ?? false;
  // A sagging pair turns the end on the left of the cut anticlockwise and the one on its right clockwise.
  const turns = pair
    ? [
        { at: x - 12, clockwise },
        { at: x + 12, clockwise: !clockwise },
      ]
    : [{ at: x, clockwise }];
  const side = x > width * 0.6 ? -1 : 1;
  return (
    <>
      {turns.map((turn) => (
        <Turn
          key={turn.at}
          x={turn.at}
          y={base}
          radius={pair ? 9 : 13}
          clockwise={turn.clockwise}
          className="load-couple"
        />
      ))}
      <Label x={x + side * (pair ? 26 : 8)} y={base + (pair ? -14 : 30)} text={mark.label} width={width} />
      <text
        x={x - side * (pair ? 26 : -20)}
        y={base + (pair ? -14 : -18)}
        textAnchor={pair === side > 0 ? 'end' : 'start'}
        className="figure"
      >
        <Rich text={mark.effect} />
      </text>
    </>
  );
}

export function SchematicMarks(props: Props) {
  const { mark } = props;
  if (mark.kind === 'gap') return <Gap {...props} />;
  return mark.component === 'vertical' ? (
    <UnitForce {...props} mark={mark} />
  ) : (
    <UnitCouple {...props} mark={mark} />
  );
}
