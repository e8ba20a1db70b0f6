import type { Expression, Factor, Monomial, Powers, Term } from './expression';

/** How a symbol is written: as its letter, or as its value. A negative value gives its sign to the term it stands in. */
type Atom = { tex: string; negative?: boolean };
export type Writer = {
  atom: (name: string) => Atom;
  /** Numbers need a sign between them; letters stand side by side. */
  times: '' | '\\times';
  /** Symbols of a product in the order of this rank: loads, then lengths, then stiffness. */
  rank?: ((name: string) => number) | undefined;
};

/** Subscripts from the name: "w_12" and "w12" are w with 12 below it; "kappa" and "delta" are the Greek letters. */
function symbolTex(name: string): string {
  const [, letters = name, index = ''] =
    /^([A-Za-z]+?)_?([0-9][A-Za-z0-9]*|(?<=_)[A-Za-z0-9]+)?$/.exec(name) ?? [];
  const greek = /^(alpha|beta|gamma|delta|theta|kappa|lambda|phi|psi|Delta|Phi)$/.test(letters);
  const head = greek
    ? `\\${letters}`
    : letters.length === 1 || letters === 'EI'
      ? letters
      : `\\mathit{${letters}}`;
  return index === '' ? head : `${head}_{${index}}`;
}

const SYMBOLS: Writer = { atom: (name) => ({ tex: symbolTex(name) }), times: '' };

/** The expression in TeX. Fractions are \dfrac; powers and brackets as a person would write them. */
export function texOf(expression: Expression, writer: Writer = SYMBOLS): string {
  if (expression.length === 0) return '0';
  return joinSigned(expression.map((term) => termTex(term, writer)));
}

type Signed = { negative: boolean; tex: string };

function joinSigned(parts: readonly Signed[]): string {
  return parts.map(({ negative, tex }, k) => (negative ? `-${tex}` : k > 0 ? `+${tex}` : tex)).join('');
}

function termTex(term: Omit<Term, 'key'>, writer: Writer): Signed {
  const top = side(term, term.coefficient.n, 1, writer);
  const bottom = side(term, term.coefficient.d, -1, writer);
  const negative = top.negative !== bottom.negative;
  return { negative, tex: bottom.tex === '1' ? top.tex : `\\dfrac{${top.tex}}{${bottom.tex}}` };
}

/** Numerator (sign 1) or denominator (sign −1) of a term. */
function side({ powers, factors }: Omit<Term, 'key'>, whole: number, sign: 1 | -1, writer: Writer): Signed {
  const here = factors.filter((factor) => Math.sign(factor.power) === sign);
  const letters = product(positive(powers, sign), whole, writer);
  const alone = letters.tex === '1' && here.length === 1;
  const brackets = here.map((factor) => factorTex(factor, alone, writer));
  const parts = letters.tex === '1' && here.length > 0 ? brackets : [letters.tex, ...brackets];
  return { negative: letters.negative, tex: parts.join(writer.times || '\\,') };
}

function positive(powers: Powers, sign: 1 | -1): Powers {
  return new Map(
    [...powers].filter(([, p]) => Math.sign(p) === sign).map(([name, p]) => [name, Math.abs(p)]),
  );
}

function factorTex({ sum, power }: Factor, alone: boolean, writer: Writer): string {
  const inside = joinSigned(sum.map((monomial) => monomialTex(monomial, writer)));
  const p = Math.abs(power);
  if (p === 1) return alone ? inside : `(${inside})`;
  return `(${inside})${exponent(p)}`;
}

function monomialTex(monomial: Monomial, writer: Writer): Signed {
  return termTex({ ...monomial, factors: [] }, writer);
}

/** whole · Π symbolᵖ, with "1" for the empty product; the sign is told apart. */
function product(powers: Powers, whole: number, writer: Writer): Signed {
  let negative = whole < 0;
  const rank = writer.rank;
  const names = [...powers.keys()];
  if (rank) names.sort((a, b) => rank(a) - rank(b));
  const atoms = names.map((name) => {
    const atom = writer.atom(name);
    const p = powers.get(name)!;
    if (atom.negative && p % 2 === 1) negative = !negative;
    if (p === 1) return atom.tex;
    const compound = /\\[,t]/.test(atom.tex); // 33\,180 or 2\times10^{-5} under an exponent
    return `${compound ? `(${atom.tex})` : atom.tex}${exponent(p)}`;
  });
  const size = Math.abs(whole);
  const parts = size === 1 && atoms.length > 0 ? atoms : [String(size), ...atoms];
  const tex = parts.reduce((text, part) => `${text}${glue(text, part, writer)}${part}`);
  return { negative, tex };
}

/** A control word must not run into the letter after it. */
function glue(before: string, after: string, { times }: Writer): string {
  if (times !== '') return times;
  return /\\[A-Za-z]+$/.test(before) && /^[A-Za-z]/.test(after) ? ' ' : '';
}

const exponent = (p: number) => (p < 10 ? `^${p}` : `^{${p}}`);
