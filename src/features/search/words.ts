/** What is typed, as the entries have it: words, keys and the question that the database is asked. */
import { designationKey, designationParts } from '@/engine/section';
import { SHORT_WORDS } from '@/features/template/find';
import { LONGEST_QUERY } from './terms';

const MOST_WORDS = 10;
const LONGEST_WORD = 60; // characters, as search_words() keeps them

const ACCENTS = /[\u0300-\u036f]/g;
/** What words are cut at, character for character as the migration has it. */
const CUTS =
  '\\u0000-\\u002f\\u003a-\\u0040\\u005b-\\u0060\\u007b-\\u00bf\\u00d7\\u00f7\\u2000-\\u206f\\u2190-\\u2bff';
const CUT = new RegExp(`[${CUTS}]+`, 'g');

const plain = (text: string): string => text.normalize('NFKD').toLowerCase().replaceAll(ACCENTS, '');

/** The words of a text: lower case, without accents, cut at every character that is no letter and no figure. */
export const wordsOf = (text: string): string[] =>
  plain(text)
    .split(CUT)
    .filter((word) => word !== '')
    .map((word) => word.slice(0, LONGEST_WORD));

/** A mark for however it is typed: "Q-2417" and "q 2417" are q2417. */
export const markKey = (text: string): string => plain(text).replaceAll(CUT, '');

/** They stand in every text: beside other words they ask nothing. */
const EMPTY = new Set([
  'a',
  'an',
  'and',
  'at',
  'by',
  'for',
  'from',
  'in',
  'is',
  'of',
  'on',
  'or',
  'the',
  'to',
  'with',
]);

const NUMBERS = ['one', 'two', 'three', 'four', 'five', 'six'];

/** What else a word stands for: udl and uniform, 2 and two. */
function meantBy(word: string): string[] {
  const short = Object.hasOwn(SHORT_WORDS, word) ? SHORT_WORDS[word] : undefined;
  const spelt = NUMBERS[Number(word) - 1];
  return [short, spelt].filter((one) => one !== undefined);
}

/** Each word that was typed with all that it may mean; an entry answers that has one of each. */
export interface Question {
  readonly words: readonly (readonly string[])[];
  /** Of a mark, as markKey. */
  readonly key: string;
  /** Of a section, however typed; null where nothing typed has a size. */
  readonly designation: string | null;
}

export function readQuestion(q: string): Question {
  const typed = wordsOf(q.slice(0, LONGEST_QUERY));
  const telling = typed.filter((word) => !EMPTY.has(word));
  const words = (telling.length > 0 ? telling : typed).slice(0, MOST_WORDS);
  return {
    words: words.map((word) => [word, ...meantBy(word)]),
    key: markKey(q),
    designation: designationParts(q).sizes.length > 0 ? designationKey(q) : null,
  };
}

/** The same with words that were mistyped read as those they are most like. */
export const mended = (question: Question, meant: ReadonlyMap<string, readonly string[]>): Question => ({
  ...question,
  words: question.words.map((alternatives) => {
    const [typed = ''] = alternatives;
    return meant.get(typed) ?? alternatives;
  }),
});

/** A word as a query has it, by its beginning; a single letter begins too much. No word has a quote or a backslash. */
const lexeme = (word: string): string => (word.length > 1 ? `'${word}':*` : `'${word}'`);

/** Every word, each with what else it may mean; all of them begin a word of the entry. Text of a tsquery. */
export const allWords = ({ words }: Question): string =>
  words.map((alternatives) => `(${alternatives.map(lexeme).join(' | ')})`).join(' & ');

/** The same, or what was typed as one mark or one section. */
export function anyReading(question: Question): string {
  const { key, designation } = question;
  const whole = [key, designation && markKey(designation)].filter((one) => one !== null && one !== '');
  return [`(${allWords(question)})`, ...whole.map((one) => lexeme(one ?? ''))].join(' | ');
}

const SHORTEST_MENDED = 4;
const LETTERS = /^\P{N}+$/u;

/** The words that a slip of the finger may be looked for in: letters alone, and enough of them. */
export const mendable = ({ words }: Question): string[] =>
  words
    .map(([typed = '']) => typed)
    .filter((typed) => typed.length >= SHORTEST_MENDED && LETTERS.test(typed));

/** Letters that a word may have wrong: one, of a longer word two. */
export const slips = (word: string): number => (word.length >= 6 ? 2 : 1);

/** A word with each two neighbours the other way round: the commonest slip, which counts as one. */
export const swaps = (word: string): string[] =>
  Array.from(
    { length: word.length - 1 },
    (_, at) => word.slice(0, at) + word.charAt(at + 1) + word.charAt(at) + word.slice(at + 2),
  );

type Mark = readonly [from: number, to: number];
const WORD = /[\p{L}\p{N}\p{M}]+/gu;

/** The stretches of a text that answer what was asked: beginnings of its words, and it whole as a mark. */
export function marksIn(text: string, { words, key }: Question): Mark[] {
  if (key !== '' && markKey(text) === key) return [[0, text.length]];
  const asked = words.flat();
  return [...text.matchAll(WORD)].flatMap(({ 0: word, index }): Mark[] => {
    const own = plain(word);
    const found = asked.filter((one) => own.startsWith(one));
    if (found.length === 0) return [];
    const longest = Math.max(...found.map((one) => one.length));
    return [[index, index + Math.min(longest, word.length)]];
  });
}

const EXCERPT = 160; // characters

/** The piece of a longer text in which what was asked stands first. */
export function excerptOf(text: string, question: Question): string {
  const flat = text.replaceAll(/\s+/g, ' ').trim();
  const [first] = marksIn(flat, question);
  const from = Math.max(0, (first?.[0] ?? 0) - 50);
  const start = from === 0 ? 0 : flat.indexOf(' ', from) + 1;
  const piece = flat.slice(start, start + EXCERPT);
  const whole = start + EXCERPT >= flat.length;
  return `${start > 0 ? '… ' : ''}${whole ? piece : `${piece.slice(0, Math.max(piece.lastIndexOf(' '), 1))} …`}`;
}
