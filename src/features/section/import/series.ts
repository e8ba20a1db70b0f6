import { designationParts } from '@/engine/section';
import type { Finding } from './contract';
import { dropRow, findingOf } from './finding';
import { withUnit } from './judge';
import { columnOf, type Plan } from './plan';
import type { RowStore } from './row-store';

const LEAST = 6; // sections of a series, below which its scatter cannot be told
const SIGMAS = 4;
const LEAST_SIGMA = 0.012; // of I: tables round, and rolls are no formula
const SAME_WIDTH = 0.035; // sections of one series are rolled by the same rolls

type Member = { at: number; mass: number; i: number; width: number; order: number };

/** Rows by serial size: the name without its last size, which is the mass or the wall; IPE 300 by its family. */
function seriesOf(store: RowStore, held: ReadonlySet<number>): Map<string, Member[]> {
  const series = new Map<string, Member[]>();
  for (let at = 0; at < store.count; at++) {
    const shape = store.shape(at);
    const mass = store.value('mass', at);
    const i = store.value('iMajor', at);
    if ((shape !== 'i' && shape !== 'channel') || !(mass > 0 && i > 0) || held.has(store.lines[at] ?? 0))
      continue;
    const { family, sizes } = designationParts(store.printed[at] ?? '');
    if (sizes.length === 0) continue;
    const serial = sizes.length === 1 ? family : `${family} ${sizes.slice(0, -1).join('x')}`;
    const width = sizes.length === 1 ? 0 : store.value('b', at);
    const members = series.get(serial) ?? [];
    members.push({ at, mass: Math.log(mass), i: Math.log(i), width, order: Number(sizes[0]) });
    series.set(serial, members);
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

/** Distance of a member from the parabola of log I over log m through the others, and their scatter about it. */
function fitWithout(members: readonly Member[], out: number): Fit {
  const others = members.filter((_, k) => k !== out);
  const mean = others.reduce((sum, { mass }) => sum + mass, 0) / others.length;
  const moments = new Float64Array(5);
  const right = new Float64Array(3);
  for (const { mass, i } of others) {
    const x = mass - mean;
    for (let power = 0; power < 5; power++) moments[power] = (moments[power] ?? 0) + x ** power;
    for (let power = 0; power < 3; power++) right[power] = (right[power] ?? 0) + i * x ** power;
  }
  const [a, b, c] = solve3(moments, right);
  const at = ({ mass }: Member) => a + b * (mass - mean) + c * (mass - mean) ** 2;
  const squares = others.reduce((sum, member) => sum + (member.i - at(member)) ** 2, 0);
  const member = members[out];
  const sigma = Math.sqrt(squares / Math.max(others.length - 3, 1));
  return { residual: member ? member.i - at(member) : 0, sigma: Math.max(sigma, LEAST_SIGMA) };
}

/** Normal equations of a parabola by Cramer's rule; a line where three masses are too alike. */
function solve3(m: Float64Array, r: Float64Array): [number, number, number] {
  const [s0 = 0, s1 = 0, s2 = 0, s3 = 0, s4 = 0] = m;
  const [y0 = 0, y1 = 0, y2 = 0] = r;
  const det = (
    a: number,
    b: number,
    c: number,
    d: number,
    e: number,
    f: number,
    g: number,
    h: number,
    k: number,
  ) => a * (e * k - f * h) - b * (d * k - f * g) + c * (d * h - e * g);
  const whole = det(s0, s1, s2, s1, s2, s3, s2, s3, s4);
  if (Math.abs(whole) < 1e-12 * s0 * s2 * s4) {
    const slope = s2 > 0 ? (y1 - (s1 * y0) / s0) / s2 : 0;
    return [y0 / s0, slope, 0];
  }
  return [
    det(y0, s1, s2, y1, s2, s3, y2, s3, s4) / whole,
    det(s0, y0, s2, s1, y1, s3, s2, y2, s4) / whole,
    det(s0, s1, y0, s1, s2, y1, s2, s3, y2) / whole,
  ];
}

const DROP = 0.005; // of I, by which a heavier section may have less for rounding

/** Members that leave the curve of their series, or have less I than a lighter one. One at a time, the worst first. */
function outliers(
  members: readonly Member[],
): { member: Member; cause: 'series' | 'not_rising'; fit: Fit }[] {
  const found: { member: Member; cause: 'series' | 'not_rising'; fit: Fit }[] = [];
  let rest = [...members].sort((a, b) => a.mass - b.mass);
  while (rest.length >= LEAST) {
    const fits = rest.map((_, k) => fitWithout(rest, k));
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
        const formula = `log I over log m of ${group.length} sections of ${serial.trim()}: off by ${percent} %, ${(Math.abs(fit.residual) / fit.sigma).toFixed(1)} σ`;
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
