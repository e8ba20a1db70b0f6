/** What may be released of a beam, said so that it stays said while the beam's lengths change. */
import {
  admissibleSets,
  type Beam,
  checkRedundants,
  type DisplacedShape,
  defaultRedundants,
  eligibleRedundants,
  type Redundant,
  releaseMechanism,
} from '@/engine/model';

/** A component by its support: `moment` is the beam's own moment over it. */
export interface Release {
  readonly support: number;
  readonly component: 'vertical' | 'rotation' | 'moment';
}

export const toRedundant = (beam: Pick<Beam, 'supports'>, { support, component }: Release): Redundant =>
  component === 'moment'
    ? { at: beam.supports[support]?.at ?? Number.NaN, component }
    : { support, component };

/** Null for a moment that is over no support. */
export function toRelease(beam: Pick<Beam, 'supports'>, redundant: Redundant): Release | null {
  if (redundant.component !== 'moment') return redundant;
  const support = beam.supports.findIndex(({ at }) => at === redundant.at);
  return support < 0 ? null : { support, component: 'moment' };
}

/** "1v", "0r+2m": a choice in an address and as a key. */
export const releaseKey = (releases: readonly Release[]): string =>
  releases.map(({ support, component }) => `${support}${component.charAt(0)}`).join('+');

const COMPONENTS = { v: 'vertical', r: 'rotation', m: 'moment' } as const;

export function readReleases(key: string): Release[] {
  return [...key.matchAll(/(\d{1,3})([vrm])/g)].map(([, support, component]) => ({
    support: Number(support),
    component: COMPONENTS[component as keyof typeof COMPONENTS],
  }));
}

export interface ReleaseChoice {
  readonly key: string;
  readonly redundants: readonly Redundant[];
  readonly releases: readonly Release[];
}

/** A set that is refused: why, and how the beam would move. */
export interface BarredChoice extends ReleaseChoice {
  readonly reason: string;
  readonly motion: DisplacedShape | undefined;
}

const MOST_SETS = 24;
const MOST_BARRED = 6;

/**
 * Every set of redundants that may be released, and what a person could think of but may not. `chosen` is the key of
 * the set in use.
 */
export function releaseChoices(beam: Beam, chosen = ''): { open: ReleaseChoice[]; barred: BarredChoice[] } {
  if (beam.degree === 0) return { open: [], barred: [] };
  const open = openChoices(beam, chosen);
  const known = new Set(open.map(({ key }) => key));
  const thinkable = beam.degree === 1 ? components(beam).map((one) => [one]) : pairsAmong(beam);
  const barred = thinkable
    .map((set) => toChoice(beam, set))
    .filter(({ key }) => !known.has(key))
    .flatMap((choice): BarredChoice[] => {
      const [fault] = checkRedundants(beam, choice.redundants);
      if (!fault) return [];
      const motion = releaseMechanism(beam, choice.redundants) ?? undefined;
      return [{ ...choice, reason: fault.message, motion }];
    });
  return { open, barred: barred.slice(0, MOST_BARRED) };
}

/** Where there are more than a page holds, the beam's own choice and the one in use are first among them. */
function openChoices(beam: Beam, chosen: string): ReleaseChoice[] {
  const sets = [...take(admissibleSets(beam), MOST_SETS + 1)].map((set) => toChoice(beam, set));
  if (sets.length <= MOST_SETS) return sets;
  const inUse = readReleases(chosen).map((release) => toRedundant(beam, release));
  const first = [defaultRedundants(beam), inUse]
    .filter((set) => checkRedundants(beam, set).length === 0)
    .map((set) => toChoice(beam, set));
  const byKey = new Map([...first, ...sets].map((choice) => [choice.key, choice]));
  return [...byKey.values()].slice(0, MOST_SETS);
}

function* take<T>(all: Iterable<T>, most: number): Generator<T> {
  let left = most;
  for (const one of all) {
    if (left-- <= 0) return;
    yield one;
  }
}

function toChoice(beam: Beam, redundants: readonly Redundant[]): ReleaseChoice {
  const releases = redundants.flatMap((one) => toRelease(beam, one) ?? []);
  return { key: releaseKey(releases), redundants, releases };
}

/** Every reaction, and the moment over every inner support. */
const components = (beam: Beam): Redundant[] =>
  beam.supports.flatMap(({ at, vertical, rotation }, support): Redundant[] => [
    ...(vertical.kind === 'free' ? [] : [{ support, component: 'vertical' as const }]),
    ...(rotation.kind === 'free' ? [] : [{ support, component: 'rotation' as const }]),
    ...(rotation.kind === 'free' && vertical.kind !== 'free' && at > 0 && at < beam.length
      ? [{ at, component: 'moment' as const }]
      : []),
  ]);

/** Of a beam with two redundants, each pair of what may be released alone: some pairs leave a mechanism. */
function pairsAmong(beam: Beam): Redundant[][] {
  if (beam.degree !== 2) return [];
  const eligible = eligibleRedundants(beam);
  return eligible.flatMap((one, at) => eligible.slice(at + 1).map((other) => [one, other]));
}
