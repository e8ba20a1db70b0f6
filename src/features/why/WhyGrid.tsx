import { type FocusEvent, type KeyboardEvent, type ReactNode, useEffect, useRef } from 'react';
import { InGridContext } from './why-context';

const buttonsIn = (place: Element | null | undefined): HTMLElement[] => [
  ...(place?.querySelectorAll<HTMLElement>('button.why') ?? []),
];

/** A table's numbers as one stop of the Tab key: arrow keys go along its rows and columns. */
export function WhyGrid({ children }: { readonly children: ReactNode }) {
  const host = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const { current } = host;
    if (!current) return;
    const keepStop = () => {
      const all = buttonsIn(current);
      if (all.every(({ tabIndex }) => tabIndex < 0)) all[0]?.setAttribute('tabindex', '0');
    };
    keepStop();
    const observer = new MutationObserver(keepStop);
    observer.observe(current, { childList: true, subtree: true });
    return () => observer.disconnect();
  }, []);
  const settle = (event: FocusEvent) => {
    const chosen = event.target.closest('button.why');
    if (!chosen) return;
    for (const one of buttonsIn(host.current)) one.tabIndex = one === chosen ? 0 : -1;
  };
  const move = (event: KeyboardEvent) => {
    const from = event.target instanceof HTMLElement ? event.target.closest<HTMLElement>('button.why') : null;
    const next = from && neighbour(from, event.key);
    if (!next) return;
    event.preventDefault();
    next.focus();
  };
  return (
    <InGridContext value={true}>
      {/* biome-ignore lint/a11y/noStaticElementInteractions: the buttons in it are what is pressed */}
      <div ref={host} className="contents" onFocus={settle} onKeyDown={move}>
        {children}
      </div>
    </InGridContext>
  );
}

/** The number that an arrow key leads to. */
function neighbour(from: HTMLElement, key: string): HTMLElement | undefined {
  const row = from.closest('tr, li');
  const inRow = buttonsIn(row);
  const at = inRow.indexOf(from);
  if (key === 'ArrowRight') return inRow[at + 1];
  if (key === 'ArrowLeft') return inRow[at - 1];
  if (key === 'Home') return inRow[0];
  if (key === 'End') return inRow.at(-1);
  const step = { ArrowDown: 'nextElementSibling', ArrowUp: 'previousElementSibling' } as const;
  const way = key === 'ArrowDown' || key === 'ArrowUp' ? step[key] : null;
  if (!way) return undefined;
  for (let other = row?.[way]; other; other = other[way]) {
    const found = buttonsIn(other);
    if (found.length > 0) return found[Math.min(at, found.length - 1)];
  }
  return undefined;
}
