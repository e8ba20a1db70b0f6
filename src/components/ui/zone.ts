const RING_MS = 600;

/** Brings the zone of a letter into view, with the focus on its heading, and rings its bubble. */
export function goToZone(letter: string): void {
  const zone = document.querySelector<HTMLElement>(`[data-zone="${letter}"]`);
  if (!zone) return;
  zone.scrollIntoView({ block: 'start', behavior: 'instant' });
  zone.focus({ preventScroll: true });
  zone.dataset['ringed'] = '';
  setTimeout(() => delete zone.dataset['ringed'], RING_MS);
}
