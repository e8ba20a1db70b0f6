import { describe, expect, test } from 'vitest';
import {
  allWords,
  anyReading,
  excerptOf,
  markKey,
  marksIn,
  mendable,
  mended,
  readQuestion,
  slips,
  swaps,
  wordsOf,
} from './words';

describe('words', () => {
  test.each([
    ['Two-span beam, propped', ['two', 'span', 'beam', 'propped']],
    ['Škoda Élan', ['skoda', 'elan']],
    ['M₀ and L₁', ['m0', 'and', 'l1']],
    ['W12×26', ['w12', '26']],
    ['  …\u0000&|!(): ', []],
    ["d'or\\b", ['d', 'or', 'b']],
  ])('of %j are %j', (text, expected) => {
    expect(wordsOf(text)).toEqual(expected);
  });

  test.each(['Q-2417', 'q 2417', 'Q2417', 'q–2417'])('%s is one mark', (text) => {
    expect(markKey(text)).toBe('q2417');
  });
});

describe('readQuestion(q)', () => {
  test.each(['W12×26', 'w 12 x 26', 'W 12 X 26', 'w12*26'])('reads %s as one designation', (q) => {
    expect(readQuestion(q).designation).toBe('w12x26');
  });

  test('knows what people type for a word', () => {
    expect(readQuestion('udl 2 span').words).toEqual([['udl', 'uniform'], ['2', 'two'], ['span']]);
  });

  test('leaves out words that stand everywhere, unless nothing else was typed', () => {
    expect(readQuestion('load at the tip').words).toEqual([['load'], ['tip']]);
    expect(readQuestion('the').words).toEqual([['the']]);
  });

  test('reads no more than ten words', () => {
    expect(readQuestion('one two '.repeat(20)).words).toHaveLength(10);
  });
});

describe('the query', () => {
  test('wants every word by its beginning, or what was typed as a whole', () => {
    const question = readQuestion('w 12 x 26');
    expect(allWords(question)).toBe("('w') & ('12':*) & ('x') & ('26':*)");
    expect(anyReading(question)).toBe(`(${allWords(question)}) | 'w12x26':* | 'w12x26':*`);
  });

  test('has no character in it that could end a word', () => {
    const question = readQuestion(`a'b\\c & !d | (e <-> f):* "g"`);
    expect(anyReading(question).replaceAll(/'[\p{L}\p{N}]+'(?::\*)?/gu, '')).toMatch(/^[ ()&|]*$/);
  });
});

describe('a slip', () => {
  test('is looked for in words of letters that are long enough', () => {
    expect(mendable(readQuestion('proped 12x26 L tip'))).toEqual(['proped']);
    expect([slips('span'), slips('cantilever')]).toEqual([1, 2]);
  });

  test('of two neighbours is one', () => {
    expect(swaps('sapn')).toEqual(['aspn', 'span', 'sanp']);
  });

  test('is mended where it stands', () => {
    const meant = new Map([['proped', ['propped']]]);
    expect(mended(readQuestion('proped beam'), meant).words).toEqual([['propped'], ['beam']]);
  });
});

describe('what is set off', () => {
  const piecesOf = (text: string, q: string) =>
    marksIn(text, readQuestion(q)).map(([from, to]) => text.slice(from, to));

  test.each([
    ['Propped cantilever with overhang', 'overh prop', ['Prop', 'overh']],
    ['Škoda', 'sko', ['Sko'].map(() => 'Ško')],
    ['Q-2417', 'q2417', ['Q-2417']],
    ['Uniform load', 'udl', ['Uniform']],
    ['Roof beam', 'floor', []],
  ])('in %j for %j is %j', (text, q, expected) => {
    expect(piecesOf(text, q)).toEqual(expected);
  });

  test('of a long text is shown where it stands, in whole words', () => {
    const text = `${'The method is long. '.repeat(30)}Here the settlement counts. ${'And so on. '.repeat(30)}`;
    const excerpt = excerptOf(text, readQuestion('settl'));
    expect(excerpt).toContain('settlement counts');
    expect(excerpt).toMatch(/^… \S.*\S …$/);
    expect(excerpt.length).toBeLessThan(180);
    expect(excerptOf('Short.', readQuestion('long'))).toBe('Short.');
  });
});
