/** Undo and redo of a draft's edits. */
import type { Written } from '@/features/review/draft';
import { applyEdits, type Edit } from './edit';

interface Step {
  readonly undo: readonly Edit[];
  readonly redo: readonly Edit[];
  /** The field that it was typed into; null for anything but typing. */
  readonly field: string | null;
  readonly at: number;
}

export interface History {
  readonly document: Written;
  /** Oldest first. */
  readonly past: readonly Step[];
  /** What was undone, the next to redo last. */
  readonly future: readonly Step[];
}

export const newHistory = (document: Written): History => ({ document, past: [], future: [] });

/** Typing in one field without a longer pause is one step, ms. */
const PAUSE = 1500;
const MOST_STEPS = 500;

/** The document after these edits, as one step of undo. `now` in ms decides whether typing goes on with the last step. */
export function edited(history: History, edits: readonly Edit[], now: number): History {
  const { document, inverses } = applyEdits(history.document, edits);
  if (document === history.document) return history;
  const field = fieldOf(edits);
  const last = history.past.at(-1);
  const goesOn =
    last !== undefined &&
    field !== null &&
    last.field === field &&
    now - last.at <= PAUSE &&
    history.future.length === 0;
  const step: Step = goesOn
    ? { undo: last.undo, redo: edits, field, at: now }
    : { undo: inverses, redo: edits, field, at: now };
  const before = goesOn ? history.past.slice(0, -1) : history.past;
  return { document, past: [...before, step].slice(-MOST_STEPS), future: [] };
}

/** The one field that the edits write: a text, or what a text of a table's cell stands for. */
function fieldOf(edits: readonly Edit[]): string | null {
  const [only, another] = edits;
  return only?.do === 'set' && !Array.isArray(only.value) && another === undefined ? only.at : null;
}

export function undone(history: History): History {
  const step = history.past.at(-1);
  if (!step) return history;
  const { document } = applyEdits(history.document, step.undo);
  return { document, past: history.past.slice(0, -1), future: [...history.future, { ...step, field: null }] };
}

export function redone(history: History): History {
  const step = history.future.at(-1);
  if (!step) return history;
  const { document } = applyEdits(history.document, step.redo);
  return { document, past: [...history.past, step], future: history.future.slice(0, -1) };
}
