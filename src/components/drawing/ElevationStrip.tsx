import { useMemo, useRef } from 'react';
import type { AskedFigure } from './asked';
import type { DrawingFormat } from './format';
import { origin } from './names';
import { type MomentSide, QUANTITIES, type Quantity } from './signs';
import { AskedFigures } from './strip/AskedFigures';
import { DiagramStrip, EmptyStrip } from './strip/DiagramStrip';
import { Elevation, type SidewaysRestraint } from './strip/Elevation';
import { type ReactionMark, reactionMarks } from './strip/elevation-layout';
import { type DrawingFault, FaultCloud } from './strip/FaultCloud';
import { EditableFigure } from './strip/FigureText';
import type { Figure } from './strip/figures';
import { type Frame, frameOf, type StripMode } from './strip/frame';
import { MechanismMark } from './strip/MechanismMark';
import { PlumbLine } from './strip/PlumbLine';
import { reactionPlaces } from './strip/Reactions';
import { spokenReadings } from './strip/readings';
import { StationAxis, stationLines } from './strip/StationAxis';
import { layStrip, type StripInput, type StripLayout } from './strip/strip-layout';
import { summaryOf } from './strip/summary';
import { type PlumbControl, usePlumb, useRested } from './strip/use-plumb';
import { useWidth } from './use-width';

export type ElevationStripProps = Omit<StripInput, 'quantities' | 'momentSide'> &
  PlumbControl & {
    format: DrawingFormat;
    quantities?: readonly Quantity[] | undefined;
    momentSide?: MomentSide | undefined;
    restraints?: readonly SidewaysRestraint[] | undefined;
    /** Called with the symbol of a figure that is clicked; without it no figure is editable. */
    onEditFigure?: ((symbol: string) => void) | undefined;
    /** Called with a reaction or a peak that is asked about, and what was pressed. */
    onAsk?: ((figure: AskedFigure, pressed: Element) => void) | undefined;
    /** The last good drawing, of inputs that no longer hold: dashed, and without readings. */
    dashed?: boolean | undefined;
    /** Why strips are empty: "Not drawn: the span is 0." */
    notDrawn?: string | undefined;
    /** A cloud on the drawing over what stops it. */
    fault?: DrawingFault | undefined;
    /** Left out: by the width of the place, screen or phone. */
    mode?: StripMode | undefined;
    /** Width in px before the page lives, and always in print. */
    width?: number | undefined;
  };

const NARROW = 640;
const WIDTHS = { screen: 1384, phone: 366, print: 718 };
const NONE: readonly never[] = [];

const isEditable = (figure: Figure): figure is Figure & { edits: string } => figure.edits !== undefined;

function useFrame(props: ElevationStripProps, measured: number): Frame {
  const mode = props.mode ?? (measured < NARROW ? 'phone' : 'screen');
  const { length } = props.beam;
  return useMemo(() => frameOf(mode, Math.round(measured), length), [mode, measured, length]);
}

type DrawnProps = ElevationStripProps & {
  input: StripInput;
  frame: Frame;
  layout: StripLayout;
  marks: readonly ReactionMark[];
  height: number;
};

/** The picture itself: everything but what can be taken hold of. */
function Drawn({ input, frame, layout, height, marks, ...props }: DrawnProps) {
  const { beam, format, notDrawn, quantities = QUANTITIES } = props;
  const messageAt = quantities.includes('moment') ? 'moment' : quantities[0];
  const summary = useMemo(() => summaryOf(input, format), [input, format]);
  return (
    <svg className="drawing" viewBox={`0 0 ${frame.width} ${height}`} role="img" aria-label={summary}>
      <path className="station-line" d={stationLines(frame, format, layout.from, layout.to)} />
      <Elevation
        beam={beam}
        frame={frame}
        layout={layout.elevation}
        marks={marks}
        format={format}
        restraints={props.restraints ?? NONE}
        figuresOpen={props.onEditFigure !== undefined && !props.dashed}
      />
      {input.motion !== undefined && (
        <MechanismMark beam={beam} frame={frame} layout={layout.elevation} motion={input.motion} />
      )}
      {props.dashed && (
        <text
          x={frame.width - 14}
          y={frame.mode === 'phone' ? layout.to + 38 : 18}
          textAnchor="end"
          className="note"
        >
          last good drawing
        </text>
      )}
      {props.fault && <FaultCloud fault={props.fault} frame={frame} layout={layout.elevation} />}
      <path className="strip-rule" d={`M0 ${layout.from}H${frame.width}`} />
      {layout.diagrams.map((diagram) => (
        <DiagramStrip key={diagram.quantity} beam={beam} frame={frame} format={format} layout={diagram} />
      ))}
      {layout.empty.map(({ quantity, top, bottom }) => (
        <EmptyStrip
          key={quantity}
          quantity={quantity}
          frame={frame}
          top={top}
          bottom={bottom}
          message={quantity === messageAt ? notDrawn : undefined}
        />
      ))}
      <StationAxis frame={frame} format={format} y={layout.to} from={origin(beam)} />
    </svg>
  );
}

