import { useDeferredValue, useMemo } from 'react';
import { useSnapshot } from '@/features/author/use-editor';
import { limitLines, referredTo, strengthNames } from './criteria';
import type { ZoneProps } from './page';

/** What members are held to by the draft: each limit with its combination in numbers, and the combinations of strength. */
export function LimitPreview({ data: { sets, system } }: ZoneProps) {
  const document = useDeferredValue(useSnapshot(({ history }) => history.document));
  const set = referredTo(document, sets)?.document;
  const lines = useMemo(() => limitLines(document, set, system), [document, set, system]);
  if (!set)
    return <p className="text-ink-2">Choose an issued combination set: its combinations stand here then.</p>;
  return (
    <>
      <section aria-label="Limits of deflection as used" className="mb-12">
        <h3 className="caps mb-4">Deflection</h3>
        <ol>
          {lines.map(({ at, name, combination, limits, source }) => (
            <li key={at} className="border-b border-rule py-4">
              <b className="block font-semibold">
                {combination ?? (
                  <span className="font-normal text-ochre-ink">The set has no such combination.</span>
                )}
              </b>
              <span className="block">{limits}</span>
              <span className="block text-note text-ink-2">
                {[name, source].filter((part) => part !== '').join(' · ')}
              </span>
            </li>
          ))}
        </ol>
      </section>
      <section aria-label="Combinations as used">
        <h3 className="caps mb-4">Strength</h3>
        <ol>
          {strengthNames(document, set).map((name) => (
            <li key={name} className="border-b border-rule py-4 font-semibold">
              {name}
            </li>
          ))}
        </ol>
      </section>
    </>
  );
}
