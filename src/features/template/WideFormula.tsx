import { useLayoutEffect, useMemo, useRef, useState } from 'react';
import { Formula } from './Formula';
import { useInSight } from './use-live';

interface WideFormulaProps {
  readonly index: number;
  readonly formulaOf: (index: number) => string;
  /** What the formula works out, in words. */
  readonly title: string;
  readonly className: string;
}

/** A formula that may be wider than its place: then it can have the focus, so that the arrow keys move it sideways. */
export function WideFormula({ index, formulaOf, title, className }: WideFormulaProps) {
  const place = useRef<HTMLDivElement>(null);
  const shown = useInSight(place, formulaOf);
  const html = useMemo(() => shown(index), [shown, index]);
  const [isWide, setWide] = useState(false);
  useLayoutEffect(() => {
    const { current } = place;
    if (!current) return;
    const measure = () => setWide(current.scrollWidth > current.clientWidth);
    const observer = new ResizeObserver(measure);
    observer.observe(current);
    for (const child of current.children) observer.observe(child);
    return () => observer.disconnect();
  }, []);
  const focus = isWide ? { tabIndex: 0, role: 'group', 'aria-label': `Formula: ${title}` } : {};
  return (
    <div ref={place} {...focus} className={className}>
      <Formula html={html} className="block" />
    </div>
  );
}
