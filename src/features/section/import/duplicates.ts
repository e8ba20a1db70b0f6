import type { FileFacts, Finding, NumberField } from './contract';
import { dropRow, findingOf } from './finding';
import { FIELD_WORDS } from './headings';
import { inColumn } from './judge';
import { columnOf, type Plan } from './plan';
import type { RowStore } from './row-store';

const SAME = 1e-9; // of a value: the last bits of a conversion
const SIZES: readonly NumberField[] = ['h', 'b', 'tw', 'tf', 't'];
const ANOTHER = 0.002; // of a size, by which it is another section

/** The first property in which two rows differ; null where they say the same. */
function difference(
  store: RowStore,
  one: number,
  other: number,
  fields: readonly NumberField[],
  by: number,
): NumberField | null {
  let given: NumberField | null = null; // by one of the two only
  for (const field of fields) {
    const [a, b] = [store.value(field, one), store.value(field, other)];
    if (Number.isNaN(a) && Number.isNaN(b)) continue;
    if (Number.isNaN(a) || Number.isNaN(b)) given ??= field;
    else if (Math.abs(a - b) > by * Math.max(Math.abs(a), Math.abs(b))) return field;
  }
  return given;
}

type Twice = { first: number; second: number; key: string };

/** Rows of one key. The same values: taken once. Other values: refused. Other sizes and another spelling: two sections. */
function twiceFinding({ first, second }: Twice, store: RowStore, plan: Plan): Finding {
  const line = store.lines[second] ?? 0;
  const earlier = store.lines[first] ?? 0;
  const [printed = '', before = ''] = [store.printed[second], store.printed[first]];
  const field = difference(store, first, second, store.fields, SAME);
  const base = { line, designation: printed, read: printed } as const;
  if (field === null) {
    const message = `${printed} stands in line ${earlier} with the same values. It is taken once.`;
    return findingOf({
      ...base,
      rule: 23,
      severity: 'note',
      cause: 'duplicate',
      message,
      fixes: [dropRow(line)],
    });
  }
  const column = columnOf(plan, field);
  const shown = (at: number) => (column ? inColumn(store.value(field, at), column) : '');
  const differ = `${FIELD_WORDS[field]}: ${shown(first)} and ${shown(second)}`;
  const fixes = [
    { ...dropRow(line), label: `Keep line ${earlier}` },
    { ...dropRow(earlier), label: `Keep line ${line}` },
  ];
  const isOther = printed !== before && difference(store, first, second, SIZES, ANOTHER) !== null;
  if (isOther) {
    const message = `"${printed}" and "${before}" in line ${earlier} are two sections whose names read the same. Rename one.`;
    return findingOf({
      ...base,
      rule: 36,
      severity: 'error',
      cause: 'key_clash',
      expected: before,
      formula: differ,
      message,
      fixes,
    });
  }
  const message = `${printed} stands in line ${earlier} with other values. Keep one of the two.`;
  return findingOf({
    ...base,
    rule: 23,
    severity: 'error',
    cause: 'duplicate_differs',
    expected: before,
    formula: differ,
    message,
    fixes,
  });
}

const ALIKE = 0.002; // of every property: two names of one section
const WINDOW = 200; // neighbours by area that are compared at most
const LEAST_SHARED = 4; // properties that both rows must have

/** Sections under two names: all properties within 0.2 %, so near in the order of their areas. */
function nearDuplicates(store: RowStore, rows: readonly number[]): Finding[] {
  if (!store.fields.includes('area')) return [];
  const found: Finding[] = [];
  const sorted = rows.filter((at) => store.value('area', at) > 0);
  sorted.sort((a, b) => store.value('area', a) - store.value('area', b));
  for (const [k, one] of sorted.entries()) {
    const limit = store.value('area', one) * (1 + ALIKE);
    for (let next = k + 1; next < Math.min(sorted.length, k + WINDOW); next++) {
      const other = sorted[next] ?? 0;
      if (store.value('area', other) > limit) break;
      if (isAlike(store, one, other))
        found.push(nearFinding(store, Math.min(one, other), Math.max(one, other)));
    }
  }
  return found;
}

function isAlike(store: RowStore, one: number, other: number): boolean {
  if (store.shape(one) !== store.shape(other)) return false;
  let shared = 0;
  for (const field of store.fields) {
    const [a, b] = [store.value(field, one), store.value(field, other)];
    if (Number.isNaN(a) && Number.isNaN(b)) continue;
    if (!(Math.abs(a - b) <= ALIKE * Math.max(a, b))) return false;
    shared++;
  }
  return shared >= LEAST_SHARED;
}

function nearFinding(store: RowStore, one: number, other: number): Finding {
  const line = store.lines[other] ?? 0;
  const [first = '', printed = ''] = [store.printed[one], store.printed[other]];
  const message = `All properties are those of ${first} in line ${store.lines[one]}, within 0.2 %: another name for it?`;
  const edit = { kind: 'alias', line, of: first } as const;
  const fixes = [{ label: `Take it as another name of ${first}`, reach: 'row', edit } as const];
  const base = { rule: 24, severity: 'note', cause: 'near_duplicate', line, designation: printed } as const;
  return findingOf({ ...base, read: printed, expected: first, message, fixes });
}

/** Sections that stand in the file twice, under one name or two; lines that no row is made of. */
export function findDuplicates(store: RowStore, plan: Plan): Pick<FileFacts, 'findings' | 'heldLines'> {
  const seen = new Map<string, number>();
  const findings: Finding[] = [];
  const heldLines: number[] = [];
  const single: number[] = [];
  for (let at = 0; at < store.count; at++) {
    const key = store.keys[at] ?? '';
    if (key === '') continue;
    const first = seen.get(key);
    if (first === undefined) {
      seen.set(key, at);
      single.push(at);
      continue;
    }
    findings.push(twiceFinding({ first, second: at, key }, store, plan));
    heldLines.push(store.lines[at] ?? 0);
  }
  return { findings: [...findings, ...nearDuplicates(store, single)], heldLines };
}
