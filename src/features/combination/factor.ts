import { REDUCTIONS, type Reduction, type SetFactor } from '@/engine/combination';
import { readDecimal } from '@/lib/decimal';

const SIGNS: Readonly<Record<Reduction, string>> = { psi0: 'ψ₀', psi1: 'ψ₁', psi2: 'ψ₂', xi: 'ξ' };

/** "1.5", "1.5 ψ₀", "ψ₂". */
export function factorText(factor: SetFactor): string {
  if (typeof factor === 'number') return String(factor);
  return factor.factor === 1 ? SIGNS[factor.by] : `${factor.factor} ${SIGNS[factor.by]}`;
}

/** How a reduction may be typed: "ψ0", "psi0", "p0"; "ξ", "xi". */
const TYPED: Readonly<Record<string, Reduction>> = Object.fromEntries(
  REDUCTIONS.flatMap((by) => {
    const name = by.replace('psi', 'ψ').replace('xi', 'ξ');
    return [name, by, by.replace('psi', 'p')].map((word) => [word, by] as const);
  }),
);

const PLAIN_DIGITS: Readonly<Record<string, string>> = { '₀': '0', '₁': '1', '₂': '2' };

/** A factor as a person types it: "1.5", "1.5 ψ0", "1.5 p0", "0.85·ξ"; null where it is none. */
export function readFactor(text: string): SetFactor | null {
  const plain = text
    .trim()
    .toLowerCase()
    .replaceAll(/[₀₁₂]/g, (digit) => PLAIN_DIGITS[digit] ?? digit);
  const [, number = '', word = ''] = /^([\d.,]*)[\s·*×]*(\D.*)?$/.exec(plain) ?? [];
  const factor = number === '' ? (word === '' ? null : 1) : readDecimal(number);
  if (factor === null) return null;
  if (word === '') return factor;
  const by = Object.hasOwn(TYPED, word) ? TYPED[word] : undefined;
  return by === undefined ? null : { factor, by };
}
