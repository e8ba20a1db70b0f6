/** The lengths between the supports and the ends of a draft's beam, by their expressions. */
import { supportLetter } from '@/engine/model';
import type { Written } from '@/features/review/draft';
import { sameText } from './draft-steps';
import { listAt, textAt } from './edit';

export interface Bay {
  readonly from: string;
  readonly to: string;
  readonly is: 'span' | 'left' | 'right';
  /** "Span A–B", "Overhang at the right". */
  readonly name: string;
  /** The symbol of its dimension line, where it has one. */
  readonly symbol: string | null;
}

/** Supports that hold the beam, in the order in which they are written: from the left. */
export const holdingSupports = (document: Written) =>
  listAt(document, '/beam/supports')
    .map((support, index) => ({
      at: textAt(support, '/at'),
      kind: textAt(support, '/kind'),
      letter: supportLetter(index),
      index,
      isSometimes: textAt(support, '/when') !== '',
      isSprung: textAt(support, '/kv') !== '' || textAt(support, '/kr') !== '',
    }))
    .filter(({ kind, isSprung }) => kind !== 'free' || isSprung);

export const lengthOf = (document: Written): string => textAt(document, '/beam/length') || '0';

export function baysOf(document: Written): Bay[] {
  const supports = holdingSupports(document);
  const length = lengthOf(document);
  const [first] = supports;
  const last = supports.at(-1);
  if (!first || !last) return [];
  const bay = (from: string, to: string, is: Bay['is'], name: string): Bay => ({
    from,
    to,
    is,
    name,
    symbol: symbolAlong(document, from, to),
  });
  const spans = supports.slice(1).map((to, index) => {
    const from = supports[index] ?? first;
    return bay(from.at, to.at, 'span', `Span ${from.letter}–${to.letter}`);
  });
  const isOne = supports.length === 1;
  return [
    ...(sameText(first.at, '0') ? [] : [bay('0', first.at, 'left', 'Overhang at the left')]),
    ...spans.filter(({ from, to }) => !sameText(from, to)),
    ...(sameText(last.at, length)
      ? []
      : [bay(last.at, length, 'right', isOne ? 'Free length' : 'Overhang at the right')]),
  ];
}

function symbolAlong(document: Written, from: string, to: string): string | null {
  const line = listAt(document, '/beam/dimensions').find(
    (one) => sameText(textAt(one, '/from'), from) && sameText(textAt(one, '/to'), to),
  );
  return textAt(line, '/symbol') || null;
}

/** The free end where a load at the tip belongs: at the right before the left; null where both ends are held. */
export function tipOf(document: Written): string | null {
  const bays = baysOf(document);
  if (bays.some(({ is }) => is === 'right')) return lengthOf(document);
  return bays.some(({ is }) => is === 'left') ? '0' : null;
}
