import type { UnitSystemName } from '@/engine/quantity';
import type { Changes } from './figures';
import { figureText, ratioText, shareText, turnText } from './words';

interface ChangeTableProps {
  readonly changes: Changes;
  readonly system: UnitSystemName;
  /** "revision 3", "edition 2". */
  readonly to: string;
}

interface Row {
  readonly name: string;
  /** What turns, where it does. */
  readonly turn: string | null;
  readonly now: string;
  readonly after: string;
  readonly change: string;
}

/** Checks first, those that flip before the others; then what supports are lifted, then the figures. */
function rowsOf({ checks, figures, findings }: Changes, system: UnitSystemName): Row[] {
  const worst = [...checks].sort((a, b) => Number(b.flips) - Number(a.flips) || (b.to ?? 0) - (a.to ?? 0));
  const finding = (name: string, now: string, after: string): Row => ({
    name,
    turn: after === 'yes' ? 'comes' : 'goes',
    now,
    after,
    change: '–',
  });
  return [
    ...worst.map(({ title, place, from, to, share, flips }) => ({
      name: `${title}, ${place}`,
      turn: flips ? turnText(from, to) : null,
      now: ratioText(from),
      after: ratioText(to),
      change: shareText(share),
    })),
    ...findings.come.map((title) => finding(title, 'no', 'yes')),
    ...findings.go.map((title) => finding(title, 'yes', 'no')),
    ...figures.map(({ name, purpose, from, to, share }) => ({
      name: `${name}, all loads unfactored`,
      turn: null,
      now: figureText(from, purpose, system),
      after: figureText(to, purpose, system),
      change: shareText(share),
    })),
  ];
}

/** Before and after of a member, result by result. */
export function ChangeTable({ changes, system, to }: ChangeTableProps) {
  return (
    <table className="schedule stacking bg-paper">
      <thead>
        <tr>
          <th scope="col">Result</th>
          <th scope="col" className="figure">
            Now
          </th>
          <th scope="col" className="figure">
            With {to}
          </th>
          <th scope="col" className="figure">
            Change
          </th>
        </tr>
      </thead>
      <tbody>
        {rowsOf(changes, system).map(({ name, turn, now, after, change }) => (
          <tr key={name} data-chosen={turn !== null || undefined}>
            <th scope="row" className="font-normal! max-md:text-left!">
              <span>
                {name}
                {turn !== null && <b className="block font-semibold text-error">{turn}</b>}
              </span>
            </th>
            <td data-label="Now" className="figure">
              {now}
            </td>
            <td data-label={`With ${to}`} className="figure">
              {after}
            </td>
            <td data-label="Change" className="figure">
              {change}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
