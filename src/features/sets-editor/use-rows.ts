import { type Edit, type Pointer, parentOf } from '@/features/author/edit';
import { useDraft } from '@/features/author/use-editor';
import type { Written } from '@/features/review/draft';
import { indexOf } from './cells';
import { duplication } from './combinations';
import { focusRow } from './grid-keys';

/** What may be done with the rows of the draft's lists: the row that it leaves to go on with is opened, and has the focus. */
export function useRows() {
  const store = useDraft();
  const goOn = (at: Pointer, isOpen: boolean) => {
    store.select(isOpen ? at : null);
    focusRow(at);
  };
  return {
    add: (list: Pointer, count: number, row: (document: Written) => object) => {
      store.edit({ do: 'insert', at: `${list}/-`, value: row(store.document) });
      goOn(`${list}/${count}`, false);
    },
    put: (edits: readonly Edit[], at: Pointer) => {
      store.edit(...edits);
      goOn(at, false);
    },
    duplicate: (at: Pointer) => {
      store.edit(...duplication(store.document, at));
      goOn(`${parentOf(at)}/${indexOf(at) + 1}`, true);
    },
    move: (at: Pointer, to: number) => {
      store.edit({ do: 'move', at, to });
      goOn(`${parentOf(at)}/${to}`, true);
    },
    remove: (at: Pointer) => {
      store.edit({ do: 'remove', at });
      goOn(`${parentOf(at)}/${Math.max(0, indexOf(at) - 1)}`, false);
    },
  };
}
