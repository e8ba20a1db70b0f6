import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { UnitSystemName } from '@/engine/quantity';
import type { Template } from '@/engine/template';
import { toRuleLines } from '@/features/template/lines';
import type { MemberEvaluation } from './evaluate';

interface BasisZoneProps {
  readonly template: Template;
  readonly evaluation: MemberEvaluation | null;
  readonly system: UnitSystemName;
}

const STATE = { holds: 'holds', broken: 'broken', unknown: 'not known' } as const;

/** How far the template is valid here, how the numbers are proven, and what it is not for. */
export function BasisZone({ template, evaluation, system }: BasisZoneProps) {
  const rules = evaluation ? toRuleLines(template, evaluation.rules, system) : [];
  return (
    <section className="zone">
      <ZoneHeading letter="G">Validity and proof</ZoneHeading>
      <table className="schedule border-t-2 border-ink">
        <tbody>
          {rules.map(({ id, title, state, severity, message, figure }) => (
            <tr key={id}>
              <th scope="row" className="font-normal!">
                {title}
                {state !== 'holds' && (
                  <span
                    className={`block text-note ${state === 'broken' && severity !== 'note' ? 'font-semibold text-ochre-ink' : 'text-ink-2'}`}
                  >
                    {message}
                  </span>
                )}
              </th>
              <td className="whitespace-nowrap">{figure?.text ?? ''}</td>
              <td className="whitespace-nowrap">{STATE[state]}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {evaluation && (
        <p className="mt-10 text-schedule">
          Proven: {evaluation.proof.arrangements} load cases, each solved by the force method and by direct
          stiffness; the {evaluation.patterning.arrangements} arrangements of the combinations are their sums.
          Equilibrium within {small(evaluation.proof.equilibrium)}, compatibility within{' '}
          {small(evaluation.proof.compatibility)}, the two methods within {small(evaluation.proof.agreement)}{' '}
          of the largest value.
        </p>
      )}
      <h3 className="mt-14 font-semibold">Do not use for</h3>
      <ul className="list-disc pl-18 text-schedule text-ink-2">
        {template.do_not_use.map((line) => (
          <li key={line}>{line}</li>
        ))}
      </ul>
    </section>
  );
}

const small = (share: number): string => share.toExponential(0).replace('-', '\u2212');