/** What can be taken hold of: the plumb line and the editable figures, over the picture. */
function Handles({ frame, layout, height, marks, ...props }: DrawnProps) {
  const { beam, format, onEditFigure, onAsk } = props;
  const values = useMemo(
    () =>
      reactionPlaces({ beam, frame, layout: layout.elevation, marks }).map(({ mark, ...place }) => ({
        ...place,
        text: mark.text,
      })),
    [beam, frame, layout, marks],
  );
  const [x, move] = usePlumb(beam.length, format.station, props);
  const spoken = useRested(spokenReadings(layout.diagrams, x, format));
  return (
    <>
      <svg className="drawing drawing-handles" viewBox={`0 0 ${frame.width} ${height}`}>
        <title>Plumb line and figures to change</title>
        {layout.diagrams.length > 0 && (
          <PlumbLine
            frame={frame}
            format={format}
            layout={layout}
            height={height}
            x={x}
            from={origin(beam)}
            values={values}
            onMove={move}
          />
        )}
        {onAsk && <AskedFigures beam={beam} frame={frame} layout={layout} marks={marks} onAsk={onAsk} />}
        {onEditFigure &&
          layout.elevation.figures
            .filter(isEditable)
            .map((figure) => (
              <EditableFigure key={`${figure.x} ${figure.y}`} figure={figure} onEdit={onEditFigure} />
            ))}
      </svg>
      <p className="drawing-spoken" aria-live="polite">
        {spoken}
      </p>
    </>
  );
}

/** The member to scale across the full width; shear, moment, slope and deflection below it on the same axis, and one plumb line. */
export function ElevationStrip(props: ElevationStripProps) {
  const host = useRef<HTMLElement>(null);
  const { beam, solution, envelopes, reactions, symbols, deflectionLimit, depth, motion } = props;
  const { format, mode, dashed } = props;
  const measured = useWidth(host, props.width ?? WIDTHS[mode ?? 'screen']);
  const frame = useFrame(props, mode === 'print' ? (props.width ?? WIDTHS.print) : measured);
  const quantities = props.quantities ?? QUANTITIES;
  const momentSide = props.momentSide ?? 'tension';
  const clouded = props.fault !== undefined;
  const input = useMemo(
    (): StripInput => ({
      beam,
      solution,
      envelopes,
      reactions,
      quantities,
      symbols,
      deflectionLimit,
      depth,
      momentSide,
      clouded,
      motion,
    }),
    [
      beam,
      solution,
      envelopes,
      reactions,
      quantities,
      symbols,
      deflectionLimit,
      depth,
      momentSide,
      clouded,
      motion,
    ],
  );
  const layout = useMemo(() => layStrip(input, frame, format), [input, frame, format]);
  const height = layout.to + frame.axis;
  const marks = useMemo(
    () => reactionMarks(beam, reactions ?? solution?.reactions ?? NONE, format),
    [beam, reactions, solution, format],
  );
  const drawn = { ...props, input, frame, layout, marks, height };
  return (
    <figure ref={host} className={`elevation-strip${dashed ? ' last-good' : ''}`} data-mode={frame.mode}>
      <Drawn {...drawn} />
      {frame.mode !== 'print' && !dashed && <Handles {...drawn} />}
    </figure>
  );
}
