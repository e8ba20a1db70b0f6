import { useVirtualizer } from '@tanstack/react-virtual';
import { type RefObject, useEffect, useRef, useState } from 'react';

const ROW = { wide: 28, phone: 58 };
const HEAD = 62;
/** Of the schedule, as section-table.css holds it. */
const HEIGHT = { least: 146, most: 426 };
const FIRST_PAINT = { width: 1200, height: HEIGHT.most };

function useIsPhone(): boolean {
  const [isPhone, setIsPhone] = useState(false);
  useEffect(() => {
    const media = matchMedia('(max-width: 760px)');
    const follow = () => setIsPhone(media.matches);
    follow();
    media.addEventListener('change', follow);
    return () => media.removeEventListener('change', follow);
  }, []);
  return isPhone;
}

/** Whether the schedule is wider than its place, so that it is scrolled sideways. */
function useIsSideways(scroller: RefObject<HTMLElement | null>): boolean {
  const [isSideways, setIsSideways] = useState(false);
  useEffect(() => {
    const element = scroller.current;
    if (!element) return;
    const look = () => setIsSideways(element.scrollWidth > element.clientWidth);
    const observer = new ResizeObserver(look);
    for (const one of [element, ...element.children]) observer.observe(one);
    return () => observer.disconnect();
  }, [scroller]);
  return isSideways;
}

/** Which rows of a long schedule are drawn, and which of them are in view. */
export function useRows(count: number) {
  const scroller = useRef<HTMLDivElement>(null);
  const isPhone = useIsPhone();
  const isSideways = useIsSideways(scroller);
  const row = isPhone ? ROW.phone : ROW.wide;
  const head = isPhone ? 0 : HEAD;
  const virtualizer = useVirtualizer({
    count,
    getScrollElement: () => scroller.current,
    estimateSize: () => row,
    overscan: 6,
    // Drawn with the frame, not before the scroll goes on.
    useFlushSync: false,
    scrollPaddingEnd: head,
    initialRect: FIRST_PAINT,
  });
  // biome-ignore lint/correctness/useExhaustiveDependencies: another height of row measures anew
  useEffect(() => virtualizer.measure(), [row]);
  // Not measured: the rule beside it is drawn to this height, and would hold the schedule open.
  const height = Math.max(HEIGHT.least, Math.min(HEIGHT.most, head + count * row));
  const first = Math.min(Math.round((virtualizer.scrollOffset ?? 0) / row), Math.max(0, count - 1));
  const size = Math.max(1, Math.floor((height - head) / row));
  const drawn = virtualizer.getVirtualItems();
  return {
    scroller,
    drawn,
    before: drawn[0]?.start ?? 0,
    after: virtualizer.getTotalSize() - (drawn.at(-1)?.end ?? 0),
    first,
    size,
    height,
    isSideways,
    show: (index: number) => virtualizer.scrollToIndex(index),
    showAround: (index: number) => virtualizer.scrollToIndex(index, { align: 'center' }),
    startAt: (index: number) => virtualizer.scrollToOffset(index * row),
  };
}
