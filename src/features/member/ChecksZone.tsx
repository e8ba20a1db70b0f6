import { useRef } from 'react';
import { UtilisationTick } from '@/components/ui/UtilisationTick';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { CheckRow, MemberChecks } from '@/engine/check';
import { formatFor, type UnitSystemName } from '@/engine/quantity';
import { Formula } from '@/features/template/Formula';
import { useLater, useNear } from '@/features/template/use-live';

interface ChecksZoneProps {
  readonly checks: MemberChecks | null;
  readonly system: UnitSystemName;
  /** Why nothing is judged. */
  readonly missing: string;
}

const loadKit = () => import('@/features/template/derivation-kit');

/** Every judged figure, the governing one first, what no ratio judges, and what is not judged at all. */
export function ChecksZone({ checks, system, missing }: ChecksZoneProps) {
  const host = useRef<HTMLElement>(null);
  const kit = useLater(loadKit, useNear(host));
  return (
    <section ref={host} className="zone">
      <ZoneHeading letter="B" note="governing first">
        Checks
      </ZoneHeading>
      {checks === null && <p className="text-ink-2">{missing}</p>}
      {checks && (
        <>
          <table className="schedule">
            <thead>
              <tr>
                <th scope="col">Check</th>
                <th scope="col">Value on limit</th>
                <th scope="col">Utilisation</th>
              </tr>
            </thead>
            <tbody>
              {checks.rows.map((row, index) => (
                <tr key={row.id} data-governing={index === 0 ? '' : undefined}>
                  <th scope="row">
                    {row.title}
                    <span className="block text-note font-normal text-ink-2">{row.place}</span>
                    <Working row={row} set={kit?.setTex} />
                  </th>
                  <td>{valueOnLimit(row, system)}</td>
                  <td>
                    <UtilisationTick ratio={row.ratio} width={64} />
                  </td>
                </tr>
              ))}
              {checks.findings.map((finding) => (
                <tr key={finding.id}>
                  <th scope="row">{finding.title}</th>
                  <td colSpan={2}>
                    <b className="font-semibold text-ochre-ink">Needs a fixing.</b> {finding.detail}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
          <h3 className="mt-14 font-semibold">Not checked</h3>
          <ul className="list-disc pl-18 text-schedule text-ink-2">
            {checks.notChecked.map((scope) => (
              <li key={scope}>{scope}</li>
            ))}
          </ul>
        </>
      )}
    </section>
  );
}

function Working({
  row,
  set,
}: {
  readonly row: CheckRow;
  readonly set: ((tex: string) => string) | undefined;
}) {
  return (
    <details className="font-normal">
      <summary className="link min-h-24 text-note pointer-coarse:min-h-44">Working</summary>
      <p className="text-note text-ink-2">{row.clause}</p>
      {set ? (
        // biome-ignore lint/a11y/noNoninteractiveTabindex: a long formula is scrolled by the keyboard too
        <section aria-label="Working" tabIndex={0} className="overflow-x-auto">
          <Formula html={set(row.symbols)} />
          <Formula html={set(row.numbers)} />
        </section>
      ) : (
        <p className="text-note">Setting the formula.</p>
      )}
    </details>
  );
}

function valueOnLimit({ kind, demand, capacity }: CheckRow, system: UnitSystemName): string {
  const purpose = kind === 'deflection' ? 'deflection' : 'stress';
  return `${formatFor(demand, purpose, system)} on ${formatFor(capacity, purpose, system)}`;
}
