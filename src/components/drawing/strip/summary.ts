import type { Beam } from '@/engine/model/index';
import { type DrawingFormat, figure } from '../format';
import { letterAt, namedSupports } from '../names';
import { toScreen } from '../signs';
import { PURPOSE, TITLE } from './diagram-layout';
import type { StripInput } from './strip-layout';

const KIND = {
  fixed: 'fixed',
  pin: 'pinned',
  roller: 'on a roller',
  guided: 'guided',
  free: 'on a spring',
} as const;

function supportWords(beam: Beam, format: DrawingFormat): string {
  const named = namedSupports(beam);
  const words = named.map(
    ({ support, letter }) => `${KIND[support.kind]} at ${letter}, ${figure(format, 'length', support.at)}`,
  );
  return words.length === 0 ? 'without supports' : words.join('; ');
}

/** The drawing in one sentence, for those who do not see it. */
export function summaryOf(input: StripInput, format: DrawingFormat): string {
  const { beam, solution } = input;
  const length = figure(format, 'length', beam.length);
  const loads = beam.loads.length;
  const start = `Beam ${length} long, ${supportWords(beam, format)}; ${loads === 1 ? 'one load' : `${loads} loads`}`;
  if (!solution) return `${start}; no result.`;
  const parts = input.quantities.map((quantity) => {
    const { max, min } = solution.extremes[quantity];
    const governing = Math.abs(min.value) > Math.abs(max.value) ? min : max;
    const at = governing.at[0] ?? 0;
    const place = letterAt(namedSupports(beam), at, beam.length) ?? figure(format, 'length', at);
    const value = figure(format, PURPOSE[quantity], toScreen(quantity, governing.value));
    return `largest ${TITLE[quantity].toLowerCase()} ${value} at ${place}`;
  });
  return `${start}; ${parts.join(', ')}.`;
}
