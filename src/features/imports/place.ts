import { useRef } from 'react';

/** Every finding that is shown, in order. */
export const shownFindings = () => [...document.querySelectorAll<HTMLElement>('[data-finding]')];

/**
 * Where in the list of findings a person acts. After a check the list is another one, and in between there is none; the
 * focus goes on at the next finding, which stands where the last one stood on the screen.
 */
export function usePlace() {
  const place = useRef<{ readonly index: number; readonly top: number } | null>(null);
  return {
    keep: () => {
      const focused = document.activeElement;
      const item =
        focused?.closest<HTMLElement>('[data-finding]') ??
        focused?.closest('[data-group]')?.querySelector<HTMLElement>('[data-finding]');
      if (item)
        place.current = { index: shownFindings().indexOf(item), top: item.getBoundingClientRect().top };
    },
    resume: () => {
      const before = place.current;
      place.current = null;
      // Whoever went on elsewhere meanwhile is left there.
      if (!before || document.activeElement !== document.body) return;
      const shown = shownFindings();
      const item =
        shown[Math.min(before.index, shown.length - 1)] ??
        document.querySelector<HTMLElement>('[data-no-finding]');
      item?.focus({ preventScroll: true });
      if (item) window.scrollBy(0, item.getBoundingClientRect().top - before.top);
    },
  };
}

export type Place = ReturnType<typeof usePlace>;
