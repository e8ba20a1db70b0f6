import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import type { DraftView, SaveDraft } from '@/features/review/draft';
import { type Autosave, startAutosave } from './autosave.api';
import { DraftStore } from './store';

const draft: DraftView = {
  kind: 'template',
  slug: 'two-spans',
  revision: 1,
  state: 'draft',
  abandoned: false,
  version: 4,
  document: { name: 'Two spans', summary: '', parameters: [{ symbol: 'L', default: '6 m' }] },
  faults: [],
  change_note: '',
  change_class: null,
  consequence: null,
  sha256: 'a'.repeat(64),
  author: 'A. Person',
  editors: [],
  derived_from: null,
  created_at: '2026-03-31T09:00:00Z',
};

/** A server that keeps one draft: it refuses a version that is not the one that stands. */
class Server {
  stands: DraftView = draft;
  isAway = false;
  saves = 0;

  readonly fetch = async (
    _: string,
    { headers, body }: { headers: Record<string, string>; body: string },
  ) => {
    if (this.isAway) throw new TypeError('no network');
    if (headers['If-Match'] !== `"${this.stands.version}"`)
      return answer(412, { detail: 'Somebody saved this.', errors: [], current: this.stands });
    this.save(JSON.parse(body));
    return answer(200, this.stands);
  };

  save(body: Partial<SaveDraft>): void {
    this.saves++;
    this.stands = { ...this.stands, ...body, version: this.stands.version + 1 };
  }
}

const answer = (status: number, json: unknown) => ({ ok: status < 300, status, json: async () => json });

const storage = new Map<string, string>();
let server: Server;
let store: DraftStore;
let autosave: Autosave;
let listeners: Map<string, () => void>;

function open(view: DraftView): void {
  store = new DraftStore(view, false);
  autosave = startAutosave(store, view);
}
const type = (at: string, value: string) => store.edit({ do: 'set', at, value });
const rest = () => vi.advanceTimersByTimeAsync(2000);

beforeEach(() => {
  vi.useFakeTimers();
  server = new Server();
  listeners = new Map();
  storage.clear();
  vi.stubGlobal('fetch', server.fetch);
  vi.stubGlobal('addEventListener', (name: string, listener: () => void) => listeners.set(name, listener));
  vi.stubGlobal('removeEventListener', (name: string) => listeners.delete(name));
  vi.stubGlobal('sessionStorage', {
    getItem: (key: string) => storage.get(key) ?? null,
    setItem: (key: string, value: string) => storage.set(key, value),
    removeItem: (key: string) => storage.delete(key),
  });
  open(draft);
});

afterEach(() => {
  autosave.stop();
  vi.unstubAllGlobals();
  vi.useRealTimers();
});

describe('a draft that is written', () => {
  test('is saved once when the hand rests, over the version that was read', async () => {
    for (const text of ['O', 'On', 'One']) type('/summary', text);
    expect(store.snapshot.saving.kind).toBe('waiting');
    await rest();
    expect(server.saves).toBe(1);
    expect(server.stands.document['summary']).toBe('One');
    expect(store.snapshot).toMatchObject({ version: 5, saving: { kind: 'saved' } });
  });

  test('is saved although the hand never rests', async () => {
    for (let index = 0; index < 20; index++) {
      type('/summary', `text ${index}`);
      await vi.advanceTimersByTimeAsync(500);
    }
    expect(server.saves).toBeGreaterThanOrEqual(1);
  });

  test('with a change note is saved too', async () => {
    store.setChange({ change_note: 'First issue.' });
    await rest();
    expect(server.stands.change_note).toBe('First issue.');
  });

  test('takes in what somebody else saved meanwhile, and saves both', async () => {
    server.save({ document: { ...draft.document, name: 'Theirs' } });
    type('/summary', 'Mine');
    await rest();
    await rest();
    expect(server.stands.document).toMatchObject({ name: 'Theirs', summary: 'Mine' });
    expect(store.document).toMatchObject({ name: 'Theirs', summary: 'Mine' });
    expect(store.snapshot.conflicts).toEqual([]);
  });

  test('waits for a decision where both changed one place, and then saves what was chosen', async () => {
    server.save({ document: { ...draft.document, name: 'Theirs' }, change_note: 'Theirs too' });
    type('/name', 'Mine');
    store.setChange({ change_note: 'Mine too' });
    await rest();
    await rest();
    expect(server.saves).toBe(1);
    const [name, note] = store.snapshot.conflicts;
    expect([name?.at, note?.at]).toEqual(['/document/name', '/change_note']);
    if (!name || !note) return;
    store.decideConflict(name, 'theirs');
    store.decideConflict(note, 'mine');
    await rest();
    expect(server.stands).toMatchObject({
      document: { name: 'Theirs' },
      change_note: 'Mine too',
      version: 6,
    });
  });

  test('is kept in the tab while nobody answers, and saved as soon as somebody does', async () => {
    server.isAway = true;
    type('/summary', 'Kept');
    await rest();
    expect(store.snapshot.saving.kind).toBe('offline');
    expect(storage.size).toBe(1);
    server.isAway = false;
    listeners.get('online')?.();
    await rest();
    expect(server.stands.document['summary']).toBe('Kept');
    expect(storage.size).toBe(0);
  });

  test('is taken up again by the next visit where the last could not save it', async () => {
    server.isAway = true;
    type('/summary', 'Kept');
    await rest();
    autosave.stop();
    server.isAway = false;
    server.save({ document: { ...draft.document, name: 'Theirs' } });
    open(server.stands);
    expect(store.document).toMatchObject({ name: 'Theirs', summary: 'Kept' });
    await rest();
    expect(server.stands.document).toMatchObject({ name: 'Theirs', summary: 'Kept' });
  });

  test('asks again for a decision that the last visit left open', async () => {
    server.save({ document: { ...draft.document, name: 'Theirs' } });
    type('/name', 'Mine');
    await rest();
    expect(store.snapshot.conflicts).toHaveLength(1);
    listeners.get('pagehide')?.();
    autosave.stop();
    open(server.stands);
    expect(store.snapshot.conflicts).toEqual([{ at: '/document/name', mine: 'Mine', theirs: 'Theirs' }]);
    await rest();
    expect(server.stands.document['name']).toBe('Theirs');
    // And once more, after a reload that came before any decision.
    listeners.get('pagehide')?.();
    autosave.stop();
    open(server.stands);
    expect(store.snapshot.conflicts).toHaveLength(1);
  });

  test('is sent on its way when the page is left', async () => {
    type('/summary', 'Last words');
    listeners.get('pagehide')?.();
    await vi.advanceTimersByTimeAsync(0);
    expect(server.stands.document['summary']).toBe('Last words');
  });

  test('is not saved again when nothing changed, nor when it is somebody else’s to write', async () => {
    expect(await autosave.flush()).toBe(true);
    autosave.stop();
    store = new DraftStore(draft, true);
    autosave = startAutosave(store, draft);
    type('/summary', 'No');
    await rest();
    expect(server.saves).toBe(0);
    expect(store.document).toBe(draft.document);
  });
});
