/** What a draft says of itself, from its parts: kept up as long as its author has not written something else. */
import type { Arrangement, LoadKind } from '@/engine/template';
import type { Written } from '@/features/review/draft';
import { baysOf, holdingSupports, lengthOf } from './bays';
import { type DraftSteps, sameText } from './draft-steps';
import { listAt, textAt, valueAt } from './edit';
import { sameValue } from './merge';

function arrangementOf(document: Written): Arrangement {
  const supports = holdingSupports(document).filter(({ isSometimes }) => !isSometimes);
  const bays = baysOf(document);
  const spans = bays.filter(({ is }) => is === 'span').length;
  const isFixed = (index: number) => supports.at(index)?.kind === 'fixed';
  if (spans > 1) return 'multi-span';
  if (supports.length === 1) return 'cantilever';
  if (isFixed(0) && isFixed(-1)) return 'fixed-ends';
  if (isFixed(0) || isFixed(-1)) return 'propped-cantilever';
  return bays.some(({ is }) => is !== 'span') ? 'overhang' : 'simple-span';
}

function loadKindsOf(document: Written): LoadKind[] {
  const kinds = new Set<LoadKind>();
  for (const load of listAt(document, '/beam/loads')) {
    const kind = textAt(load, '/kind');
    if (kind === 'line')
      kinds.add(sameText(textAt(load, '/w0'), textAt(load, '/w1')) ? 'uniform' : 'triangular');
    if (kind === 'point') kinds.add('point');
    if (kind === 'couple') kinds.add('couple');
    if (kind === 'curvature') kinds.add('temperature');
  }
  const isMoved = (support: unknown) =>
    textAt(support, '/rise') !== '' || textAt(support, '/rotation') !== '';
  if (listAt(document, '/beam/supports').some(isMoved)) kinds.add('settlement');
  return [...kinds];
}

const joined = (words: readonly string[]): string =>
  words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;

const parameterWords = (document: Written): string[] =>
  listAt(document, '/parameters').map((one) =>
    `${textAt(one, '/name').toLowerCase()} ${textAt(one, '/symbol')}`.trim(),
  );

const COUNTS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten'];
const counted = (count: number, one: string): string =>
  `${COUNTS[count] ?? count} ${one}${count === 1 ? '' : 's'}`;

const LOAD_WORDS: Readonly<Record<LoadKind, string>> = {
  uniform: 'uniform load',
  point: 'point loads',
  triangular: 'triangular load',
  couple: 'couples',
  settlement: 'settlement of a support',
  temperature: 'a temperature difference',
};

function summaryOf(document: Written): string {
  const bays = baysOf(document);
  const spans = bays.filter(({ is }) => is === 'span').length;
  const overhangs = bays.filter(({ is }) => is !== 'span').length;
  const what =
    arrangementOf(document) === 'cantilever'
      ? 'A cantilever'
      : `A beam of ${counted(spans, 'span')}${overhangs > 0 ? ` with ${counted(overhangs, 'overhang')}` : ''}`;
  const loads = loadKindsOf(document).map((kind) => LOAD_WORDS[kind]);
  return loads.length > 0 ? `${what}, under ${joined(loads)}.` : `${what}.`;
}

const RESULTS_HELD = 'reactions, shear, moments, slopes and deflections';

/** Each text by its place. */
const DESCRIPTIONS: Readonly<Record<string, (document: Written) => unknown>> = {
  '/arrangement': arrangementOf,
  '/load_kinds': loadKindsOf,
  '/summary': summaryOf,
  '/you_give': (document) => parameterWords(document).join(', ').slice(0, 200),
  '/you_get': () => RESULTS_HELD,
};

/** Brings up what the draft says of itself where it says what `before` made of it, or nothing. */
export function redescribe(steps: DraftSteps, before: Written): void {
  for (const [at, say] of Object.entries(DESCRIPTIONS)) {
    const said = valueAt(before, at);
    const isOwn = said !== undefined && said !== '' && !sameValue(said, say(before));
    const now = say(steps.document);
    if (!isOwn && !sameValue(valueAt(steps.document, at), now)) steps.set(at, now);
  }
}

export const isWholeLength = (document: Written, from: string, to: string): boolean =>
  sameText(from, '0') && sameText(to, lengthOf(document));
