import type { Finding } from './contract';
import { dropRow, findingOf } from './finding';
import { withUnit } from './judge';
import { columnOf, type Plan } from './plan';
import type { RowStore } from './row-store';

const LEAST = 6; // sections of a series, below which its scatter cannot be told
const SIGMAS = 4;
const LEAST_SIGMA = 0.02; // of I: tables round, and rolls are no formula
const SAME_WIDTH = 0.035; // sections of one series are rolled by the same rolls

type Member = { at: number; mass: number; i: number; width: number };

/** Rows by serial size; a family of single sizes, such as IPE, is one series whatever its widths. */
function seriesOf(store: RowStore, held: ReadonlySet<number>): Map<string, Member[]> {
  const series = new Map<string, Member[]>();
  for (let at = 0; at < store.count; at++) {
    const serial = store.serials[at];
    const mass = store.value('mass', at);
    const i = store.value('iMajor', at);
    if (!serial || !(mass > 0 && i > 0) || held.has(store.lines[at] ?? 0)) continue;
    const width = serial.includes(' ') ? store.value('b', at) : 0;
    const member = { at, mass: Math.log(mass), i: Math.log(i), width };
    const members = series.get(serial);
    if (members) members.push(member);
    else series.set(serial, [member]);
  }
  return series;
}

/** Parts of a series that were rolled to one width; a series of sizes is one. */
function byWidth(members: readonly Member[]): Member[][] {
  const sorted = [...members].sort((a, b) => a.width - b.width);
  const groups: Member[][] = [];
  for (const member of sorted) {
    const group = groups.at(-1);
    const last = group?.at(-1);
    const isSame =
      last !== undefined && (member.width === last.width || member.width <= last.width * (1 + SAME_WIDTH));
    if (group && isSame) group.push(member);
    else groups.push([member]);
  }
  return groups;
}

type Fit = { residual: number; sigma: number };

/** Distance of each inner member from the line through its two neighbours in log I over log m; 0 at the ends. */
function residualsOf(members: readonly Member[]): number[] {
  return members.map((member, k) => {
    const [before, after] = [members[k - 1], members[k + 1]];
    if (!before || !after) return 0;
    const run = after.mass - before.mass;
    const share = run === 0 ? 0.5 : (member.mass - before.mass) / run;
    return member.i - (before.i + share * (after.i - before.i));
  });
}

/** The scatter of the others: those beside the member lean on it and are left out. */
function scatterWithout(residuals: readonly number[], out: number): number {
  const others = residuals.filter((_, k) => k > 0 && k < residuals.length - 1 && Math.abs(k - out) > 1);
  const squares = others.reduce((sum, one) => sum + one ** 2, 0);
  return Math.max(Math.sqrt(squares / Math.max(others.length, 1)), LEAST_SIGMA);
}

const DROP = 0.005; // of I, by which a heavier section may have less for rounding

/** Members that leave the curve of their series, or have less I than a lighter one. One at a time, the worst first. */
function outliers(
  members: readonly Member[],
): { member: Member; cause: 'series' | 'not_rising'; fit: Fit }[] {
  const found: { member: Member; cause: 'series' | 'not_rising'; fit: Fit }[] = [];
  let rest = [...members].sort((a, b) => a.mass - b.mass);
  while (rest.length >= LEAST) {
    const residuals = residualsOf(rest);
    const fits = residuals.map((residual, k): Fit => ({ residual, sigma: scatterWithout(residuals, k) }));
    const strength = ({ residual, sigma }: Fit) => Math.abs(residual) / sigma;
    const worst = fits.reduce((best, fit, k) => (strength(fit) > strength(fits[best] ?? fit) ? k : best), 0);
    const fit = fits[worst];
    const member = rest[worst];
    if (!fit || !member || strength(fit) <= SIGMAS) break;
    const isLower = rest.some((other) => other.mass < member.mass && other.i > member.i + DROP);
    found.push({ member, cause: isLower ? 'not_rising' : 'series', fit });
    rest = rest.filter((one) => one !== member);
  }
  return found;
}

/** Sections that stand out of their series; warnings, since a maker may have reasons. */
export function findSeries(store: RowStore, plan: Plan, held: ReadonlySet<number>): Finding[] {
  const column = columnOf(plan, 'iMajor');
  if (!column || !columnOf(plan, 'mass')) return [];
  const findings: Finding[] = [];
  for (const [serial, members] of seriesOf(store, held)) {
    for (const group of byWidth(members)) {
      for (const { member, cause, fit } of outliers(group)) {
        const line = store.lines[member.at] ?? 0;
        const value = store.value('iMajor', member.at);
        const expected = withUnit(value / Math.exp(fit.residual), column);
        const percent = (100 * (Math.exp(fit.residual) - 1)).toFixed(1).replace('-', '−');
        const formula = `log I over log m between its neighbours, ${group.length} sections of ${serial}: off by ${percent} %, ${(Math.abs(fit.residual) / fit.sigma).toFixed(1)} σ`;
        const message =
          cause === 'not_rising'
            ? 'A lighter section of the series has more I. Mass or I belongs to another row.'
            : 'The section stands out of its series: mass or I belongs to another row.';
        findings.push(
          findingOf({
            rule: 22,
            severity: 'warning',
            cause,
            line,
            designation: store.printed[member.at] ?? '',
            column: column.index,
            heading: column.heading,
            read: withUnit(value, column),
            expected,
            formula,
            message,
            fixes: [dropRow(line)],
          }),
        );
      }
    }
  }
  return findings;
}
