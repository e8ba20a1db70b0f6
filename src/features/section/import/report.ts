import { type Acceptance, type FileFacts, type Finding, MOST_FINDINGS, type Report } from './contract';

export const emptyReport = (): Report => ({ groups: [], errors: 0, warnings: 0, notes: 0 });

const countOf = (report: Report, severity: Finding['severity'], by: number): Report => {
  if (severity === 'error') return { ...report, errors: report.errors + by };
  return severity === 'warning'
    ? { ...report, warnings: report.warnings + by }
    : { ...report, notes: report.notes + by };
};

/** The report with more findings. Of each group the first hundred are kept, the rest are counted. */
export function addFindings(report: Report, findings: readonly Finding[]): Report {
  if (findings.length === 0) return report;
  const groups = new Map(report.groups.map((group) => [group.group, group]));
  let counted = report;
  for (const finding of findings) {
    const { group, rule, severity, cause, column, heading } = finding;
    const before = groups.get(group) ?? {
      group,
      rule,
      severity,
      cause,
      column,
      heading,
      count: 0,
      findings: [],
    };
    const kept = before.findings.length < MOST_FINDINGS ? [...before.findings, finding] : before.findings;
    const isWorse = severity === 'error' && before.severity !== 'error';
    groups.set(group, {
      ...before,
      severity: isWorse ? severity : before.severity,
      count: before.count + 1,
      findings: kept,
    });
    counted = countOf(counted, severity, 1);
  }
  return { ...counted, groups: [...groups.values()] };
}

/** The report that the first reading leaves: its findings, and the counts of those it does not list. */
export function reportOf({ findings, counts }: FileFacts): Report {
  const report = addFindings(emptyReport(), findings);
  const missing = (group: string, count: number) => Math.max((counts[group] ?? count) - count, 0);
  return report.groups.reduce(
    (sum, { group, severity, count }) => countOf(sum, severity, missing(group, count)),
    {
      ...report,
      groups: report.groups.map((one) => ({ ...one, count: one.count + missing(one.group, one.count) })),
    },
  );
}

/** Warnings may be taken as they are, with a reason; errors never, notes need none. */
export const mayAccept = ({ severity }: Pick<Finding, 'severity'>): boolean => severity === 'warning';

/** How many findings stand in the way: errors, and warnings without a reason. Rows that are left out have none. */
export function openCount(
  report: Report,
  acceptances: readonly Acceptance[],
): { errors: number; warnings: number } {
  const accepted = new Set(acceptances.filter(({ reason }) => reason.trim() !== '').map(({ key }) => key));
  let warnings = report.warnings;
  for (const { group, severity, count, findings } of report.groups) {
    if (severity === 'note') continue;
    const own = findings.filter((finding) => mayAccept(finding));
    if (accepted.has(group) && severity === 'warning') warnings -= count;
    else warnings -= own.filter(({ key }) => accepted.has(key) || accepted.has(group)).length;
  }
  return { errors: report.errors, warnings: Math.max(warnings, 0) };
}
