import { keysOf, type Pointer } from './edit';
import { useDraft, useSnapshot } from './use-editor';

const NONE = 'None. The draft can be proven and sent to review.';

/** What keeps the draft from review, each a way to its field. */
export function FaultZone({ none = NONE }: { readonly none?: string }) {
  const store = useDraft();
  const faults = useSnapshot((snapshot) => snapshot.faults);
  const document = useSnapshot(({ history }) => history.document);
  if (faults.length === 0) return <p>{none}</p>;
  const go = (pointer: Pointer) => {
    if (keysOf(pointer).some((key) => /^\d+$/.test(key))) store.select(pointer);
    focusAt(pointer);
  };
  return (
    <ol aria-label="Faults of the draft" className="max-h-440 overflow-auto">
      {faults.map(({ pointer, code, message }) => (
        <li key={`${pointer} ${code} ${message}`} className="border-b border-rule py-6">
          <button
            type="button"
            className="link min-h-26 text-left pointer-coarse:min-h-44"
            onClick={() => go(pointer)}
          >
            {store.placeWords(document, pointer)}
          </button>
          <span className="block text-schedule">{message}</span>
        </li>
      ))}
    </ol>
  );
}

/** The field at a pointer, or the nearest above or below it, once its part has opened. */
function focusAt(pointer: Pointer): void {
  requestAnimationFrame(() => {
    for (let at = pointer; at !== ''; at = at.slice(0, at.lastIndexOf('/'))) {
      const found =
        document.querySelector<HTMLElement>(`[data-at="${CSS.escape(at)}"]`) ??
        document.querySelector<HTMLElement>(`[data-at^="${CSS.escape(at)}/"]`) ??
        document.querySelector<HTMLElement>(`[data-part="${CSS.escape(at)}"] button`);
      if (!found) continue;
      found.scrollIntoView({ block: 'center' });
      found.focus({ preventScroll: true });
      return;
    }
  });
}
