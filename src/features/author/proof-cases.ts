/** Proof cases as they begin. What must come out is the author's to say, or the second method's and then it says so. */
import { DIMENSION_NAMES, readQuantity } from '@/engine/quantity';
import type { Written } from '@/features/review/draft';
import { type Added, freshId } from './add';
import { DraftSteps } from './draft-steps';
import { listAt, textAt } from './edit';

/** Of the default, how much the parameters of the first cases are, so that no two cases are one. */
const SHARES = [1, 0.75, 1.4, 0.5, 1.2];

/** A case at values of its own, with a reaction to be filled in. */
export function addCase(document: Written): Added {
  const number = listAt(document, '/proof_cases').length + 1;
  const steps = new DraftSteps(document);
  const select = steps.append('/proof_cases', {
    name: `Case ${number}`,
    parameters: valuesAt(document, SHARES[(number - 1) % SHARES.length] ?? 1),
    source: textAt(listAt(document, '/sources')[0], '/id'),
    expect: [{ quantity: { reaction: 'A' }, printed: '' }],
  });
  return { edits: steps.edits, select };
}

/** Each quantity at this share of its default, where its range allows it. */
function valuesAt(document: Written, share: number): Record<string, string> {
  return Object.fromEntries(
    listAt(document, '/parameters').flatMap((one): [string, string][] => {
      const text = textAt(one, '/default');
      const symbol = textAt(one, '/symbol');
      if (textAt(one, '/kind') !== 'quantity' || symbol === '') return [];
      const [, figure = '', unit = ''] = /^(-?[\d.]+)\s*(.*)$/.exec(text) ?? [];
      const scaled = `${Number((Number(figure) * share).toPrecision(3))}${unit === '' ? '' : ` ${unit}`}`;
      return [[symbol, figure !== '' && isWithin(one, scaled) ? scaled : text]];
    }),
  );
}

function isWithin(parameter: unknown, text: string): boolean {
  const dimension = DIMENSION_NAMES.find((name) => name === textAt(parameter, '/dimension'));
  if (!dimension) return false;
  const [value, min, max] = [text, textAt(parameter, '/min'), textAt(parameter, '/max')].map((one) => {
    const reading = readQuantity(one, dimension);
    return reading.ok ? reading.value : Number.NaN;
  });
  return value !== undefined && min !== undefined && max !== undefined && value >= min && value <= max;
}

const SECOND_METHOD = 'Direct stiffness, the second method of the proof';

/** Whether a case expects figures that were computed, not printed or derived. */
const isComputed = (found: Readonly<Record<string, unknown>>): boolean =>
  listAt(found, '/expect').some((one) => textAt(one, '/printed') !== '');

/**
 * The worst point that the last proof found. Where closed forms hold there, they are what must come out; else it is
 * what direct stiffness finds, and the case names that as its source.
 */
export function addWorstCase(document: Written, found: Readonly<Record<string, unknown>>): Added {
  const steps = new DraftSteps(document);
  const known = listAt(document, '/sources').find((one) => textAt(one, '/publication') === SECOND_METHOD);
  let source = textAt(found, '/source');
  if (isComputed(found)) {
    source = textAt(known, '/id') || freshId(document, '/sources', 'direct-stiffness');
    if (!known)
      steps.append('/sources', {
        id: source,
        publication: SECOND_METHOD,
        table: 'Worst case of the proof',
        from_memory: false,
      });
  }
  const names = listAt(document, '/proof_cases').map((one) => textAt(one, '/name'));
  const name = names.includes(textAt(found, '/name'))
    ? `${textAt(found, '/name')} ${names.length + 1}`
    : textAt(found, '/name');
  const select = steps.append('/proof_cases', { ...found, name, source });
  return { edits: steps.edits, select };
}
