import { RichHtml } from '@/components/drawing/marks/RichHtml';
import type { UnitSystemName } from '@/engine/quantity';
import type { PropertyLine } from './properties';

interface PropertyTableProps {
  readonly caption: string;
  readonly lines: readonly PropertyLine[];
  /** Whose units stand first. */
  readonly system: UnitSystemName;
}

const SYSTEMS = {
  metric: { title: 'Metric', of: ({ metric, metricUnit }: PropertyLine) => [metric, metricUnit] as const },
  us: { title: 'US', of: ({ us, usUnit }: PropertyLine) => [us, usUnit] as const },
} as const;

/** Properties in both unit systems; what was computed carries its mark. */
export function PropertyTable({ caption, lines, system }: PropertyTableProps) {
  const inTurn = system === 'us' ? (['us', 'metric'] as const) : (['metric', 'us'] as const);
  return (
    <table className="schedule">
      <caption>{caption}</caption>
      <thead>
        <tr>
          <th scope="col">Property</th>
          {inTurn.map((one) => (
            <th key={one} scope="col" className="figure" colSpan={2}>
              {SYSTEMS[one].title}
            </th>
          ))}
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
            {inTurn.map((one) => {
              const [figure, unit] = SYSTEMS[one].of(line);
              return <Value key={one} figure={figure} unit={unit} isComputed={line.computed} />;
            })}
            <td className="text-note text-ink-2 max-md:hidden">{line.computed ? 'computed' : 'supplied'}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** A computed figure is set in italics, so that a phone, which has no room for the word, shows it too. */
const Value = ({ figure, unit, isComputed }: { figure: string; unit: string; isComputed: boolean }) => (
  <>
    <td className={isComputed ? 'figure italic' : 'figure'}>{figure}</td>
    <td className="border-l-0! pl-0! text-ink-2">
      <RichHtml text={unit} />
    </td>
  </>
);
