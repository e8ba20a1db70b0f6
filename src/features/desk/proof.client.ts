const PAUSE = 2000; // ms between two looks at a proof that is under way

/** Says how far a proof has come; when it is done, a link shows it: nothing that is being typed is lost. */
export function followProof(): void {
  const place = document.querySelector<HTMLElement>('[data-proof]');
  const words = place?.querySelector<HTMLElement>('[data-proof-words]');
  const address = place?.dataset['proof'];
  if (!words || !address) return;
  const look = async () => {
    const answer = await fetch(address);
    if (!answer.ok) return;
    const { state, done, total }: { state: string; done: number; total: number } = await answer.json();
    if (state === 'running') words.textContent = `Under way: ${done} of ${total} points.`;
    if (state === 'running' || state === 'queued') {
      setTimeout(look, PAUSE);
      return;
    }
    const link = Object.assign(document.createElement('a'), {
      href: location.pathname,
      textContent: 'Show it',
      className: 'link',
    });
    words.replaceChildren('The proof is finished. ', link);
  };
  setTimeout(look, PAUSE);
}
