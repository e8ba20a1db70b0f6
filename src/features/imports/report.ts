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

/** Lines of rows that have an error. */
export function faultyLines({ report, mapping }: ImportView): number[] {
  const errors = report?.groups.filter(({ severity }) => severity === 'error') ?? [];
  const found = errors.flatMap(({ findings }) => findings.flatMap(({ line }) => line ?? []));
  return [...new Set(found)].filter((line) => line >= firstRowLine(mapping));
}

/** Of a person's work what would be lost with the import; empty where there is none. */
export function lostWords({ fixes, acceptances }: ImportView): string {
  const parts = [
    ...(fixes.length > 0 ? [`${fixes.length} put right`] : []),
    ...(acceptances.length > 0 ? [`${acceptances.length} accepted with a reason`] : []),
  ];
  return parts.length === 0 ? '' : `This would be lost: ${parts.join(', ')}.`;
}
