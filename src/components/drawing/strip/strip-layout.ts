import type { Solution } from '@/engine/beam/index';
import type { Beam, DisplacedShape } from '@/engine/model/index';
import type { Piecewise } from '@/engine/polynomial/index';
import type { DrawingFormat } from '../format';
import { type Peak, peaksOf } from '../geometry/peaks';
import type { MomentSide, Quantity } from '../signs';
import { type Diagram, type DiagramLayout, layDiagram } from './diagram-layout';
import { type DrawnReaction, type ElevationLayout, layElevation, type Symbols } from './elevation-layout';
import type { Frame } from './frame';

/** The most and the least over all combinations, engine signs, with the combination that each named peak comes from. */
type EnvelopeDiagram = {
  upper: Piecewise;
  lower: Piecewise;
  peaks: readonly { x: number; value: number; of: string }[];
  note?: string | undefined;
};

type DeflectionLimit = { value: number; rule: string };

export type StripInput = {
  beam: Beam;
  /** Null where there is no result; the strips then keep their baselines. */
  solution: Pick<Solution, 'diagrams' | 'extremes' | 'contraflexure' | 'reactions'> | null;
  envelopes?: Partial<Record<Quantity, EnvelopeDiagram>> | undefined;
  reactions?: readonly DrawnReaction[] | undefined;
  quantities: readonly Quantity[];
  symbols?: Symbols | undefined;
  deflectionLimit?: DeflectionLimit | undefined;
  depth?: number | undefined;
  momentSide: MomentSide;
  /** Whether a cloud stands over a dimension. */
  clouded?: boolean | undefined;
  /** How an unstable beam moves; null for one that slides sideways. */
  motion?: DisplacedShape | null | undefined;
};

function envelopePeaks({ peaks }: EnvelopeDiagram): Peak[] {
  const bySize = [...peaks].sort((a, b) => Math.abs(b.value) - Math.abs(a.value));
  return bySize.map((peak, rank) => ({ kind: 'extreme', ...peak, rank }));
}

function diagramOf(input: StripInput, quantity: Quantity, format: DrawingFormat): Diagram | null {
  const { deflectionLimit: limit, solution } = input;
  const notes =
    quantity === 'deflection' && limit
      ? [`limit ${format.value('deflection', limit.value)}, ${limit.rule}`]
      : [];
  const envelope = input.envelopes?.[quantity];
  if (envelope) {
    const head = envelope.note ? [envelope.note] : [];
    return {
      quantity,
      curves: [envelope.upper, envelope.lower],
      peaks: envelopePeaks(envelope),
      notes: [...head, ...notes],
    };
  }
  if (!solution) return null;
  const curve = solution.diagrams[quantity];
  const zeros = quantity === 'moment' ? solution.contraflexure : [];
  return { quantity, curves: [curve], peaks: peaksOf(curve, solution.extremes[quantity], zeros), notes };
}

export type StripLayout = {
  elevation: ElevationLayout;
  diagrams: DiagramLayout[];
  /** Strips that stay empty. */
  empty: { quantity: Quantity; top: number; bottom: number }[];
  /** Where the first strip begins and the last one ends. */
  from: number;
  to: number;
};

/** Everything the strip draws, as numbers; pure, so it can be tested and run on the server. */
export function layStrip(input: StripInput, frame: Frame, format: DrawingFormat): StripLayout {
  const { beam, symbols, momentSide: side } = input;
  const drawn = input.quantities.map((quantity) => ({
    quantity,
    diagram: diagramOf(input, quantity, format),
  }));
  // Where nothing is drawn the strips close up and the member has their room: the sheet keeps its height.
  const spare = drawn.reduce(
    (sum, { quantity, diagram }) => sum + (diagram ? 0 : frame.heights[quantity] - frame.empty),
    0,
  );
  const elevation = layElevation(beam, frame, format, {
    depth: input.depth ?? beam.length / 22,
    symbols,
    reactions: {
      shown: Boolean(input.reactions ?? input.solution),
      ranged: input.reactions?.some(({ least }) => least !== undefined) ?? false,
    },
    moves: input.motion !== undefined,
    clouded: input.clouded ?? false,
    spare: frame.mode === 'screen' ? spare : 0,
  });
  const from = elevation.height + elevation.reactionHeight;
  const diagrams: DiagramLayout[] = [];
  const empty: StripLayout['empty'] = [];
  let y = from;
  for (const { quantity, diagram } of drawn) {
    if (diagram) {
      const laid = layDiagram({ beam, frame, format, side }, diagram, y);
      diagrams.push(laid);
      y = laid.bottom;
    } else {
      const bottom = y + frame.head + frame.empty;
      empty.push({ quantity, top: y, bottom });
      y = bottom;
    }
  }
  return { elevation, diagrams, empty, from, to: y };
}
