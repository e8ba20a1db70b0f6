import { type ReactNode, useMemo } from 'react';
import type { AskedStation } from './asked';
import type { DrawingFormat } from './format';
import { letterAt, namedSupports, origin } from './names';
import { QUANTITIES, type Quantity } from './signs';
import { PURPOSE, SYMBOL, TITLE } from './strip/diagram-layout';
import { type StationColumn, stationRows } from './strip/stations';
import type { StripInput } from './strip/strip-layout';

type Props = Pick<StripInput, 'beam' | 'solution' | 'envelopes'> & {
  format: DrawingFormat;
  quantities?: readonly Quantity[] | undefined;
  onToggle?: ((isOpen: boolean) => void) | undefined;
  /** What stands in a cell instead of its figure alone. */
  cell?: ((at: AskedStation, figure: string) => ReactNode) | undefined;
};

function columnsOf({ solution, envelopes, quantities = QUANTITIES }: Props): StationColumn[] {
  return quantities.flatMap((quantity): StationColumn[] => {
    const envelope = envelopes?.[quantity];
    if (envelope) {
      const both = [
        { quantity, words: 'most', curve: envelope.upper, bound: 'upper' as const },
        { quantity, words: 'least', curve: envelope.lower, bound: 'lower' as const },
      ];
      // The screen turns slope and deflection over, so the lower curve is the one that is most there.
      return quantity === 'slope' || quantity === 'deflection'
        ? [
            { quantity, words: 'most', curve: envelope.lower, bound: 'lower' },
            { quantity, words: 'least', curve: envelope.upper, bound: 'upper' },
          ]
        : both;
    }
    return solution ? [{ quantity, words: '', curve: solution.diagrams[quantity], bound: null }] : [];
  });
}

function extremesOf({ solution, envelopes, quantities = QUANTITIES }: Props): number[] {
  return quantities.flatMap((quantity) => {
    const peaks = envelopes?.[quantity]?.peaks.map(({ x }) => x) ?? [];
    const extremes = solution?.extremes[quantity];
    return [...peaks, ...(extremes ? [...extremes.max.at, ...extremes.min.at] : [])];
  });
}

/** The diagrams as a table of stations and values, opened by "Show as table". */
export function StationTable(props: Props) {
  const { beam, format } = props;
  const { columns, rows } = useMemo(() => {
    const columns = columnsOf(props);
    return { columns, rows: stationRows(props.beam, columns, extremesOf(props), props.format) };
  }, [props]);
  if (columns.length === 0) return null;
  const names = namedSupports(beam);
  return (
    <details className="station-table" onToggle={({ currentTarget }) => props.onToggle?.(currentTarget.open)}>
      <summary className="link">Show as table</summary>
      <table className="schedule">
        <caption>{`Stations are from ${origin(beam)}. Where a value jumps, left and right of the station are given.`}</caption>
        <thead>
          <tr>
            <th scope="col">
              Station
              <small>{format.unit('length') || format.station.unit}</small>
            </th>
            {columns.map(({ quantity, words }) => (
              <th key={quantity + words} scope="col" className="figure">
                {`${TITLE[quantity]} ${SYMBOL[quantity]}${words ? `, ${words}` : ''}`}
                <small>{format.unit(PURPOSE[quantity])}</small>
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map(({ x, side, values }) => {
            const letter = letterAt(names, x, beam.length);
            const place = [format.value('length', x), letter, side].filter(Boolean).join(', ');
            return (
              <tr key={place}>
                <th scope="row">{place}</th>
                {columns.map(({ quantity, words, bound }, i) => (
                  <td key={quantity + words} className="figure">
                    {props.cell?.({ quantity, x, side: side ?? 'left', bound }, values[i] ?? '') ?? values[i]}
                  </td>
                ))}
              </tr>
            );
          })}
        </tbody>
      </table>
    </details>
  );
}
