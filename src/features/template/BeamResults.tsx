import { type ComponentProps, memo, useContext, useMemo, useState } from 'react';
import type { AskedStation } from '@/components/drawing/asked';
import { ElevationStrip, type ElevationStripProps } from '@/components/drawing/ElevationStrip';
import { DRAWING_FORMATS } from '@/components/drawing/quantity-format';
import { StationTable } from '@/components/drawing/StationTable';
import type { Solution } from '@/engine/beam';
import type { Beam } from '@/engine/model';
import type { UnitSystemName } from '@/engine/quantity';
import type { Instance } from '@/engine/template';
import { figureKey, type Loading, stationKey, UNFACTORED } from '@/features/why/keys';
import { Why } from '@/features/why/Why';
import { WhyGrid } from '@/features/why/WhyGrid';
import { WhyContext } from '@/features/why/why-context';
import { drawnName } from './names';
import { useRestedValue } from './use-live';

type Named = Pick<Instance, 'dimensions' | 'loadNames'>;

interface BeamResultsProps
  extends Pick<
    ElevationStripProps,
    'depth' | 'envelopes' | 'fault' | 'quantities' | 'reactions' | 'deflectionLimit' | 'width'
  > {
  readonly beam: Beam;
  readonly instance: Named;
  /** Null where inputs fail: then `beam` is the last good one, drawn dashed and without results. */
  readonly solution: Pick<Solution, 'diagrams' | 'extremes' | 'contraflexure' | 'reactions'> | null;
  readonly system: UnitSystemName;
  /** Why nothing is drawn: "Not drawn: the span is 0." */
  readonly notDrawn?: string | undefined;
  /** Called with a parameter's symbol when its figure on the drawing is pressed. */
  readonly onEdit?: ((symbol: string) => void) | undefined;
  /** Which loads act, for whoever asks where a number comes from. */
  readonly loading?: Loading | undefined;
}

/** The member with its diagrams, named in the template's letters, and the same as a table. */
export function BeamResults({
  beam,
  instance,
  solution,
  system,
  notDrawn,
  onEdit,
  loading = UNFACTORED,
  ...more
}: BeamResultsProps) {
  const ask = useContext(WhyContext);
  const format = DRAWING_FORMATS[system];
  const symbols = useMemo(() => symbolsOf(instance), [instance]);
  const edit = onEdit && ((drawn: string) => onEdit(symbolOf(instance, drawn)));
  return (
    <>
      <ElevationStrip
        {...more}
        beam={beam}
        solution={solution}
        symbols={symbols}
        format={format}
        onEditFigure={solution ? edit : undefined}
        onAsk={
          ask && solution
            ? (figure, pressed) => ask(() => figureKey(figure, solution, loading), pressed)
            : undefined
        }
        dashed={solution === null}
        notDrawn={notDrawn}
      />
      {solution && (
        <div className="px-(--pad) pb-10">
          <RestedTable
            beam={beam}
            solution={solution}
            envelopes={more.envelopes}
            format={format}
            loading={loading}
          />
        </div>
      )}
    </>
  );
}

const Table = memo(StationTable);

/** Nobody reads a table that is folded away, or while a value is dragged: the frame is the drawing's. */
function RestedTable({ beam, solution, envelopes, format, loading }: RestedTableProps) {
  const [isOpen, setOpen] = useState(false);
  const stated = useMemo(() => {
    const cell = (at: AskedStation, figure: string) => (
      <Why question={() => stationKey(at, solution, loading)}>{figure}</Why>
    );
    return { beam, solution, envelopes, format, cell };
  }, [beam, solution, envelopes, format, loading]);
  return (
    <WhyGrid>
      <Table {...useRestedValue(stated, isOpen ? undefined : null)} onToggle={setOpen} />
    </WhyGrid>
  );
}

interface RestedTableProps
  extends Pick<ComponentProps<typeof StationTable>, 'beam' | 'envelopes' | 'format'> {
  readonly solution: NonNullable<BeamResultsProps['solution']>;
  readonly loading: Loading;
}

const symbolsOf = ({ dimensions, loadNames }: Named) => ({
  lengths: dimensions.map(({ from, to, tex }) => ({ from, to, symbol: drawnName(tex), editable: true })),
  loads: loadNames.map(({ tex, symbol }) =>
    tex === '' ? undefined : { symbol: drawnName(tex), ...(symbol !== '' && { edits: symbol }) },
  ),
});

/** A length's figure gives the letter that is drawn; a load's gives its symbol. */
const symbolOf = ({ dimensions }: Named, drawn: string): string =>
  dimensions.find(({ tex }) => drawnName(tex) === drawn)?.symbol ?? drawn;
