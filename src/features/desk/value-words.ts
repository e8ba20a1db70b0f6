import { REDUCTIONS, type SetFactor } from '@/engine/combination';
import { factorText } from '@/features/combination/factor';

/** A value of a document in words: a factor as it is printed, a row as its fields, a list with commas. */
export function valueWords(value: unknown): string {
  if (value === null || value === undefined || value === '') return '–';
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value !== 'object') return String(value);
  if (Array.isArray(value)) return listWords(value);
  if (isFactor(value)) return factorText(value);
  return Object.entries(value)
    .map(([key, inner]) =>
      key === 'factors' ? sumWords(inner) : `${key.replaceAll('_', ' ')}: ${valueWords(inner)}`,
    )
    .join('; ');
}

const listWords = (list: readonly unknown[]): string =>
  list.length === 0
    ? 'none'
    : list.map(valueWords).join(list.some((one) => typeof one === 'object') ? ' | ' : ', ');

const isFactor = (value: object): value is SetFactor & object =>
  'factor' in value &&
  typeof value.factor === 'number' &&
  'by' in value &&
  REDUCTIONS.some((by) => by === value.by);

/** "1.35 G + 1.5 ψ₀ Q": the factors of a combination as they are written. */
function sumWords(factors: unknown): string {
  if (typeof factors !== 'object' || factors === null) return valueWords(factors);
  const terms = Object.entries(factors).map(([group, factor]) =>
    factor === 1 ? group : `${valueWords(factor)} ${group}`,
  );
  return terms.length === 0 ? 'no factor' : terms.join(' + ');
}
