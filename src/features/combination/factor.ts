import type { Reduction, SetFactor } from '@/engine/combination';

const SIGNS: Readonly<Record<Reduction, string>> = { psi0: 'ψ₀', psi1: 'ψ₁', psi2: 'ψ₂', xi: 'ξ' };

/** "1.5", "1.5 ψ₀", "ψ₂". */
export function factorText(factor: SetFactor): string {
  if (typeof factor === 'number') return String(factor);
  return factor.factor === 1 ? SIGNS[factor.by] : `${factor.factor} ${SIGNS[factor.by]}`;
}
