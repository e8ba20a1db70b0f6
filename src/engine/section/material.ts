import document from '../../../data/materials/materials.json';
import { readMaterials } from './material-list';
import type { Material } from './material-types';

/** The shipped materials, in the order in which they are offered. */
export const MATERIALS: readonly Material[] = readMaterials(document);

export const materialFor = (id: string): Material | undefined =>
  MATERIALS.find((material) => material.id === id.trim().toLowerCase());

/**
 * Yield strength of steel of a thickness, Pa: the band whose limit it does not exceed (EN 10025; a 20 mm flange of S355
 * has 345 N/mm²). Null beyond the last band and for timber, which does not yield.
 */
export function yieldStrength(material: Material, thickness: number): number | null {
  if (material.kind !== 'steel') return null;
  return material.strength.find((band) => thickness <= band.upTo)?.fy ?? null;
}

/**
 * Characteristic fibre and shear strength, Pa, for a check of elastic stresses: f_y and f_y/√3 (von Mises) of steel,
 * f_m,k and f_v,k or F_b and F_v of timber, before any factor of duration, moisture or size. Null beyond the last band.
 */
export function elasticStrength(
  material: Material,
  thickness: number,
): { bending: number; shear: number } | null {
  if (material.kind === 'timber_en') return { bending: material.fm, shear: material.fv };
  if (material.kind === 'timber_nds') return { bending: material.fb, shear: material.fv };
  const fy = yieldStrength(material, thickness);
  return fy === null ? null : { bending: fy, shear: fy / Math.sqrt(3) };
}
