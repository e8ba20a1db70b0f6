import type { Pointer } from './edit';
import type { DraftStore } from './store';

/** The part at a pointer, or the first field inside it, takes the focus once it is drawn. */
export function focusPart(at: Pointer, inside = ''): void {
  requestAnimationFrame(() =>
    document.querySelector<HTMLElement>(`[data-part="${CSS.escape(at)}"] ${inside || 'button'}`)?.focus(),
  );
}

/** Opens a part that was added, with its first field ready to be typed in; a touch screen’s keyboard stays away. */
export function openPart(store: DraftStore, at: Pointer): void {
  store.select(at);
  if (matchMedia('(pointer: fine)').matches) focusPart(at, '[data-at]');
}
