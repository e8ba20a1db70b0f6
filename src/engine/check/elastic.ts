import type { UnitSystemName } from '../quantity/index';
import type { Criteria } from './criteria';
import { texFigure, texQuotient } from './figure';
import type { Arrangement, CheckRow, ElasticSection } from './types';

/** The largest |value| of V or M over every arrangement: the first of equals, and the leftmost place it is reached. */
function largest(arrangements: readonly Arrangement[], quantity: 'moment' | 'shear') {
  let found = { value: 0, at: 0, combination: arrangements[0]?.combination.name ?? '' };
  for (const { combination, solution } of arrangements)
    for (const { value, at } of [solution.extremes[quantity].max, solution.extremes[quantity].min])
      if (Math.abs(value) > Math.abs(found.value))
        found = { value, at: at[0] ?? 0, combination: combination.name };
  return found;
}

type Placed = (x: number) => string;

/**
 * Bending: σ = M/W_el ≤ k·f over every combination, M the largest of either sign, W_el the smaller elastic modulus.
 * Navier's formula; the factor k is the practice's own (criteria). No stability of the compression flange in it.
 */
export function bendingCheck(
  arrangements: readonly Arrangement[],
  section: ElasticSection,
  { strength }: Criteria,
  place: Placed,
  system: UnitSystemName,
): CheckRow {
  const governing = largest(arrangements, 'moment');
  const demand = Math.abs(governing.value) / section.elasticModulus;
  const capacity = strength.bending * section.bendingStrength;
  return {
    id: 'bending',
    kind: 'bending',
    title: 'Bending stress',
    place: `${place(governing.at)}, ${governing.combination}`,
    clause: `${strength.source.publication}, ${strength.source.clause}`,
    demand,
    capacity,
    dimension: 'stress',
    ratio: demand / capacity,
    combination: governing.combination,
    at: governing.at,
    symbols: '\\sigma = \\frac{|M|}{W_{el}} \\le k\\,f',
    numbers: `${texQuotient({ value: Math.abs(governing.value), purpose: 'moment' }, { value: section.elasticModulus, purpose: 'section_modulus' }, 'stress', system)} \\le ${strength.bending.toPrecision(4)} \\times ${texFigure(section.bendingStrength, 'stress', system)}`,
  };
}

/**
 * Shear: τ = V·Q/(I·t) ≤ k·f over every combination, where τ is greatest in the section (Jourawski's formula).
 */
export function shearCheck(
  arrangements: readonly Arrangement[],
  section: ElasticSection,
  { strength }: Criteria,
  place: Placed,
  system: UnitSystemName,
): CheckRow {
  const governing = largest(arrangements, 'shear');
  const demand = Math.abs(governing.value) / section.shearAreaAtAxis;
  const capacity = strength.shear * section.shearStrength;
  return {
    id: 'shear',
    kind: 'shear',
    title: 'Shear stress',
    place: `${place(governing.at)}, ${governing.combination}`,
    clause: `${strength.source.publication}, ${strength.source.clause}`,
    demand,
    capacity,
    dimension: 'stress',
    ratio: demand / capacity,
    combination: governing.combination,
    at: governing.at,
    symbols: '\\tau = \\frac{|V|\\,Q}{I\\,t} \\le k\\,f',
    numbers: `${texQuotient({ value: Math.abs(governing.value), purpose: 'force' }, { value: section.shearAreaAtAxis, purpose: 'area' }, 'stress', system)} \\le ${strength.shear.toPrecision(4)} \\times ${texFigure(section.shearStrength, 'stress', system)}`,
  };
}
