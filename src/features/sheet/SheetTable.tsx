import { UtilisationTick } from '@/components/ui/UtilisationTick';
import type { Cell, JudgedRow, SheetBlock } from '@/engine/sheet';
import { Tex } from './Tex';

const CellText = ({ cell }: { cell: Cell }) => (typeof cell === 'string' ? cell : <Tex tex={cell.tex} />);

/** A table of the working: its head is repeated on every page that it goes on to. */
export function SheetTable({ block }: { block: Extract<SheetBlock, { kind: 'table' }> }) {
  const { name, columns, rows } = block;
  const look = (index: number) => (columns[index]?.figures ? 'figure' : undefined);
  return (
    <table className="schedule" aria-label={name}>
      <thead>
        <tr>
          {columns.map(({ title, unit }, k) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: columns have no identity but their place
            <th key={k} scope="col" className={look(k)}>
              <CellText cell={title} />
              {unit !== undefined && unit !== '' && <small>{unit}</small>}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map(({ cells, strong }, k) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: rows of a printed table have no identity but their place
          <tr key={k} data-strong={strong || undefined}>
            {cells.map((cell, c) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: as above
              <td key={c} className={look(c)}>
                <CellText cell={cell} />
              </td>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** The checks with their utilisations, governing first. */
export function CheckTable({ rows }: { rows: readonly JudgedRow[] }) {
  return (
    <table className="schedule" aria-label="Checks, governing first">
      <thead>
        <tr>
          <th scope="col">Check, governing first</th>
          <th scope="col">Value on limit</th>
          <th scope="col">Utilisation</th>
          <th scope="col">State</th>
        </tr>
      </thead>
      <tbody>
        {rows.map(({ title, place, clause, demand, capacity, ratio }, index) => (
          <tr key={`${title} ${place}`} data-strong={index === 0 || undefined}>
            <td>
              {title}
              <span className="cs-place">{place}</span>
              <span className="cs-place">{clause}</span>
            </td>
            <td className="whitespace-nowrap">
              {demand} on {capacity}
            </td>
            <td>
              <UtilisationTick ratio={ratio} width={64} />
            </td>
            <td>{ratio <= 1 ? 'passes' : 'fails'}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
