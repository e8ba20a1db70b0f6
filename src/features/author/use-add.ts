import type { Written } from '@/features/review/draft';
import type { Added } from './add';
import { openPart } from './open-part';
import { useDraft } from './use-editor';

/** Adds parts to the draft as one step, and opens the one to go on with. */
export function useAdd(): (add: (document: Written) => Added) => void {
  const store = useDraft();
  return (add) => {
    const { edits, select } = add(store.document);
    store.edit(...edits);
    openPart(store, select);
  };
}
