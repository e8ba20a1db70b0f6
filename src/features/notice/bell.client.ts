import { paths } from '@/paths';
import { keepLive, onUnread } from './live.api';
import type { NoticeView } from './notice';

/** Notices that the bell shows; the rest is on their page. */
const SHOWN = 6;
const moment = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  hour: '2-digit',
  minute: '2-digit',
  timeZone: 'UTC',
});

function part<E extends Element>(bell: Element, name: string): E {
  const found = bell.querySelector<E>(`[data-bell-${name}]`);
  if (!found) throw new Error(`The bell has a part ${name}`);
  return found;
}

function showCount(bell: Element, unread: number): void {
  const badge = part<HTMLElement>(bell, 'count');
  const before = Number(bell.getAttribute('data-unread'));
  bell.setAttribute('data-unread', String(unread));
  badge.textContent = unread > 99 ? '99+' : String(unread);
  badge.hidden = unread === 0;
  part(bell, 'words').textContent = unread === 0 ? 'Notices' : `Notices, ${unread} unread`;
  // Said once to whoever does not see the number change.
  if (unread > before)
    part(bell, 'said').textContent = unread === 1 ? 'A new notice' : `${unread} unread notices`;
}

async function showList(bell: Element): Promise<void> {
  const list = part<HTMLElement>(bell, 'list');
  const state = part<HTMLElement>(bell, 'state');
  try {
    const response = await fetch(`${paths.api.notices}?limit=${SHOWN}`);
    if (!response.ok) throw new Error(`answered with ${response.status}`);
    const { items }: { items: NoticeView[] } = await response.json();
    list.replaceChildren(...items.map((item) => toEntry(bell, item)));
    state.textContent = items.length === 0 ? 'Nothing yet. What concerns you will be told here.' : '';
  } catch {
    state.textContent = 'The notices could not be read. Try again in a moment.';
  }
  state.hidden = state.textContent === '';
}

function toEntry(bell: Element, { title, detail, href, created_at, read_at }: NoticeView): Node {
  const entry = part<HTMLTemplateElement>(bell, 'entry').content.cloneNode(true) as DocumentFragment;
  const put = (name: string, text: string) => {
    const place = entry.querySelector(`[data-${name}]`);
    if (place) place.textContent = text;
  };
  put('title', title);
  put('detail', detail);
  put('when', `${moment.format(new Date(created_at))} UTC${read_at === null ? ', unread' : ''}`);
  entry.querySelector('a')?.setAttribute('href', href);
  entry.querySelector('li')?.toggleAttribute('data-unread', read_at === null);
  return entry;
}

/** Whoever sees a page has seen what its notices tell. */
async function markThisPage(): Promise<void> {
  const answer = await fetch(paths.api.readNotices, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify({ href: location.pathname + location.search }),
  });
  await answer.text(); // one that nobody reads keeps one of the browser's few connections
}

function whenSeen(work: () => void): void {
  if (document.visibilityState === 'visible') work();
  else document.addEventListener('visibilitychange', () => whenSeen(work), { once: true });
}

const bell = document.querySelector<HTMLDetailsElement>('[data-bell]');
if (bell) {
  onUnread((unread) => {
    showCount(bell, unread);
    if (bell.open) void showList(bell);
  });
  bell.addEventListener('toggle', () => bell.open && void showList(bell));
  // A page that cannot say so now says so when it is opened again.
  if (bell.dataset['unread'] !== '0') whenSeen(() => void markThisPage().catch(() => undefined));
  keepLive(bell.dataset['person'] ?? '');
}
