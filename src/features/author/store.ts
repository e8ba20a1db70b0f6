/** The state of one open draft, outside React: a field is drawn again only when what it shows changes. */
import type { DraftView, Written } from '@/features/review/draft';
import type { Fault } from '@/lib/app-error';
import { type Content, contentOf } from './content';
import { applyEdits, type Edit, type Pointer, type StatedValues, valueAt } from './edit';
import { edited, type History, newHistory, redone, undone } from './history';
import { type Conflict, decide } from './merge';
import { placeWords as templateWords } from './place-words';

type Saving =
  /** `at` is null until something was saved from this page. */
  | { readonly kind: 'saved'; readonly at: Date | null }
  | { readonly kind: 'waiting' }
  | { readonly kind: 'saving' }
  | { readonly kind: 'offline' }
  /** It will not be saved by waiting: why. */
  | { readonly kind: 'refused'; readonly message: string };

export type Change = Omit<Content, 'document'>;

export interface Snapshot {
  readonly history: History;
  readonly change: Change;
  readonly selected: Pointer | null;
  readonly values: StatedValues;
  readonly faults: readonly Fault[];
  readonly saving: Saving;
  readonly version: number;
  /** Places that somebody else changed too; their pointers are into the content. Nothing is saved until they are decided. */
  readonly conflicts: readonly Conflict[];
  /** Somebody else's changes were taken in: when. */
  readonly mergedAt: Date | null;
  readonly readOnly: boolean;
}

export class DraftStore {
  private readonly listeners = new Set<() => void>();
  snapshot: Snapshot;

  /** `placeWords` says a place of the document in the words of its form. */
  constructor(
    draft: DraftView,
    readOnly: boolean,
    readonly placeWords: (document: Written, at: Pointer) => string = templateWords,
  ) {
    const { document, ...change } = contentOf(draft);
    this.snapshot = {
      history: newHistory(document),
      change,
      selected: null,
      values: {},
      faults: draft.faults,
      saving: { kind: 'saved', at: null },
      version: draft.version,
      conflicts: [],
      mergedAt: null,
      readOnly,
    };
  }

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  put(part: Partial<Snapshot>): void {
    this.snapshot = { ...this.snapshot, ...part };
    for (const listener of this.listeners) listener();
  }

  get document(): Written {
    return this.snapshot.history.document;
  }

  get content(): Content {
    return { document: this.document, ...this.snapshot.change };
  }

  readonly edit = (...edits: Edit[]): void => this.step((history) => edited(history, edits, Date.now()));
  readonly undo = (): void => this.step(undone);
  readonly redo = (): void => this.step(redone);

  private step(take: (history: History) => History): void {
    const { history, selected, readOnly } = this.snapshot;
    if (readOnly) return;
    const next = take(history);
    if (next.document === history.document) return;
    const isGone = selected !== null && valueAt(next.document, selected) === undefined;
    this.put({ history: next, selected: isGone ? null : selected });
  }

  readonly select = (selected: Pointer | null): void => {
    if (selected !== this.snapshot.selected) this.put({ selected });
  };

  readonly setValues = (values: StatedValues): void => this.put({ values });

  readonly setChange = (part: Partial<Change>): void => {
    if (!this.snapshot.readOnly) this.put({ change: { ...this.snapshot.change, ...part } });
  };

  /** Takes in what came of a merge. What was done before cannot be undone any more: it was of another document. */
  takeIn({ document, ...change }: Content, conflicts: readonly Conflict[], mergedAt: Date | null): void {
    const { selected } = this.snapshot;
    const isStill = selected !== null && valueAt(document, selected) === valueAt(this.document, selected);
    this.put({
      history: newHistory(document),
      change,
      conflicts,
      mergedAt,
      selected: isStill ? selected : null,
    });
  }

  readonly decideConflict = (conflict: Conflict, whose: 'mine' | 'theirs'): void => {
    const { edits, rest } = decide(this.snapshot.conflicts, conflict, whose);
    const { document } = applyEdits({ ...this.content }, edits);
    const { document: inner, ...change } = document as unknown as Content;
    this.put({
      history: inner === this.document ? this.snapshot.history : newHistory(inner),
      change,
      conflicts: rest,
    });
  };
}
