/** Letters that look like the x between two sizes: ×, ✕, ✖, *, Cyrillic х and Х, Greek χ and Χ. */
const CROSSES = /[×✕✖*хХχΧ]/g;

/** Families that are the same under two names, and marks that are no family. */
const ALIASES: Readonly<Record<string, string>> = {
  ipb: 'heb',
  ipbl: 'hea',
  shs: 'rhs',
  mm: '',
  in: '',
  inch: '',
};

export type DesignationParts = { family: string; sizes: readonly string[] };

const ASCII_ONLY = /^[ -~]*$/;

const plain = (text: string) =>
  ASCII_ONLY.test(text)
    ? text.toLowerCase().replaceAll('*', 'x').replaceAll(/["']/g, '')
    : unicodePlain(text);

const unicodePlain = (text: string) =>
  text
    .replaceAll(/[½¼¾⅛⅜⅝⅞]/g, (character) => ` ${character}`)
    .normalize('NFKC')
    .replaceAll('\u2044', '/')
    .replaceAll(CROSSES, 'x')
    .toLowerCase()
    .replaceAll(/["'″”]/g, '');

/** "12" stays, "92.0" is "92", "1/4" is "0.25", "1-1/2" and "1 1/2" are "1.5". */
function size(text: string): string {
  const fraction = text.includes('/') ? /^(?:(\d+)[ -])?(\d+)\/(\d+)$/.exec(text) : null;
  const value = fraction
    ? Number(fraction[1] ?? 0) + Number(fraction[2]) / Number(fraction[3])
    : Number(text.replace(',', '.'));
  return String(value);
}

const SIZE = /(?:\d+[ -])?\d+\/\d+|\d+(?:[.,]\d+)?/g;

/** Family letters and sizes of a designation, however it is typed. */
export function designationParts(text: string): DesignationParts {
  const written = plain(text);
  const sizes = (written.match(SIZE) ?? []).map(size);
  const letters = written
    .replaceAll(SIZE, ' ')
    .replaceAll(/(?<![a-z])x(?![a-z])/g, ' ')
    .replaceAll(/[^a-z]+/g, '');
  return { family: ALIASES[letters] ?? letters, sizes };
}

/**
 * One key for every way to write a designation: "W12X26", "W 12 × 26" and "w12*26" are w12x26; "hea200" and
 * "HE 200 A" are hea200; "533x210x92 UB" and "UB 533X210X92" are ub533x210x92.
 */
export const designationKey = (text: string): string => keyOfParts(designationParts(text));

export const keyOfParts = ({ family, sizes }: DesignationParts): string => family + sizes.join('x');

/** The designation in ASCII as the standards write it: one blank between words, x between sizes. */
export const asciiDesignation = (text: string): string =>
  text
    .normalize('NFKC')
    .replaceAll(CROSSES, 'x')
    .replaceAll(/(?<=\d)\s*x\s*(?=\d)/gi, 'x')
    .replaceAll(/\s+/g, ' ')
    .trim();

/**
 * How well a designation answers what was typed, 0 best, null not at all:
 * 0 the same · 1 same sizes, family left out · 2 begins so, family given · 3 sizes begin so, family left out ·
 * 4 every size typed occurs ("330 200"), and the family begins so.
 */
export function designationRank(query: string, designation: string): number | null {
  const asked = designationParts(query);
  const given = designationParts(designation);
  if (asked.family === '' && asked.sizes.length === 0) return null;
  const askedSizes = asked.sizes.join('x');
  const givenSizes = given.sizes.join('x');
  if (asked.family === given.family && askedSizes === givenSizes) return 0;
  if (asked.family === '' && askedSizes === givenSizes) return 1;
  if (asked.family === given.family && givenSizes.startsWith(askedSizes)) return 2;
  if (asked.family === '' && givenSizes.startsWith(askedSizes)) return 3;
  const occurs = asked.sizes.every((wanted) => given.sizes.some((one) => one.startsWith(wanted)));
  return occurs && given.family.startsWith(asked.family) ? 4 : null;
}
