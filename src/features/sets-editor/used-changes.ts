/** What a revision of a combination set changes in the combinations as they are used: pure. */
import { LOAD_GROUP_NAMES, type LoadGroup } from '@/engine/combination';
import { valueAt } from '@/features/author/edit';
import { sameValue } from '@/features/author/merge';
import type { Written } from '@/features/review/draft';
import { VARIABLE } from './combinations';
import { categoriesOf, joined, LISTS, type List, type PreviewLine, previewOf } from './preview';

interface UsedChange {
  readonly list: List;
  readonly name: string;
  readonly clause: string;
  /** Of which category, where it is not the usual one, or one that is gone: "imposed as E: storage". */
  readonly of: string | null;
  /** Null where there is no such combination. */
  readonly before: string | null;
  readonly after: string | null;
}

type Chosen = Readonly<Record<string, string>>;

/** The combinations that differ: of the usual categories first, then of each other category that was changed, or is gone. */
export function usedChanges(before: Written, after: Written): UsedChange[] {
  const others = VARIABLE.flatMap((group) =>
    categoriesOf(after, group)
      .slice(1)
      .filter((one) => !categoriesOf(before, group).some((other) => sameValue(one, other)))
      .map(({ id, name }) => ({ chosen: { [group]: id }, of: `${LOAD_GROUP_NAMES[group]} as ${name}` })),
  );
  const gone = VARIABLE.flatMap((group) => {
    const left = categoriesOf(after, group).map(({ id }) => id);
    return categoriesOf(before, group)
      .filter(({ id }) => !left.includes(id))
      .map(({ id, name }) => ({
        group,
        id,
        of: `${LOAD_GROUP_NAMES[group]} as ${name}, a category that is gone`,
      }));
  });
  return LISTS.flatMap((list) => {
    const usual = differences(before, after, list, {});
    const known = new Set(usual.map(keyOf));
    const further = others.flatMap(({ chosen, of }) =>
      differences(before, after, list, chosen)
        .filter((change) => !known.has(keyOf(change)))
        .map((change) => ({ ...change, of })),
    );
    return [...usual, ...further, ...gone.flatMap((category) => withoutCategory(before, list, category))];
  });
}

/** What came of a category that is gone: the combinations that its ψ reduces. */
function withoutCategory(before: Written, list: List, { group, id, of }: GoneCategory): UsedChange[] {
  return previewOf(before, list, { [group]: id })
    .filter(({ at }) => typeof valueAt(before, `${at}/factors/${group}`) === 'object')
    .map((line) => ({ list, name: line.name, clause: line.clause, of, before: textOf(line), after: null }));
}

interface GoneCategory {
  readonly group: LoadGroup;
  readonly id: string;
  readonly of: string;
}

const keyOf = ({ name, before, after }: UsedChange): string => JSON.stringify([name, before, after]);

const textOf = ({ missing, combinations }: PreviewLine): string => missing ?? joined(combinations);

function differences(before: Written, after: Written, list: List, chosen: Chosen): UsedChange[] {
  const [was, is] = [before, after].map((document) => previewOf(document, list, chosen));
  const old = new Map(was?.map((line) => [line.id, line]));
  const now = new Set(is?.map(({ id }) => id));
  const row = ({ name, clause }: PreviewLine) => ({ list, name, clause, of: null });
  const came = (is ?? []).flatMap((line): UsedChange[] => {
    const other = old.get(line.id);
    const [from, to] = [other ? textOf(other) : null, textOf(line)];
    return from === to ? [] : [{ ...row(line), before: from, after: to }];
  });
  const gone = [...old.values()].filter(({ id }) => !now.has(id));
  return [...came, ...gone.map((line) => ({ ...row(line), before: textOf(line), after: null }))];
}
