import { createContext, useContext, useMemo, useSyncExternalStore } from 'react';
import type { Fault } from '@/lib/app-error';
import { type EditorState, type Pointer, valueAt } from './edit';
import type { DraftStore, Snapshot } from './store';

export const DraftContext = createContext<DraftStore | null>(null);

export function useDraft(): DraftStore {
  const store = useContext(DraftContext);
  if (!store) throw new Error('A field of a draft stands inside its editor.');
  return store;
}

/** A part of the state; drawn again only when it is another one. */
export function useSnapshot<T>(select: (snapshot: Snapshot) => T): T {
  const store = useDraft();
  const read = () => select(store.snapshot);
  return useSyncExternalStore(store.subscribe, read, read);
}

/** What stands at a pointer of the document. */
export const useAt = (at: Pointer): unknown => useSnapshot(({ history }) => valueAt(history.document, at));

export function useTextAt(at: Pointer): string {
  const value = useAt(at);
  return typeof value === 'string' ? value : '';
}

const NONE: readonly unknown[] = [];

export function useListAt(at: Pointer): readonly unknown[] {
  const value = useAt(at);
  return Array.isArray(value) ? value : NONE;
}

/** Of each list of faults, by pointer: made once for all the fields. */
const byPointer = new WeakMap<readonly Fault[], ReadonlyMap<string, string>>();

function faultMap(faults: readonly Fault[]): ReadonlyMap<string, string> {
  const known = byPointer.get(faults);
  if (known) return known;
  const map = new Map([...faults].reverse().map(({ pointer, message }) => [pointer, message]));
  byPointer.set(faults, map);
  return map;
}

/** The first fault of the very value at a pointer. */
export const useFaultAt = (at: Pointer): string | undefined =>
  useSnapshot(({ faults }) => faultMap(faults).get(at));

/** The first fault of a part or of anything inside it. */
export const useFaultIn = (at: Pointer): string | undefined =>
  useSnapshot(
    ({ faults }) => faults.find(({ pointer }) => pointer === at || pointer.startsWith(`${at}/`))?.message,
  );

/** Whether the part, or something inside it, is the one that is pointed out. */
export const useIsSelected = (at: Pointer): boolean =>
  useSnapshot(({ selected }) => selected === at || (selected?.startsWith(`${at}/`) ?? false));

/** What the form and the drawing share. */
export function useEditor(): EditorState {
  const store = useDraft();
  const { history, faults, selected, values, readOnly } = useSnapshot((snapshot) => snapshot);
  return useMemo(
    () => ({
      document: history.document,
      faults,
      selected,
      values,
      readOnly,
      canUndo: history.past.length > 0,
      canRedo: history.future.length > 0,
      select: store.select,
      edit: store.edit,
      undo: store.undo,
      redo: store.redo,
      setValues: store.setValues,
    }),
    [store, history, faults, selected, values, readOnly],
  );
}
