import { THIN_SPACE, type UnitSystemName } from '../quantity/index';
import type { Tree } from '../template/index';
import { workingValue } from './format';
import type { SectionProperty, Trace } from './types';

/** How tightly a piece of TeX holds together: a sum, a product, a fraction or function, a letter or a number. */
const [SUM, PRODUCT, FRACTION, ATOM] = [1, 2, 3, 4];
type Piece = { readonly tex: string; readonly level: number };

type Writing = {
  readonly atom: (name: string) => Piece;
  /** Between factors. */
  readonly times: string;
};

/** The formula of a number with letters: w L²/8. Empty for what was given. */
export const symbolsTex = (trace: Trace): string =>
  written(trace, { atom: (name) => ({ tex: name, level: ATOM }), times: '\\,' });

/** The same with numbers, each with its unit, in a unit system. Empty where letters alone can be read. */
export function numbersTex(trace: Trace, system: UnitSystemName): string {
  const { how, parts } = trace;
  if (how.kind === 'solution' && how.matrix.length > MOST_NUMBERS) return '';
  if (how.kind === 'section') return '';
  const values = new Map(parts.map((part) => [part.name, part.trace]));
  const atom = (name: string): Piece => {
    const value = values.get(name);
    return value ? numberPiece(value, system) : { tex: name, level: ATOM };
  };
  return written(trace, { atom, times: '\\times ' });
}

/** Matrices of more rows are not read with numbers. */
const MOST_NUMBERS = 3;

function numberPiece(trace: Trace, system: UnitSystemName): Piece {
  const { number, unit, isNegative } = workingValue(trace, system);
  const tex = `${isNegative ? '-' : ''}${numberTex(number)}${unit === '' ? '' : `\\,${unitTex(unit)}`}`;
  return { tex, level: isNegative ? SUM : unit === '' ? ATOM : FRACTION };
}

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** A number of the screen: thin spaces, and powers of ten with their exponents raised. */
const numberTex = (text: string): string =>
  text
    .replaceAll(THIN_SPACE, '\\,')
    .replace(/×10([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)$/, (_, power: string) => `\\times10^{${plainDigits(power)}}`);

const plainDigits = (power: string): string =>
  [...power].map((digit) => (digit === '⁻' ? '-' : SUPERSCRIPTS.indexOf(digit))).join('');

const unitTex = (unit: string): string =>
  `\\mathrm{${unit
    .replaceAll(/[⁰¹²³⁴⁵⁶⁷⁸⁹]/g, (digit) => `^${SUPERSCRIPTS.indexOf(digit)}`)
    .replaceAll('-', '\\text{-}')
    .replaceAll('%', '\\%')
    .replaceAll('°', '^\\circ ')}}`;

function written({ how }: Trace, writing: Writing): string {
  switch (how.kind) {
    case 'formula':
      return write(how.tree, writing).tex;
    case 'solution':
      return equations(how, writing);
    case 'root': {
      const terms = how.polynomial.map(
        (tree, power): Tree => (power === 0 ? tree : ['*', tree, power === 1 ? 's' : ['^', 's', power]]),
      );
      const sum = terms.filter((tree) => tree !== 0).reduce((a, b): Tree => ['+', a, b]);
      const from = how.from === 0 ? '' : `${write(how.from, writing).tex}+`;
      return `${from}s,\\quad ${write(sum, writing).tex}=0`;
    }
    case 'section':
      return sectionTex(how);
    default:
      return '';
  }
}

function equations(
  { matrix, unknowns, right }: Extract<Trace['how'], { kind: 'solution' }>,
  writing: Writing,
): string {
  const rows = matrix.map((row) =>
    row.map((name) => (name === null ? '0' : writing.atom(name).tex)).join('&'),
  );
  const sides = right.map((tree) => write(tree, writing).tex);
  return `${bracketed(rows)}${bracketed(unknowns)}=${bracketed(sides)}`;
}

const bracketed = (rows: readonly string[]): string => `\\begin{bmatrix}${rows.join('\\\\')}\\end{bmatrix}`;

function write(tree: Tree, writing: Writing): Piece {
  if (typeof tree === 'number') return { tex: String(tree), level: tree < 0 ? SUM : ATOM };
  if (typeof tree === 'string') return writing.atom(tree);
  const [operation, ...parts] = tree;
  const pieces = parts.map((part) => write(part, writing));
  const [first = NONE, second = NONE] = pieces;
  switch (operation) {
    case '+':
      return { tex: `${first.tex}${second.tex.startsWith('-') ? '' : '+'}${second.tex}`, level: SUM };
    case '-':
      return { tex: `${first.tex}-${held(second, PRODUCT)}`, level: SUM };
    case 'neg':
      return { tex: `-${held(first, PRODUCT)}`, level: SUM };
    case '*':
      return { tex: `${held(first, PRODUCT)}${writing.times}${held(second, PRODUCT)}`, level: PRODUCT };
    case '/':
      return { tex: `\\dfrac{${first.tex}}{${second.tex}}`, level: FRACTION };
    case '^':
      return { tex: `${based(first)}^{${second.tex}}`, level: FRACTION };
    case 'abs':
      return { tex: `\\left|${first.tex}\\right|`, level: ATOM };
    case 'sqrt':
      return { tex: `\\sqrt{${first.tex}}`, level: ATOM };
    default:
      return {
        tex: `\\${operation}\\left(${pieces.map(({ tex }) => tex).join(',\\,')}\\right)`,
        level: FRACTION,
      };
  }
}

const NONE: Piece = { tex: '', level: ATOM };

const held = ({ tex, level }: Piece, least: number): string =>
  level < least ? `\\left(${tex}\\right)` : tex;

/** A letter with marks of its own is held together, so that it can be raised. */
const based = (piece: Piece): string => (piece.level < ATOM ? held(piece, 9) : `{${piece.tex}}`);

const RECTANGLE: Readonly<Record<SectionProperty['property'], string>> = {
  area: 'b\\,h',
  iMajor: '\\dfrac{b\\,h^3}{12}',
  firstMoment: '\\dfrac{b\\,h^2}{8}',
  webThickness: 'b',
};
const PARTS: Readonly<Record<SectionProperty['property'], string>> = {
  area: '\\textstyle\\sum A_i',
  iMajor: '\\textstyle\\sum\\left(I_i+A_i\\,z_i^2\\right)',
  firstMoment: '\\textstyle\\sum A_i\\left|z_i\\right|\\ \\text{of one half}',
  webThickness: '\\text{thickness at the axis}',
};

/** By rectangles and fillets, of which a rectangle is the plainest. */
const sectionTex = ({ shape, property }: SectionProperty): string =>
  (shape === 'rectangle' ? RECTANGLE : PARTS)[property];
