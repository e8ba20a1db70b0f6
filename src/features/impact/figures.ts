/** What of a member's result is held against that of another revision, and how far apart the two are. Pure. */
import type { Extremes, Reaction } from '@/engine/beam';
import type { CheckRow, Finding } from '@/engine/check';
import { supportLetter } from '@/engine/model';
import type { Purpose } from '@/engine/quantity';

/** The part of a stored result that is compared. */
export interface Compared {
  readonly total: { readonly reactions: readonly Reaction[]; readonly extremes: Extremes };
  readonly checks: { readonly rows: readonly CheckRow[]; readonly findings: readonly Finding[] } | null;
}

/** SI, the engine's signs. */
interface Figure {
  readonly name: string;
  readonly purpose: Purpose;
  readonly value: number;
}

/** A figure that is another one by now. Null: there is none with that revision. */
interface FigureChange {
  readonly name: string;
  readonly purpose: Purpose;
  readonly from: number | null;
  readonly to: number | null;
  /** Of what it was: 0.01 is 1 % more, of either sign. */
  readonly share: number | null;
}

/** A check whose utilisation is another one by now. */
interface CheckChange {
  readonly title: string;
  readonly place: string;
  readonly from: number | null;
  readonly to: number | null;
  readonly share: number | null;
  /** It passes with the one and fails with the other, or is not made. */
  readonly flips: boolean;
}

export interface Changes {
  readonly figures: readonly FigureChange[];
  readonly checks: readonly CheckChange[];
  /** Findings that come with the other revision, and those that go. */
  readonly findings: { readonly come: readonly string[]; readonly go: readonly string[] };
  readonly flips: number;
  /** The largest share of all; 1 for a figure that comes or goes. */
  readonly largest: number;
}

/** Figures that differ by less than this share of the largest of their kind are the same: rounding. */
const SAME = 1e-9;
/** A figure that is smaller than this share of the largest of its kind is next to nothing: what it grows by is measured against that. */
const SMALL = 1e-3;

function figuresOf({ total: { reactions, extremes } }: Compared): Figure[] {
  const fromLeft = [...reactions].sort((a, b) => a.at - b.at);
  const { shear, moment, deflection } = extremes;
  return [
    ...fromLeft.flatMap(({ vertical, moment: couple }, place): Figure[] => [
      { name: `Reaction at ${supportLetter(place)}`, purpose: 'reaction', value: vertical },
      { name: `Moment reaction at ${supportLetter(place)}`, purpose: 'moment', value: couple },
    ]),
    { name: 'Largest shear', purpose: 'force', value: Math.max(shear.max.value, -shear.min.value) },
    { name: 'Largest sagging moment', purpose: 'moment', value: moment.max.value },
    { name: 'Largest hogging moment', purpose: 'moment', value: moment.min.value },
    { name: 'Largest deflection down', purpose: 'deflection', value: -deflection.min.value },
    { name: 'Largest deflection up', purpose: 'deflection', value: deflection.max.value },
  ];
}

/** Reactions and shears are of one kind: forces. */
const kindOf = ({ purpose }: Figure): string => (purpose === 'reaction' ? 'force' : purpose);

function changedFigures(before: Compared, after: Compared): FigureChange[] {
  const [from, to] = [figuresOf(before), figuresOf(after)];
  const scale = (kind: string) =>
    Math.max(
      0,
      ...[...from, ...to].filter((one) => kindOf(one) === kind).map(({ value }) => Math.abs(value)),
    );
  const others = new Map(to.map((figure) => [figure.name, figure]));
  const gone = from.flatMap((figure): FigureChange[] => {
    const other = others.get(figure.name);
    const { name, purpose, value } = figure;
    if (!other) return value === 0 ? [] : [{ name, purpose, from: value, to: null, share: null }];
    const largest = scale(kindOf(figure));
    const difference = other.value - value;
    if (Math.abs(difference) <= SAME * largest) return [];
    const size = Math.max(Math.abs(value), SMALL * largest);
    const share = (value < 0 ? -difference : difference) / size;
    return [{ name, purpose, from: value, to: other.value, share }];
  });
  const names = new Set(from.map(({ name }) => name));
  const come = to
    .filter(({ name, value }) => !names.has(name) && value !== 0)
    .map(({ name, purpose, value }): FigureChange => ({ name, purpose, from: null, to: value, share: null }));
  return [...gone, ...come];
}

/** A deflection limit is the same limit when it is called the same, wherever it stands among the others and whatever it allows. */
const keyOf = ({ id, kind, title }: CheckRow): string =>
  kind === 'deflection' ? `${title.replace(/, [^,]*$/, '')} ${id.replace(/^deflection-\d+-/, '')}` : id;

const passes = (row: CheckRow | undefined): boolean | undefined => row && row.ratio <= 1;

function changedChecks(before: Compared, after: Compared): CheckChange[] {
  const byKey = ({ checks }: Compared) => new Map(checks?.rows.map((row) => [keyOf(row), row]));
  const [from, to] = [byKey(before), byKey(after)];
  return [...new Set([...from.keys(), ...to.keys()])].flatMap((key): CheckChange[] => {
    const [was, is] = [from.get(key), to.get(key)];
    const row = is ?? was;
    if (!row) return [];
    const [a, b] = [was?.ratio ?? null, is?.ratio ?? null];
    if (a !== null && b !== null && Math.abs(a - b) <= SAME * Math.max(a, b)) return [];
    return [
      {
        title: row.title,
        place: row.place,
        from: a,
        to: b,
        share: a === null || b === null ? null : (b - a) / Math.max(a, SMALL),
        flips: passes(was) !== passes(is),
      },
    ];
  });
}

function changedFindings(before: Compared, after: Compared): Changes['findings'] {
  const titles = ({ checks }: Compared) => checks?.findings.map(({ title }) => title) ?? [];
  const [from, to] = [titles(before), titles(after)];
  return {
    come: to.filter((title) => !from.includes(title)),
    go: from.filter((title) => !to.includes(title)),
  };
}

/** Every figure, check and finding that differs. */
export function changesBetween(before: Compared, after: Compared): Changes {
  const figures = changedFigures(before, after);
  const checks = changedChecks(before, after);
  const findings = changedFindings(before, after);
  return {
    figures,
    checks,
    findings,
    flips: checks.filter(({ flips }) => flips).length + findings.come.length + findings.go.length,
    largest: Math.max(0, ...[...figures, ...checks].map(({ share }) => Math.abs(share ?? 1))),
  };
}

export const isSame = ({ figures, checks, findings }: Changes): boolean =>
  figures.length + checks.length + findings.come.length + findings.go.length === 0;
