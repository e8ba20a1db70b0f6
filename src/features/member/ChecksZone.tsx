import { useRef } from 'react';
import { UtilisationTick } from '@/components/ui/UtilisationTick';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { CheckRow, MemberChecks } from '@/engine/check';
import { formatFor, type UnitSystemName } from '@/engine/quantity';
import { Formula } from '@/features/template/Formula';
import { useLater, useNear } from '@/features/template/use-live';
import { Why } from '@/features/why/Why';
import { WhyGrid } from '@/features/why/WhyGrid';

interface ChecksZoneProps {
  readonly checks: MemberChecks | null;
  readonly system: UnitSystemName;
  /** Why nothing is judged. */
  readonly missing: string;
}

const loadKit = () => import('@/features/template/derivation-kit');

/** Every judged figure, the governing one first, and what no ratio judges. */
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
        <WhyGrid>
          <table className="schedule entries">
            <thead>
              <tr>
                <th scope="col">Check</th>
                <th scope="col">Value on limit</th>
                <th scope="col">Utilisation</th>
              </tr>
            </thead>
            <tbody>
              {checks.rows.map((row, index) => (
                <tr
                  key={row.id}
                  data-governing={index === 0 ? '' : undefined}
                  className="max-md:grid-cols-[minmax(0,1fr)_auto]"
                >
                  <th scope="row" className="max-md:col-span-2">
                    {row.title}
                    <Working row={row} set={kit?.setTex} />
                  </th>
                  <td className="whitespace-nowrap">
                    <ValueOnLimit row={row} system={system} />
                  </td>
                  <td>
                    <Why question={() => ({ kind: 'check', row, figure: 'ratio' })}>
                      <UtilisationTick ratio={row.ratio} width={64} />
                    </Why>
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
        </WhyGrid>
      )}
    </section>
  );
}

/** What no check of the criteria looks at: as a strip under the checks, where the sheet is wide. */
export function NotChecked({ checks }: Pick<ChecksZoneProps, 'checks'>) {
  if (checks === null) return null;
  return (
    <section className="px-(--pad) pt-10 pb-14 max-[1379px]:border-t-0! min-[1380px]:col-span-2 min-[1380px]:row-start-2">
      <h3 className="font-semibold">Not checked</h3>
      <ul className="list-disc gap-x-28 pl-18 text-schedule text-ink-2 md:columns-2">
        {checks.notChecked.map((scope) => (
          <li key={scope}>{scope}</li>
        ))}
      </ul>
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
      <summary className="min-h-24 list-none text-note text-ink-2 pointer-coarse:min-h-44 [&::-webkit-details-marker]:hidden">
        {row.place} <span className="link ml-4 whitespace-nowrap text-ink">Working</span>
      </summary>
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

function ValueOnLimit({ row, system }: Pick<ChecksZoneProps, 'system'> & { readonly row: CheckRow }) {
  const purpose = row.kind === 'deflection' ? 'deflection' : 'stress';
  const [figure] = formatFor(row.demand, purpose, system).split('\u00a0');
  return (
    <>
      <Why question={() => ({ kind: 'check', row, figure: 'demand' })}>{figure}</Why> on{' '}
      <Why question={() => ({ kind: 'check', row, figure: 'capacity' })}>
        {formatFor(row.capacity, purpose, system)}
      </Why>
    </>
  );
}
