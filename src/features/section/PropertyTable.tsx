import { RichHtml } from '@/components/drawing/marks/RichHtml';
import type { PropertyLine } from './properties';

interface PropertyTableProps {
  readonly caption: string;
  readonly lines: readonly PropertyLine[];
}

/** Properties in both unit systems; what was computed carries its mark. */
export function PropertyTable({ caption, lines }: PropertyTableProps) {
  return (
    <table className="schedule">
      <caption>{caption}</caption>
      <thead>
        <tr>
          <th scope="col">Property</th>
          <th scope="col" className="figure" colSpan={2}>
            Metric
          </th>
          <th scope="col" className="figure" colSpan={2}>
            US
          </th>
          <th scope="col" className="max-md:hidden">
            Value
          </th>
        </tr>
      </thead>
      <tbody>
        {lines.map((line) => (
          <tr key={line.symbol}>
            <th scope="row" className="font-normal!">
              <i className="inline-block min-w-48 font-semibold">
                <RichHtml text={line.symbol} />
              </i>
              <span className="text-ink-2 max-md:block">{line.name}</span>
            </th>
            <Value figure={line.metric} unit={line.metricUnit} />
            <Value figure={line.us} unit={line.usUnit} />
            <td className="text-note text-ink-2 max-md:hidden">{line.computed ? 'computed' : 'supplied'}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

const Value = ({ figure, unit }: { figure: string; unit: string }) => (
  <>
    <td className="figure">{figure}</td>
    <td className="border-l-0! pl-0! text-ink-2">
      <RichHtml text={unit} />
    </td>
  </>
);
