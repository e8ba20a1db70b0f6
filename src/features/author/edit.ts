/** Edits of a template as its author writes it: pure steps, each with the step that takes it back. */
import type { Written } from '@/features/review/draft';
import type { Fault } from '@/lib/app-error';

/** JSON Pointer (RFC 6901) into the template document: '/beam/supports/1', '/beam/loads/0/at'. */
export type Pointer = string;

/** One step. `insert` into a list takes an index or '-' for its end; what is missing on the way is made. */
export type Edit =
  | { readonly do: 'set'; readonly at: Pointer; readonly value: unknown }
  | { readonly do: 'insert'; readonly at: Pointer; readonly value: unknown }
  | { readonly do: 'remove'; readonly at: Pointer }
  | { readonly do: 'move'; readonly at: Pointer; readonly to: number };

/** Values by symbol as a person types them, "7.2 m", or rows of such; a symbol that is missing is at its default. */
export type StatedValues = Readonly<Record<string, string | readonly Readonly<Record<string, string>>[]>>;

/** What the form and the drawing of a draft share. */
export interface EditorState {
  /** As the author writes it: expressions are text, and anything may be missing or wrong still. */
  readonly document: Written;
  /** Everything that keeps the document from review, at its pointer; a moment behind the typing. */
  readonly faults: readonly Fault[];
  /** The part that the form and the drawing both point out. */
  readonly selected: Pointer | null;
  select(pointer: Pointer | null): void;
  /** Does all of these as one step of undo. */
  edit(...edits: Edit[]): void;
  undo(): void;
  redo(): void;
  readonly canUndo: boolean;
  readonly canRedo: boolean;
  /** What the drawing is shown at. */
  readonly values: StatedValues;
  setValues(values: StatedValues): void;
  /** Nothing may be changed: the draft is somebody else's, or is none any more. */
  readonly readOnly: boolean;
}

type Container = Readonly<Record<string, unknown>> | readonly unknown[];

const isContainer = (value: unknown): value is Container => typeof value === 'object' && value !== null;
const isList = (value: unknown): value is readonly unknown[] => Array.isArray(value);

/** The keys of a pointer: '/beam/supports/1' gives beam, supports, 1. */
export const keysOf = (pointer: Pointer): string[] =>
  pointer
    .split('/')
    .slice(1)
    .map((key) => key.replaceAll('~1', '/').replaceAll('~0', '~'));

/** The pointer of the list or object that holds what `pointer` names. */
export const parentOf = (pointer: Pointer): Pointer =>
  pointer.slice(0, Math.max(0, pointer.lastIndexOf('/')));

const child = (value: unknown, key: string): unknown =>
  isContainer(value) && Object.hasOwn(value, key) ? Reflect.get(value, key) : undefined;

/** What stands at a pointer; undefined where nothing does. */
export const valueAt = (document: unknown, pointer: Pointer): unknown =>
  keysOf(pointer).reduce(child, document);

/** The text at a pointer, or ''. */
export const textAt = (document: unknown, pointer: Pointer): string => {
  const value = valueAt(document, pointer);
  return typeof value === 'string' ? value : '';
};

/** The list at a pointer, or an empty one. */
export const listAt = (document: unknown, pointer: Pointer): readonly unknown[] => {
  const value = valueAt(document, pointer);
  return isList(value) ? value : [];
};

/** A document after an edit, and the edit that takes it back. Lists and objects that it does not touch are the same. */
interface Edited {
  readonly document: Written;
  readonly inverse: Edit;
}

/** Applies one edit. One that finds nothing to remove or move leaves the document as it is. */
export function applyEdit(document: Written, edit: Edit): Edited {
  const keys = keysOf(edit.at);
  const last = keys.at(-1);
  if (last === undefined) return whole(document, edit);
  const gap = firstGap(document, keys);
  if (gap !== undefined) {
    const at = edit.at
      .split('/')
      .slice(0, gap + 1)
      .join('/');
    if (edit.do === 'remove' || edit.do === 'move' || isNothing(edit)) return same(document, edit.at);
    return applyEdit(document, { do: 'set', at, value: built(keys.slice(gap), edit.value) });
  }
  const parent = valueAt(document, parentOf(edit.at));
  const changed = isList(parent) ? inList(parent, last, edit) : inObject(Object(parent), last, edit);
  if (!changed) return same(document, edit.at);
  return { document: Object(placed(document, keys.slice(0, -1), changed.value)), inverse: changed.inverse };
}

