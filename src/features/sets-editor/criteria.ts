/** What the form of criteria knows of the combination sets that they may refer to: pure. */
import { criteriaOfSet, unfitting } from '@/engine/check';
import {
  type Categories,
  type CombinationSet,
  LOAD_GROUPS,
  type LoadGroup,
  serviceOf,
  strengthOf,
} from '@/engine/combination';
import type { UnitSystemName } from '@/engine/quantity';
import { type Edit, listAt, type Pointer, textAt, valueAt } from '@/features/author/edit';
import type { Written } from '@/features/review/draft';
import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';
import { type Column, cellText } from './cells';

/** The issued revision of a combination set. */
export interface IssuedSet {
  readonly slug: string;
  readonly revision: number;
  readonly document: CombinationSet;
}

export const setKey = (slug: string, revision: number): string => `${slug} ${revision}`;

/** The set that a draft refers to, by its key; '' where it refers to none yet. */
export function referredKey(document: Written): string {
  const [slug, revision] = [
    textAt(document, '/combinations/set'),
    valueAt(document, '/combinations/revision'),
  ];
  return slug === '' || typeof revision !== 'number' ? '' : setKey(slug, revision);
}

export const referredTo = (document: Written, sets: readonly IssuedSet[]): IssuedSet | undefined =>
  sets.find(({ slug, revision }) => setKey(slug, revision) === referredKey(document));

/** What keeps criteria from being held against their set, as the server says it. */
export function referredFaults(document: Written, sets: readonly IssuedSet[]): Fault[] {
  const reading = criteriaOfSet.safeParse(document);
  if (!reading.success) return [];
  const { set, revision } = reading.data.combinations;
  const found = referredTo(document, sets);
  if (!found) {
    const message = `Revision ${revision} of “${set}” is not issued. Criteria refer to one that is issued.`;
    return [{ pointer: '/combinations', code: 'not_issued', message }];
  }
  return unfitting(reading.data, found.document).map(({ path, message }) => ({
    pointer: pointer(path),
    code: 'does_not_fit',
    message,
  }));
}

/** Groups of which a category may be chosen, and those of which one is that the set does not have: to be put right. */
export const chosenGroups = (document: Written, set: CombinationSet): LoadGroup[] =>
  LOAD_GROUPS.filter(
    (group) =>
      (set.categories[group]?.length ?? 0) > 1 || valueAt(document, `/categories/${group}`) !== undefined,
  );

/** The categories that the criteria say, of groups alone. */
const categoriesIn = (document: Written): Categories =>
  Object.fromEntries(
    LOAD_GROUPS.flatMap((group) => {
      const id = textAt(document, `/categories/${group}`);
      return id === '' ? [] : [[group, id] as const];
    }),
  );

/** One limit as members are held to it: "Q + 0.5 S: L/360, a/180 of overhangs, at most 25 mm". */
interface LimitLine {
  readonly at: Pointer;
  readonly name: string;
  /** Null while its set has no such combination. */
  readonly combination: string | null;
  readonly limits: string;
  readonly source: string;
}

export function limitLines(
  document: Written,
  set: CombinationSet | undefined,
  system: UnitSystemName,
): LimitLine[] {
  const chosen = categoriesIn(document);
  return listAt(document, '/deflection').map((one, index) => {
    const groups = listAt(one, '/combination/groups').flatMap((name) =>
      LOAD_GROUPS.filter((group) => group === name),
    );
    const only = groups.length > 0 ? groups : undefined;
    const found = set && serviceOf(set, textAt(one, '/combination/id'), chosen, only);
    return {
      at: `/deflection/${index}`,
      name: textAt(one, '/name'),
      combination: found === undefined ? null : found.name || 'nothing acts',
      limits: limitsText(one, system),
      source: [textAt(one, '/source/publication'), textAt(one, '/source/clause')]
        .filter((text) => text !== '')
        .join(', '),
    };
  });
}

/** "L/360, 2a/360 of overhangs, at most 25 mm": of a limit whose numbers can be read. */
function limitsText(one: unknown, system: UnitSystemName): string {
  const [ratio, factor, overhang, cap] = ['/span_ratio', '/overhang_factor', '/overhang_ratio', '/cap'].map(
    (key) => valueAt(one, key),
  );
  const span = typeof ratio === 'number' ? [`L/${ratio}`] : [];
  const isWhole = typeof factor === 'number' && typeof overhang === 'number';
  const column = capColumn(system);
  const most = typeof cap === 'number' ? [`at most ${cellText(cap, column)} ${column.unit}`] : [];
  const overhangs = isWhole ? [`${factor === 1 ? '' : factor}a/${overhang} of overhangs`] : [];
  return [...span, ...overhangs, ...most].join(', ');
}

/** The cap of a limit, in the unit that it is typed and said in. */
export const capColumn = (system: UnitSystemName) =>
  ({
    key: 'cap',
    label: 'At most',
    kind: 'si',
    dimension: 'length',
    unit: system === 'us' ? 'in' : 'mm',
    isOptional: true,
    placeholder: 'no cap',
  }) as const satisfies Column;

export const strengthNames = (document: Written, set: CombinationSet): string[] =>
  strengthOf(set, categoriesIn(document)).map(({ name }) => name);

/** A further limit, of the combination and with the source of the last; its ratios are for its author to say. */
export function newLimit(document: Written): object {
  const last = listAt(document, '/deflection').at(-1);
  const source = valueAt(last, '/source') ?? { publication: '', clause: '', from_memory: true };
  return { name: '', combination: { id: textAt(last, '/combination/id') }, overhang_factor: 1, source };
}

/** Takes out what is no field of the kind, such as what an older schema had; last first, so that places stay. */
export const withoutUnknown = (faults: readonly Fault[]): Edit[] =>
  faults
    .filter(({ code }) => code === 'unknown_field')
    .map(({ pointer: at }): Edit => ({ do: 'remove', at }))
    .reverse();
