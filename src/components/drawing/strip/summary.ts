import type { Beam } from '@/engine/model/index';
import { type DrawingFormat, figure } from '../format';
import { letterAt, namedSupports } from '../names';
import { type Quantity, toScreen } from '../signs';
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
    const { value, x, of } = governingOf(input, solution, quantity);
    const place = letterAt(namedSupports(beam), x, beam.length) ?? figure(format, 'length', x);
    const size = figure(format, PURPOSE[quantity], toScreen(quantity, value));
    const name = `${TITLE[quantity].toLowerCase()}${of === undefined ? '' : ' of the envelope'}`;
    return `largest ${name} ${size} at ${place}${of === undefined ? '' : `, from ${of}`}`;
  });
  return `${start}; ${parts.join(', ')}.`;
}

/** The largest value in magnitude of what is drawn: of an envelope with the loads that it comes `of`. */
function governingOf(
  { envelopes }: StripInput,
  { extremes }: NonNullable<StripInput['solution']>,
  quantity: Quantity,
): { value: number; x: number; of?: string } {
  const [first, ...others] = envelopes?.[quantity]?.peaks ?? [];
  if (first)
    return others.reduce((most, one) => (Math.abs(one.value) > Math.abs(most.value) ? one : most), first);
  const { max, min } = extremes[quantity];
  const { value, at } = Math.abs(min.value) > Math.abs(max.value) ? min : max;
  return { value, x: at[0] ?? 0 };
}
