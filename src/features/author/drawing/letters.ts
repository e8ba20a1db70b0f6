/** Supports go by letters from the left: whoever speaks of one follows it when others come or go before it. */
import type { Written } from '@/features/review/draft';
import { type Edit, listAt, type Pointer, textAt, valueAt } from '../edit';

/** The letter that a support goes by afterwards. */
export type NewLetters = ReadonlyMap<string, string>;

interface Mention {
  readonly at: Pointer;
  readonly text: string;
}

const EXPRESSION = /\bR([A-Z])\b/g;
const isLetter = (text: string): boolean => /^[A-Z]$/.test(text);

/** Every place of the document that names a support by its letter alone. */
function letterMentions(document: Written): Mention[] {
  const selectors = [
    ...listAt(document, '/results').map((_, k) => `/results/${k}/quantity`),
    ...listAt(document, '/proof_cases').flatMap((one, k) =>
      listAt(one, '/expect').map((_, row) => `/proof_cases/${k}/expect/${row}/quantity`),
    ),
  ].map((at) => `${at}/reaction`);
  const released = listAt(document, '/beam/redundants').map((_, k) => `/beam/redundants/${k}/support`);
  return [...released, ...selectors]
    .map((at) => ({ at, text: textAt(document, at) }))
    .filter(({ text }) => isLetter(text));
}

/** Every expression and message that speaks of a reaction: RB. */
function reactionMentions(document: Written): Mention[] {
  const found: Mention[] = [];
  const walk = (value: unknown, at: Pointer) => {
    if (typeof value === 'string') {
      if (value.match(EXPRESSION)) found.push({ at, text: value });
    } else if (typeof value === 'object' && value !== null)
      for (const [key, inner] of Object.entries(value)) walk(inner, `${at}/${key}`);
  };
  for (const part of ['rules', 'results', 'proof_cases']) walk(valueAt(document, `/${part}`), `/${part}`);
  return found;
}

/** The edits by which everything that speaks of a support goes on speaking of the same one. */
export function relettered(document: Written, letters: NewLetters): Edit[] {
  const set = (at: Pointer, before: string, value: string): Edit[] =>
    before === value ? [] : [{ do: 'set', at, value }];
  return [
    ...letterMentions(document).flatMap(({ at, text }) => set(at, text, letters.get(text) ?? text)),
    ...reactionMentions(document).flatMap(({ at, text }) =>
      set(
        at,
        text,
        text.replaceAll(EXPRESSION, (whole, letter: string) => `R${letters.get(letter) ?? whole.slice(1)}`),
      ),
    ),
  ];
}

/** Where results, rules and proof cases speak of this support; its release goes with it. */
export const mentionsOf = (document: Written, letter: string): Pointer[] => [
  ...letterMentions(document)
    .filter(({ at, text }) => text === letter && !at.startsWith('/beam/redundants/'))
    .map(({ at }) => at),
  ...reactionMentions(document)
    .filter(({ text }) => [...text.matchAll(EXPRESSION)].some(([, named]) => named === letter))
    .map(({ at }) => at),
];
