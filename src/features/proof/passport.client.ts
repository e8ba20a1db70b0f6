/** Sets a passport smaller until it stands on one sheet of paper, and follows a proof that is under way. */
const root = document.documentElement;
const SMALLEST = 0.55;
const STEP = 0.02;
const PAUSE = 1500; // ms between two looks

function shrink(body: HTMLElement): void {
  for (let zoom = 1; zoom >= SMALLEST; zoom -= STEP) {
    body.style.setProperty('zoom', zoom.toFixed(2));
    if (body.scrollHeight <= body.clientHeight + 1) return;
  }
}

/** Shrinks the page to a narrow window; on paper it keeps its size. */
function fitWindow(): void {
  const width = document.querySelector<HTMLElement>('.cs-page')?.offsetWidth ?? 0;
  root.style.setProperty('--cs-zoom', Math.min(1, root.clientWidth / Math.max(1, width)).toFixed(4));
}

async function follow(place: HTMLElement): Promise<void> {
  const answer = await fetch(place.dataset['follow'] ?? '').catch(() => null);
  const run: { state: string; done: number; total: number } | null = answer?.ok ? await answer.json() : null;
  if (run && run.state !== 'queued' && run.state !== 'running') return location.reload();
  if (run && run.total > 0) place.textContent = `Under way: ${run.done} of ${run.total}.`;
  setTimeout(() => follow(place), PAUSE);
}

async function start(): Promise<void> {
  const body = document.querySelector<HTMLElement>('[data-passport]');
  if (!body) return;
  await document.fonts.ready;
  root.dataset['paged'] = 'done';
  shrink(body);
  fitWindow();
  const place = document.querySelector<HTMLElement>('[data-follow]');
  if (place) await follow(place);
}

addEventListener('resize', fitWindow);
document.querySelector('[data-print]')?.addEventListener('click', () => print());
await start();

export {};
