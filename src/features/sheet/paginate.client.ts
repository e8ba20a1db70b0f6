/**
 * Divides the rows of a sheet between pages of paper once its fonts are there. A row stays whole, a table is divided
 * between its rows and repeats its head, and what leads over to a row stays with it.
 */
const root = document.documentElement;
const pages: HTMLElement[] = [];

const bodyOf = (page: HTMLElement): HTMLElement => {
  const body = page.querySelector<HTMLElement>('[data-sheet-rows]');
  if (!body) throw new Error('A page of the sheet has no place for its rows');
  return body;
};

const overflows = (body: HTMLElement): boolean => body.scrollHeight > body.clientHeight;

function divide(first: HTMLElement): void {
  const rows = [...bodyOf(first).children];
  bodyOf(first).replaceChildren();
  const blank = first.cloneNode(true);
  pages.push(first);
  let page = first;

  /** A further page; it takes along what leads over to the row that comes next. */
  function turn(): HTMLElement {
    const full = bodyOf(page);
    const carried: Element[] = [];
    for (let last = full.lastElementChild; last?.hasAttribute('data-leads'); last = full.lastElementChild) {
      carried.unshift(last);
      last.remove();
    }
    const next = blank.cloneNode(true);
    if (!(next instanceof HTMLElement)) throw new Error('A page of the sheet is an element');
    // A page that only held what leads over would stay empty: then it keeps it.
    if (full.childElementCount === 0) full.append(...carried.splice(0));
    page.after(next);
    pages.push(next);
    page = next;
    bodyOf(page).append(...carried);
    return bodyOf(page);
  }

  function place(row: Element): void {
    const body = bodyOf(page);
    const wasEmpty = body.childElementCount === 0;
    body.append(row);
    if (!overflows(body)) return;
    const rest = splitTable(row, body);
    if (rest) {
      turn();
      place(rest);
      return;
    }
    if (wasEmpty) return; // taller than a page: nothing is gained by another one
    row.remove();
    const next = turn();
    next.append(row);
    if (!overflows(next)) return;
    const more = splitTable(row, next);
    if (!more) return;
    turn();
    place(more);
  }

  for (const row of rows) place(row);
}

/** The fewest rows of a table that are worth a page. */
const LEAST_ROWS = 2;

/** Takes off a table's last rows until the rest fits, and gives them as a row of their own; null where too few would stay. */
function splitTable(row: Element, body: HTMLElement): Element | null {
  const lines = [...row.querySelectorAll('tbody > tr')];
  if (lines.length < 2 * LEAST_ROWS) return null;
  const tbody = lines[0]?.parentElement;
  let kept = lines.length;
  while (kept > 0 && overflows(body)) lines[--kept]?.remove();
  // Nor does one line go on alone.
  if (lines.length - kept < LEAST_ROWS) lines[--kept]?.remove();
  const taken = lines.slice(kept);
  if (kept < LEAST_ROWS) {
    tbody?.append(...taken);
    return null;
  }
  const copy = row.cloneNode(true);
  if (!(copy instanceof Element)) return null;
  copy.querySelector('tbody')?.replaceChildren(...taken);
  for (const beside of copy.querySelectorAll('.cs-source, .cs-result')) beside.replaceChildren();
  return copy;
}

function number(): void {
  pages.forEach((page, index) => {
    const text = `${index + 1} of ${pages.length}`;
    page.setAttribute('aria-label', `Sheet ${text}`);
    for (const place of page.querySelectorAll('[data-sheet-number]')) place.textContent = text;
  });
}

const TIME = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  hour: '2-digit',
  minute: '2-digit',
  timeZoneName: 'short',
});

function sayTime(): void {
  const now = new Date();
  for (const place of document.querySelectorAll<HTMLTimeElement>('time[data-printed]')) {
    place.dateTime = now.toISOString();
    place.textContent = TIME.format(now);
  }
}

/** Shrinks the pages to a narrow window; on paper they keep their size. */
function fitWindow(): void {
  const width = pages[0]?.offsetWidth ?? 0;
  const zoom = Math.min(1, root.clientWidth / Math.max(1, width));
  root.style.setProperty('--cs-zoom', zoom.toFixed(4));
}

async function start(): Promise<void> {
  const first = document.querySelector<HTMLElement>('.cs-page');
  if (!first) return;
  sayTime();
  await document.fonts.ready;
  root.dataset['paged'] = 'dividing';
  divide(first);
  number();
  root.dataset['paged'] = 'done';
  fitWindow();
}

addEventListener('resize', fitWindow);
addEventListener('beforeprint', sayTime);
document.querySelector('[data-print]')?.addEventListener('click', () => print());
await start();

export {};
