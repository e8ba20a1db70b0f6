import astm from '../../../data/materials/astm-steel.json';
import en338 from '../../../data/materials/en-338-2016.json';
import en10025 from '../../../data/materials/en-10025-2004.json';
import en10210 from '../../../data/materials/en-10210-2006.json';
import en14080 from '../../../data/materials/en-14080-2013.json';
import nds from '../../../data/materials/nds-2018.json';
import { type MaterialSet, materialsOf } from './material-set';
import type { Material } from './material-types';

/**
 * The shipped materials, in the order in which they are offered: for whoever pins no set, such as a template's page. A
 * member reads its own from the set that it pins.
 */
export const MATERIALS: readonly Material[] = [en10025, en10210, astm, en338, en14080, nds].flatMap((set) =>
  materialsOf(set as MaterialSet),
);

const isNamed = (id: string) => {
  const wanted = id.trim().toLowerCase();
  return (material: Material) => material.id === wanted;
};

/** A material by its id, however typed. */
export const materialIn = (materials: readonly Material[], id: string): Material | undefined =>
  materials.find(isNamed(id));

export const materialFor = (id: string): Material | undefined => materialIn(MATERIALS, id);

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
