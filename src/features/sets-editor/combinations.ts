/** What the form of a combination set does to its rows: pure, each as edits of one step. */
import {
  LOAD_GROUP_NAMES,
  LOAD_GROUPS,
  type LoadGroup,
  type SetCombination,
  type SetFactor,
} from '@/engine/combination';
import { freshId } from '@/features/author/add';
import { type Edit, listAt, type Pointer, parentOf, textAt, valueAt } from '@/features/author/edit';
import { sameValue } from '@/features/author/merge';
import type { Written } from '@/features/review/draft';
import { indexOf } from './cells';
import { factorsOf, type List } from './preview';

export const VARIABLE: readonly LoadGroup[] = LOAD_GROUPS.filter((group) => group !== 'G');

export const GROUP_CHOICES = LOAD_GROUPS.map((value) => ({
  value,
  label: `${value}, ${LOAD_GROUP_NAMES[value]}`,
}));

type Factors = SetCombination['factors'];

export const newCombination = (document: Written, list: List) => ({
  id: freshId(document, list, 'combination'),
  name: '',
  factors: {},
  clause: '',
  when: '',
  from_memory: true,
});

export const newCategory = (document: Written, group: LoadGroup) => ({
  id: freshId(document, `/categories/${group}`, 'category'),
  name: '',
  clause: '',
  from_memory: true,
});

/** A row once more behind itself, with an id of its own. */
export function duplication(document: Written, at: Pointer): Edit[] {
  const list = parentOf(at);
  const row = valueAt(document, at);
  if (typeof row !== 'object' || row === null) return [];
  const id = textAt(row, '/id');
  const copy = id === '' ? row : { ...row, id: freshId(document, list, id.replace(/-\d+$/, '')) };
  return [{ do: 'insert', at: `${list}/${indexOf(at) + 1}`, value: copy }];
}

/** The group that leads a combination: the one variable group without reduction. */
function leadingOf(factors: Factors): LoadGroup | null {
  const leading = VARIABLE.filter((group) => typeof factors[group] === 'number');
  return leading.length === 1 ? (leading[0] ?? null) : null;
}

const isAccompanying = (factor: SetFactor | undefined): factor is Exclude<SetFactor, number> =>
  typeof factor === 'object' && factor.by === 'psi0';

/** The combination with each of its accompanying groups leading in turn: those that the list does not have already. */
export function leadingVariants(document: Written, at: Pointer): Edit[] {
  const list = parentOf(at);
  const row = valueAt(document, at);
  const factors = factorsOf(row);
  if (typeof factors === 'string' || typeof row !== 'object') return [];
  const leading = leadingOf(factors);
  if (leading === null) return [];
  const known = listAt(document, list).map((one) => valueAt(one, '/factors'));
  const variants = VARIABLE.flatMap((group): object[] => {
    const other = factors[group];
    const led = factors[leading];
    if (!isAccompanying(other) || typeof led !== 'number') return [];
    const swapped = { ...factors, [group]: other.factor, [leading]: { factor: led, by: 'psi0' } };
    if (known.some((one) => sameValue(one, swapped))) return [];
    return [{ ...row, ...calledBy(row, leading, group), factors: swapped, from_memory: true }];
  });
  return inserted(document, list, indexOf(at) + 1, variants);
}

/** "6.10, imposed leading" of another group: "6.10, snow leading". */
function calledBy(row: unknown, from: LoadGroup, to: LoadGroup) {
  const [was, is] = [LOAD_GROUP_NAMES[from], LOAD_GROUP_NAMES[to]];
  const name = textAt(row, '/name');
  const letter = to.toLowerCase();
  return {
    name: name.includes(was) ? name.replace(was, is) : `${name}${name === '' ? '' : ', '}${is} leading`,
    when: textAt(row, '/when').replace(was, is),
    id: textAt(row, '/id').replace(new RegExp(`-(${from.toLowerCase()}|${was})(?=-|$)`), `-${letter}`),
  };
}

