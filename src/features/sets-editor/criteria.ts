/** What the form of criteria knows of the combination sets that they may refer to: pure. */
import { criteriaOfSet, unfitting } from '@/engine/check';
import {
  type Categories,
  type CombinationSet,
  LOAD_GROUPS,
  serviceOf,
  strengthOf,
} from '@/engine/combination';
import { type Edit, listAt, type Pointer, textAt, valueAt } from '@/features/author/edit';
import type { Written } from '@/features/review/draft';
import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';

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

/** The categories that the criteria say, of groups alone. */
const categoriesIn = (document: Written): Categories =>
  Object.fromEntries(
    LOAD_GROUPS.flatMap((group) => {
      const id = textAt(document, `/categories/${group}`);
      return id === '' ? [] : [[group, id] as const];
    }),
  );

/** One limit as members are held to it: "Q + 0.5 S: span/360, overhang/180". */
interface LimitLine {
  readonly at: Pointer;
  readonly name: string;
  /** Null while its set has no such combination. */
  readonly combination: string | null;
  readonly limits: string;
  readonly source: string;
}

export function limitLines(document: Written, set: CombinationSet | undefined): LimitLine[] {
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
      limits: limitsText(one),
      source: [textAt(one, '/source/publication'), textAt(one, '/source/clause')]
        .filter((text) => text !== '')
        .join(', '),
    };
  });
}

/** "L/360, 2a/360 of overhangs": of a limit whose numbers can be read. */
function limitsText(one: unknown): string {
  const [ratio, factor, overhang] = ['/span_ratio', '/overhang_factor', '/overhang_ratio'].map((key) =>
    valueAt(one, key),
  );
  const span = typeof ratio === 'number' ? [`L/${ratio}`] : [];
  const isWhole = typeof factor === 'number' && typeof overhang === 'number';
  return [...span, ...(isWhole ? [`${factor === 1 ? '' : factor}a/${overhang} of overhangs`] : [])].join(
    ', ',
  );
}

export const strengthNames = (document: Written, set: CombinationSet): string[] =>
  strengthOf(set, categoriesIn(document)).map(({ name }) => name);

/** A further limit, with the source and the ratios of the last. */
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
