/** Saves a draft while it is written, and keeps in the browser what could not be saved. */
import { z } from 'zod';
import { type DraftView, SaveDraft } from '@/features/review/draft';
import { putDraft } from './author.api';
import { type Content, contentOf, mergeContents, sameContent } from './content';
import type { DraftStore } from './store';

/** After the last change, and after the first that is not saved, ms. */
const REST = 1200;
const LONGEST = 6000;
const RETRY = 5000;

const Kept = z.object({ base: SaveDraft, mine: SaveDraft });

export interface Autosave {
  /** Saves at once; false where that cannot be. */
  flush(): Promise<boolean>;
  stop(): void;
}

export function startAutosave(store: DraftStore, draft: DraftView): Autosave {
  const saver = new Saver(store, draft);
  saver.recover(contentOf(draft));
  const unsubscribe = store.subscribe(saver.noticed);
  const isOnline = () => void saver.flush();
  addEventListener('online', isOnline);
  addEventListener('pagehide', saver.leave);
  return {
    flush: () => saver.flush(),
    stop: () => {
      unsubscribe();
      saver.halt();
      removeEventListener('online', isOnline);
      removeEventListener('pagehide', saver.leave);
    },
  };
}

class Saver {
  /** What the server has, of `version`; what the page sent last. */
  private base: Content;
  private sent: Content;
  /** What was common to both when they parted; older than `base` while something is left to decide. */
  private parted: Content;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private waitingSince: number | null = null;
  private running: Promise<boolean> | null = null;
  private readonly key: string;

  constructor(
    private readonly store: DraftStore,
    private readonly draft: DraftView,
  ) {
    this.base = contentOf(draft);
    this.sent = this.base;
    this.parted = this.base;
    this.key = `draft ${draft.kind} ${draft.slug} ${draft.revision}`;
  }

  /** Takes up what an earlier visit of this tab could not save. */
  recover(theirs: Content): void {
    const text = sessionStorage.getItem(this.key);
    if (text === null || this.store.snapshot.readOnly) return;
    sessionStorage.removeItem(this.key);
    const reading = Kept.safeParse(parsed(text));
    if (!reading.success) return;
    const { base, mine } = reading.data;
    const { content, conflicts } = mergeContents(base, mine, theirs);
    if (sameContent(content, theirs) && conflicts.length === 0) return;
    if (conflicts.length > 0) this.parted = base;
    this.store.takeIn(content, conflicts, null);
    this.noticed();
  }

  readonly noticed = (): void => {
    const { snapshot } = this.store;
    if (!this.isDirty() || snapshot.saving.kind === 'refused') return;
    if (snapshot.saving.kind === 'saved') this.store.put({ saving: { kind: 'waiting' } });
    if (snapshot.conflicts.length > 0 || this.running) return;
    const now = Date.now();
    this.waitingSince ??= now;
    const wait = Math.min(REST, Math.max(0, this.waitingSince + LONGEST - now));
    this.later(snapshot.saving.kind === 'offline' ? RETRY : wait);
  };

  private isDirty(): boolean {
    const { document, ...change } = this.sent;
    const { snapshot } = this.store;
    return (
      document !== this.store.document ||
      !sameContent({ document, ...change }, { document, ...snapshot.change })
    );
  }

  private later(wait: number): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(() => void this.flush(), wait);
  }

  halt(): void {
    clearTimeout(this.timer);
  }

  async flush(): Promise<boolean> {
    clearTimeout(this.timer);
    while (this.running) await this.running;
    if (!this.isDirty()) return this.store.snapshot.saving.kind === 'saved';
    if (this.store.snapshot.conflicts.length > 0 || this.store.snapshot.readOnly) return false;
    this.running = this.save().finally(() => {
      this.running = null;
    });
    const isSaved = await this.running;
    this.noticed();
    return isSaved && !this.isDirty();
  }

  private async save(): Promise<boolean> {
    const { store } = this;
    const { content } = store;
    this.waitingSince = null;
    store.put({ saving: { kind: 'saving' } });
    const outcome = await putDraft(this.draft, store.snapshot.version, content);
    switch (outcome.kind) {
      case 'saved': {
        this.base = contentOf(outcome.draft);
        this.parted = this.base;
        this.sent = content;
        sessionStorage.removeItem(this.key);
        const { version, faults } = outcome.draft;
        // What is typed since then waits; its faults are found here.
        const isStill = store.document === content.document;
        store.put({ version, saving: { kind: 'saved', at: new Date() }, ...(isStill && { faults }) });
        return true;
      }
      case 'stale':
        this.takeIn(outcome.current);
        return false;
      case 'unreachable':
        this.keep();
        store.put({ saving: { kind: 'offline' } });
        return false;
      case 'refused':
        this.keep();
        store.put({ saving: { kind: 'refused', message: outcome.message } });
        return false;
    }
  }

  /** Somebody else saved: both changes are brought together, and saved when nothing is left to decide. */
  private takeIn(theirs: DraftView): void {
    const their = contentOf(theirs);
    const { content, conflicts } = mergeContents(this.base, this.store.content, their);
    if (conflicts.length === 0) this.parted = their;
    this.base = their;
    this.sent = their;
    this.store.put({ version: theirs.version, saving: { kind: 'waiting' } });
    this.store.takeIn(content, conflicts, new Date());
  }

  private keep(): void {
    sessionStorage.setItem(this.key, JSON.stringify({ base: this.parted, mine: this.store.content }));
  }

  /** The page is left with something that is not saved: it is sent on its way, and kept in case that it does not arrive. */
  readonly leave = (): void => {
    if (!this.isDirty() || this.store.snapshot.readOnly) return;
    this.keep();
    if (this.store.snapshot.conflicts.length === 0)
      void putDraft(this.draft, this.store.snapshot.version, this.store.content, true);
  };
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}