/** Rows put into a list at a place, each with an id of its own. */
function inserted(document: Written, list: Pointer, place: number, rows: readonly object[]): Edit[] {
  const taken = new Set(listAt(document, list).map((one) => textAt(one, '/id')));
  return rows.map((row, index): Edit => {
    const wanted = textAt(row, '/id');
    let id = wanted;
    for (let number = 2; taken.has(id); number++) id = `${wanted}-${number}`;
    taken.add(id);
    return { do: 'insert', at: `${list}/${place + index}`, value: { ...row, id } };
  });
}

/** Partial factors from which combinations are made: of the permanent load, and one for all that vary. */
export interface PartialFactors {
  /** Adverse, and where the permanent load holds down; no such combinations without it. */
  readonly permanent: number;
  readonly favourable: number | null;
  readonly variable: number;
  readonly groups: readonly LoadGroup[];
  /** How it is called: "6.10". */
  readonly called: string;
  readonly clause: string;
}

/**
 * The permanent load alone; each variable group leading with the others at ψ0; each alone where the permanent load
 * holds down. Those that the list has already are left out.
 */
export function fromPartialFactors(document: Written, list: List, given: PartialFactors): Edit[] {
  const { permanent, favourable, variable, groups, called, clause } = given;
  const known = listAt(document, list).map((one) => valueAt(one, '/factors'));
  const row = (id: string, name: string, when: string, factors: Factors) => ({
    id: `${idOf(called)}${id}`,
    name: `${called}, ${name}`,
    factors,
    clause,
    when,
    from_memory: true,
  });
  const rows = [
    row('g', 'permanent alone', 'Permanent loads alone.', { G: permanent }),
    ...groups.map((group) => {
      const others = groups.filter((other) => other !== group);
      const accompanying = others.map((other) => [other, { factor: variable, by: 'psi0' }] as const);
      const factors = { G: permanent, [group]: variable, ...Object.fromEntries(accompanying) };
      const name = `${LOAD_GROUP_NAMES[group]} leading`;
      return row(group.toLowerCase(), name, `Where ${LOAD_GROUP_NAMES[group]} loads lead.`, factors);
    }),
    ...(favourable === null
      ? []
      : groups.map((group) =>
          row(
            `fav-${group.toLowerCase()}`,
            `${LOAD_GROUP_NAMES[group]} with the permanent load favourable`,
            'Where the permanent load holds down.',
            { G: favourable, [group]: variable },
          ),
        )),
  ].filter(({ factors }) => !known.some((one) => sameValue(one, factors)));
  return inserted(document, list, listAt(document, list).length, rows);
}

const idOf = (called: string): string => {
  const plain = called.toLowerCase().replaceAll(/[^a-z0-9]+/g, '');
  return plain === '' ? '' : `${plain}-`;
};

const numberOf = (factor: SetFactor): number => (typeof factor === 'number' ? factor : factor.factor);

/** The partial factors that a group has in a list, smallest first. */
export function partialFactorsOf(document: Written, list: List, group: LoadGroup): number[] {
  const factors = listAt(document, list).flatMap((one) => {
    const read = factorsOf(one);
    const factor = typeof read === 'string' ? undefined : read[group];
    return factor === undefined ? [] : [numberOf(factor)];
  });
  return [...new Set(factors)].sort((a, b) => a - b);
}

/** Another value of a partial factor wherever a group of a list has it, reduced or not. */
export const exchange = (document: Written, list: List, group: LoadGroup, from: number, to: number): Edit[] =>
  listAt(document, list).flatMap((one, index): Edit[] => {
    const read = factorsOf(one);
    const factor = typeof read === 'string' ? undefined : read[group];
    if (factor === undefined || numberOf(factor) !== from) return [];
    const value = typeof factor === 'number' ? to : { ...factor, factor: to };
    return [{ do: 'set', at: `${list}/${index}/factors/${group}`, value }];
  });
