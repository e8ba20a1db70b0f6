import type { Finding } from './contract';
import { dropRow, findingOf } from './finding';
import { withUnit } from './judge';
import { columnOf, type NumberColumn, type Plan } from './plan';
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

/** log I on the line through two members, at a mass. */
function onLine(one: Member, other: Member, mass: number): number {
  const run = other.mass - one.mass;
  return one.i + (run === 0 ? 0.5 : (mass - one.mass) / run) * (other.i - one.i);
}

/** Distance of each inner member from the line through its two neighbours in log I over log m; 0 at the ends. */
const residualsOf = (members: readonly Member[]): number[] =>
  members.map((member, k) => {
    const [before, after] = [members[k - 1], members[k + 1]];
    return before && after ? member.i - onLine(before, after, member.mass) : 0;
  });

/** The scatter of the others: those beside the member lean on it and are left out. */
function scatterWithout(residuals: readonly number[], out: number): number {
  const others = residuals.filter((_, k) => k > 0 && k < residuals.length - 1 && Math.abs(k - out) > 1);
  const squares = others.reduce((sum, one) => sum + one ** 2, 0);
  return Math.max(Math.sqrt(squares / Math.max(others.length, 1)), LEAST_SIGMA);
}

const squaresWithout = (members: readonly Member[], out: number): number =>
  residualsOf(members.filter((_, k) => k !== out)).reduce((sum, one) => sum + one ** 2, 0);

/** The member that is farthest out; null where none is. One beside it leans on it: the one that spoils most counts. */
function worstOf(members: readonly Member[]): { at: number; fit: Fit } | null {
  const residuals = residualsOf(members);
  const strengths = residuals.map((residual, k) => Math.abs(residual) / scatterWithout(residuals, k));
  const farthest = strengths.reduce((best, one, k) => (one > (strengths[best] ?? 0) ? k : best), 0);
  if ((strengths[farthest] ?? 0) <= SIGMAS) return null;
  const suspects = [farthest, farthest - 1, farthest + 1].filter((k) => members[k] !== undefined);
  const squares = suspects.map((k) => squaresWithout(members, k));
  const at = suspects[squares.indexOf(Math.min(...squares))] ?? farthest;
  const sigma = scatterWithout(residuals, farthest);
  const [one, other] = at === 0 ? [1, 2] : at === members.length - 1 ? [at - 2, at - 1] : [at - 1, at + 1];
  const [member, before, after] = [members[at], members[one], members[other]];
  if (!member || !before || !after) return null;
  return { at, fit: { residual: member.i - onLine(before, after, member.mass), sigma } };
}

const DROP = 0.005; // of I, by which a heavier section may have less for rounding

type Outlier = { member: Member; cause: 'series' | 'not_rising'; fit: Fit };

/** Members that leave the curve of their series, or have less I than a lighter one. One at a time, the worst first. */
function outliers(members: readonly Member[]): Outlier[] {
  const found: Outlier[] = [];
  let rest = [...members].sort((a, b) => a.mass - b.mass);
  while (rest.length >= LEAST) {
    const worst = worstOf(rest);
    const member = worst ? rest[worst.at] : undefined;
    if (!worst || !member) break;
    const isLower = rest.some((other) => other.mass < member.mass && other.i > member.i + DROP);
    found.push({ member, cause: isLower ? 'not_rising' : 'series', fit: worst.fit });
    rest = rest.filter((one) => one !== member);
  }
  return found;
}

function seriesFinding(
  store: RowStore,
  column: NumberColumn,
  serial: string,
  of: number,
  { member, cause, fit }: Outlier,
): Finding {
  const line = store.lines[member.at] ?? 0;
  const value = store.value('iMajor', member.at);
  const percent = (100 * (Math.exp(fit.residual) - 1)).toFixed(1).replace('-', '−');
  const sigmas = (Math.abs(fit.residual) / fit.sigma).toFixed(1);
  const message =
    cause === 'not_rising'
      ? 'A lighter section of the series has more I. Mass or I belongs to another row.'
      : 'The section stands out of its series: mass or I belongs to another row.';
  return findingOf({
    rule: 22,
    severity: 'warning',
    cause,
    line,
    designation: store.printed[member.at] ?? '',
    column: column.index,
    heading: column.heading,
    read: withUnit(value, column),
    expected: withUnit(value / Math.exp(fit.residual), column),
    formula: `log I over log m between its neighbours, ${of} sections of ${serial}: off by ${percent} %, ${sigmas} σ`,
    message,
    fixes: [dropRow(line)],
  });
}

/** Sections that stand out of their series; warnings, since a maker may have reasons. */
export function findSeries(store: RowStore, plan: Plan, held: ReadonlySet<number>): Finding[] {
  const column = columnOf(plan, 'iMajor');
  if (!column || !columnOf(plan, 'mass')) return [];
  return [...seriesOf(store, held)].flatMap(([serial, members]) =>
    byWidth(members).flatMap((group) =>
      outliers(group).map((outlier) => seriesFinding(store, column, serial, group.length, outlier)),
    ),
  );
}