const isNothing = (edit: Edit): boolean => edit.do === 'set' && edit.value === undefined;
const same = (document: Written, at: Pointer): Edited => ({
  document,
  inverse: { do: 'move', at, to: Number.NaN },
});

function whole(document: Written, edit: Edit): Edited {
  if (edit.do !== 'set' || !isContainer(edit.value) || isList(edit.value)) return same(document, edit.at);
  return { document: edit.value, inverse: { do: 'set', at: '', value: document } };
}

/** How many keys lead to what should hold the next and does not; undefined where all but the last lead on. */
function firstGap(document: unknown, keys: readonly string[]): number | undefined {
  let value = document;
  for (const [index, key] of keys.slice(0, -1).entries()) {
    value = child(value, key);
    if (!isContainer(value)) return index + 1;
  }
  return undefined;
}

const isIndex = (key: string): boolean => key === '-' || /^\d+$/.test(key);

/** The value inside the lists and objects that its keys ask for. */
const built = (keys: readonly string[], value: unknown): unknown =>
  keys.reduceRight<unknown>((inner, key) => (isIndex(key) ? [inner] : { [key]: inner }), value);

interface Changed {
  readonly value: Container;
  readonly inverse: Edit;
}

function inList(list: readonly unknown[], key: string, edit: Edit): Changed | null {
  const index = key === '-' ? list.length : Number(key);
  const at = `${parentOf(edit.at)}/${index}`;
  const isThere = Number.isInteger(index) && index >= 0 && index < list.length;
  switch (edit.do) {
    case 'set':
      if (!isThere) return inList(list, key, { ...edit, do: 'insert' });
      return { value: list.with(index, edit.value), inverse: { do: 'set', at, value: list[index] } };
    case 'insert':
      if (!isThere && index !== list.length) return null;
      return { value: list.toSpliced(index, 0, edit.value), inverse: { do: 'remove', at } };
    case 'remove':
      if (!isThere) return null;
      return { value: list.toSpliced(index, 1), inverse: { do: 'insert', at, value: list[index] } };
    case 'move': {
      if (!isThere || !(edit.to >= 0 && edit.to < list.length)) return null;
      const value = list.toSpliced(index, 1).toSpliced(edit.to, 0, list[index]);
      return { value, inverse: { do: 'move', at: `${parentOf(edit.at)}/${edit.to}`, to: index } };
    }
  }
}

function inObject(object: Readonly<Record<string, unknown>>, key: string, edit: Edit): Changed | null {
  if (edit.do === 'move') return null;
  const isThere = Object.hasOwn(object, key);
  const inverse: Edit = isThere
    ? { do: 'set', at: edit.at, value: object[key] }
    : { do: 'remove', at: edit.at };
  if (edit.do !== 'remove' && edit.value !== undefined)
    return { value: { ...object, [key]: edit.value }, inverse };
  if (!isThere) return null;
  return { value: Object.fromEntries(Object.entries(object).filter(([name]) => name !== key)), inverse };
}

/** The document with another value at these keys; all of them lead somewhere. */
function placed(document: unknown, keys: readonly string[], value: unknown): unknown {
  const [key, ...rest] = keys;
  if (key === undefined) return value;
  const inner = placed(child(document, key), rest, value);
  return isList(document) ? document.with(Number(key), inner) : { ...Object(document), [key]: inner };
}

/** Applies several edits in turn; the inverses stand in the order in which they take them back. */
export function applyEdits(
  document: Written,
  edits: readonly Edit[],
): { readonly document: Written; readonly inverses: readonly Edit[] } {
  let after = document;
  const inverses: Edit[] = [];
  for (const edit of edits) {
    const edited = applyEdit(after, edit);
    after = edited.document;
    inverses.unshift(edited.inverse);
  }
  return { document: after, inverses };
}
