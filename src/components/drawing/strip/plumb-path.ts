import { textWidth } from '../geometry/text-width';
import type { Figure } from './figures';

type Span = [top: number, bottom: number];

const SIZE = 13.5;
/** What a text keeps clear of the line: 4 px of paper at its sides, and its own height over and under its baseline. */
const ASIDE = 4;
const [OVER, UNDER] = [13, 5];

function crosses(at: number, { x, text, anchor }: Figure): boolean {
  const width = textWidth(text, SIZE, 600);
  const left = anchor === 'start' ? x : anchor === 'end' ? x - width : x - width / 2;
  return at > left - ASIDE && at < left + width + ASIDE;
}

/** The upright line at x over each of the spans, broken where a text stands across it. */
export function plumbPath(at: number, spans: readonly Span[], texts: readonly Figure[]): string {
  const gaps = texts
    .filter((text) => crosses(at, text))
    .map(({ y }): Span => [y - OVER, y + UNDER])
    .sort(([a], [b]) => a - b);
  return spans
    .flatMap(([top, bottom]) => {
      let from = top;
      const parts: string[] = [];
      for (const [start, end] of gaps) {
        if (end <= from || start >= bottom) continue;
        if (start > from) parts.push(`M${at} ${from}V${start}`);
        from = end;
      }
      if (from < bottom) parts.push(`M${at} ${from}V${bottom}`);
      return parts;
    })
    .join('');
}
