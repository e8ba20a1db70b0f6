import type { Finding, Mapping } from '@/features/section/import/contract';
import type { ImportView } from './imports';

/** Who answered for a finding, and why; of itself or with all of its cause. Undefined where nobody did. */
export function answerOf(acceptances: ImportView['acceptances']) {
  const byKey = new Map(acceptances.map((one) => [one.key, one]));
  return ({ key, group }: Pick<Finding, 'key' | 'group'>): string | undefined => {
    const found = byKey.get(key) ?? byKey.get(group);
    return found && `accepted by ${found.by}: ${found.reason}`;
  };
}

/** The line below the headings and the units: those above can be put right, and never left out. */
export const firstRowLine = ({ headingLine, unitLine }: Mapping): number =>
  Math.max(headingLine, unitLine ?? 0) + 1;
