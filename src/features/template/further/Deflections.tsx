import { memo, useMemo } from 'react';
import type { Solution } from '@/engine/beam';
import type { Beam } from '@/engine/model';
import type { UnitSystemName } from '@/engine/quantity';
import { datumLines, shearText, signChangeTexts, type TipTable, tipTables } from './deflection-lines';
import { Part } from './Part';

interface DeflectionsProps {
  readonly beam: Beam;
  readonly solution: Solution;
  readonly system: UnitSystemName;
}

/** The deflection from each datum, what the tips are made of, and where the shear and the moment are zero. */
export const Deflections = memo(function Deflections({ beam, solution, system }: DeflectionsProps) {
  const data = useMemo(() => datumLines(beam, solution, system), [beam, solution, system]);
  const tips = useMemo(() => tipTables(beam, solution, system), [beam, solution, system]);
  const changes = useMemo(() => signChangeTexts(beam, solution, system), [beam, solution, system]);
  const shear = useMemo(() => shearText(beam, solution, system), [beam, solution, system]);
  return (
    <div className="grid gap-x-28 gap-y-20 lg:grid-cols-2">
      <Part title="Deflection by datum">
        <table className="schedule">
          <thead>
            <tr>
              <th scope="col">Measured from</th>
              <th scope="col">Most down</th>
              <th scope="col">Most up</th>
            </tr>
          </thead>
          <tbody>
            {data.map(({ datum, down, up }) => (
              <tr key={datum}>
                <th scope="row" className="font-normal">
                  {datum}
                </th>
                <td>{down ?? 'none'}</td>
                <td>{up ?? 'none'}</td>
              </tr>
            ))}
          </tbody>
        </table>
        {shear && <p className="mt-8 text-schedule">{shear}</p>}
      </Part>
      <div className="grid content-start gap-y-20">
        {tips.map((tip) => (
          <Tip key={tip.title} tip={tip} />
        ))}
        <Part title="Changes of sign">
          <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-14 gap-y-4 text-schedule">
            <dt className="text-ink-2">Shear, where the moment peaks</dt>
            <dd>{changes.shear ?? 'none'}</dd>
            <dt className="text-ink-2">Moment, contraflexure</dt>
            <dd>{changes.moment ?? 'none'}</dd>
          </dl>
        </Part>
      </div>
    </div>
  );
});

/** The movement of a free end, and what it is made of. */
function Tip({ tip: { title, lines, total } }: { readonly tip: TipTable }) {
  return (
    <Part title={title} note="down: +">
      <table className="schedule">
        <tbody>
          {lines.map(({ name, text }) => (
            <tr key={name}>
              <th scope="row" className="font-normal">
                {name}
              </th>
              <td className="figure">{text}</td>
            </tr>
          ))}
          <tr>
            <th scope="row">In all</th>
            <td className="figure font-semibold">{total}</td>
          </tr>
        </tbody>
      </table>
    </Part>
  );
}
