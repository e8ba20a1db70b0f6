import { ElevationStrip } from '@/components/drawing/ElevationStrip';
import type { DrawingFormat } from '@/components/drawing/format';
import type { SheetBlock } from '@/engine/sheet';
import { drawnName } from '@/features/template/names';

interface SheetDrawingProps {
  readonly block: Extract<SheetBlock, { kind: 'drawing' }>;
  readonly format: DrawingFormat;
  readonly width: number;
}

const DRAWN = ['shear', 'moment', 'deflection'] as const;

/** The member to scale with its diagrams, across the whole frame. */
export function SheetDrawing({ block, format, width }: SheetDrawingProps) {
  const { beam, solution, lengths, loads, depth } = block;
  return (
    <ElevationStrip
      beam={beam}
      solution={solution}
      format={format}
      quantities={DRAWN}
      depth={depth}
      mode="print"
      width={width}
      symbols={{
        lengths: lengths.map(({ from, to, tex }) => ({ from, to, symbol: drawnName(tex) })),
        loads: loads.map(({ tex }) => (tex === '' ? undefined : { symbol: drawnName(tex) })),
      }}
    />
  );
}
