const PAUSE = 2000; // ms between two looks at what is under way

/** Says how far the worker has come; when it is done, a link shows it: nothing that is being typed is lost. */
export function followRuns(): void {
  for (const place of document.querySelectorAll<HTMLElement>('[data-run]')) follow(place);
}

function follow(place: HTMLElement): void {
  const address = place.dataset['run'];
  const words = place.querySelector<HTMLElement>('[data-run-words]');
  if (!words || !address) return;
  const look = async () => {
    const answer = await fetch(address);
    if (!answer.ok) return;
    const { state, done, total }: { state: string; done: number; total: number } = await answer.json();
    if (state === 'running') words.textContent = `Under way: ${done} of ${total}.`;
    if (state === 'running' || state === 'queued') {
      setTimeout(look, PAUSE);
      return;
    }
    const link = Object.assign(document.createElement('a'), {
      href: location.pathname,
      textContent: 'Show it',
      className: 'link',
    });
    words.replaceChildren('It is finished. ', link);
  };
  setTimeout(look, PAUSE);
}
