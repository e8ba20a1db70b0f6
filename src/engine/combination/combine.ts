import type { Load } from '../model/index';

/** Factors by load group; a group without one does not act. */
export type Combination = {
  readonly name: string;
  readonly factors: Readonly<Partial<Record<string, number>>>;
};

/** What groups are called in the names of combinations, where not by their own letters: D and L for G and Q. */
export type GroupLetters = Readonly<Partial<Record<string, string>>>;

const own = <T>(record: Readonly<Partial<Record<string, T>>>, key: string): T | undefined =>
  Object.hasOwn(record, key) ? record[key] : undefined;

/** The factor of a group in a combination; 0 where it does not act. */
export const factorOf = ({ factors }: Combination, group: string): number => own(factors, group) ?? 0;

/** The loads of a combination: each times its group's factor; a group without one does not act. */
export const factoredLoads = (loads: readonly Load[], combination: Combination): Load[] =>
  loads.flatMap((load) => {
    const factor = factorOf(combination, load.group ?? '');
    return factor === 0 ? [] : [scaled(load, factor)];
  });

function scaled(load: Load, factor: number): Load {
  switch (load.kind) {
    case 'point':
      return { ...load, p: load.p * factor };
    case 'line':
      return { ...load, w0: load.w0 * factor, w1: load.w1 * factor };
    case 'couple':
      return { ...load, m: load.m * factor };
    case 'curvature':
      return { ...load, kappa: load.kappa * factor };
  }
}

/** "1.35 G + 1.5 Q": the groups that act, a factor of 1 left out. */
export const named = (factors: readonly (readonly [string, number])[], letters: GroupLetters): string =>
  factors
    .map(([group, factor]) => `${factor === 1 ? '' : `${factor} `}${own(letters, group) ?? group}`)
    .join(' + ');

/**
 * The combinations that differ on these groups, each named by the groups that act: with no snow on the beam,
 * "1.35 G + 1.5 Q + 0.75 S" is "1.35 G + 1.5 Q". A combination in which nothing acts is left out.
 */
export function actingCombinations(
  combinations: readonly Combination[],
  groups: readonly string[],
  letters: GroupLetters = {},
): Combination[] {
  const distinct = new Map<string, Combination>();
  for (const combination of combinations) {
    const acting = groups
      .map((group) => [group, factorOf(combination, group)] as const)
      .filter(([, factor]) => factor !== 0);
    if (acting.length === 0) continue;
    const name = named(acting, letters);
    if (!distinct.has(name)) distinct.set(name, { name, factors: Object.fromEntries(acting) });
  }
  return [...distinct.values()];
}
