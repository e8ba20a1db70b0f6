import { type RefObject, startTransition, useEffect, useState } from 'react';
import { flushSync } from 'react-dom';

/** After the last change of what is typed, and of what is dragged: a slow hand has not rested yet. */
const REST_MS = { typed: 30, dragged: 90 };

let isHeld = false;

function watchHand() {
  addEventListener('pointerdown', () => {
    isHeld = true;
  });
  for (const end of ['pointerup', 'pointercancel'])
    addEventListener(end, () => {
      isHeld = false;
    });
}
if (typeof window !== 'undefined') watchHand();

/** The value once it has rested: what takes longer than a frame waits for the hand to stop; for null it waits on. */
export function useRestedValue<T>(value: T, rest?: number | null): T {
  const [rested, setRested] = useState(value);
  useEffect(() => {
    if (rest === null) return;
    const wait = rest ?? (isHeld ? REST_MS.dragged : REST_MS.typed);
    const timer = setTimeout(() => startTransition(() => setRested(() => value)), wait);
    return () => clearTimeout(timer);
  }, [value, rest]);
  return rested;
}

/** Out of sight, what an element shows follows this long after. */
const UNSEEN_MS = 400;

/** The value while the element is in view, or is printed; out of view it follows later, when the hand has long rested. */
export function useInSight<T>(element: RefObject<Element | null>, value: T): T {
  const isSeen = useSeen(element);
  const [late, setLate] = useState(() => value);
  useEffect(() => {
    if (isSeen) return setLate(() => value);
    const timer = setTimeout(() => startTransition(() => setLate(() => value)), UNSEEN_MS);
    return () => clearTimeout(timer);
  }, [value, isSeen]);
  return isSeen ? value : late;
}

function useSeen(element: RefObject<Element | null>): boolean {
  const [isInView, setInView] = useState(true);
  const [isPrinted, setPrinted] = useState(false);
  useEffect(() => {
    const { current } = element;
    if (!current) return;
    const observer = new IntersectionObserver(([entry]) => entry && setInView(entry.isIntersecting));
    observer.observe(current);
    const print = () => flushSync(() => setPrinted(true));
    const printed = () => setPrinted(false);
    addEventListener('beforeprint', print);
    addEventListener('afterprint', printed);
    return () => {
      observer.disconnect();
      removeEventListener('beforeprint', print);
      removeEventListener('afterprint', printed);
    };
  }, [element]);
  return isInView || isPrinted;
}

/** True from when the element first comes near the window. */
export function useNear(element: RefObject<Element | null>): boolean {
  const [isNear, setNear] = useState(false);
  useEffect(() => {
    const { current } = element;
    if (!current || isNear) return;
    const observer = new IntersectionObserver(
      ([entry]) => {
        if (entry?.isIntersecting) setNear(true);
      },
      { rootMargin: '200px' },
    );
    observer.observe(current);
    return () => observer.disconnect();
  }, [element, isNear]);
  return isNear;
}

/** A part of the page's script that is fetched when it is first needed. */
export function useLater<T>(load: () => Promise<T>, isNeeded: boolean): T | null {
  const [part, setPart] = useState<{ value: T } | null>(null);
  useEffect(() => {
    if (!isNeeded || part) return;
    let isWanted = true;
    load().then(
      (value) => isWanted && setPart({ value }),
      // What was rendered on the server stays; the next visit tries again.
      () => undefined,
    );
    return () => {
      isWanted = false;
    };
  }, [load, isNeeded, part]);
  return part?.value ?? null;
}
