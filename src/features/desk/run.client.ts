import { onProgress } from '@/features/notice/live.api';

/** Milliseconds between two looks at what is under way, in case that no message of its progress arrives. */
const PAUSE = { least: 500, most: 5000 };

/** Says how far the worker has come; when it is done, a link shows it: nothing that is being typed is lost. */
export function followRuns(): void {
  for (const place of document.querySelectorAll<HTMLElement>('[data-run]')) follow(place);
}

function follow(place: HTMLElement): void {
  const address = place.dataset['run'];
  const words = place.querySelector<HTMLElement>('[data-run-words]');
  if (!words || !address) return;
  let next = setTimeout(look, PAUSE.least);
  const later = (pause: number) => {
    clearTimeout(next);
    next = setTimeout(look, pause);
  };
  let isDueSoon = true;
  const stop = onProgress(() => {
    if (!isDueSoon) later(PAUSE.least);
    isDueSoon = true;
  });
  async function look(): Promise<void> {
    isDueSoon = false;
    const answer = await fetch(address ?? '');
    if (!answer.ok) return stop();
    const { state, done, total }: { state: string; done: number; total: number } = await answer.json();
    if (state === 'running' && words) words.textContent = `Under way: ${done} of ${total}.`;
    if (state === 'running' || state === 'queued') {
      later(PAUSE.most);
      return;
    }
    stop();
    const link = Object.assign(document.createElement('a'), {
      href: location.pathname,
      textContent: 'Show it',
      className: 'link',
    });
    words?.replaceChildren('It is finished. ', link);
  }
}
