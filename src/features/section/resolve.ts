import type { ElasticSection } from '@/engine/check';
import { STANDARD_GRAVITY } from '@/engine/quantity';
import {
  depthOf,
  elasticStrength,
  governingThickness,
  type Material,
  type SectionDimensions,
  sectionProperties,
} from '@/engine/section';

/** What a section row must say for a beam to be made of it: supplied values, and dimensions for the rest. */
export type SectionValues = {
  readonly designation: string;
  readonly dimensions: SectionDimensions;
  readonly massKgM: number;
  readonly iMajorCm4: number;
  readonly wElCm3: number;
};

/** A section of a material, in SI: N·m², N/m, m. */
export type ResolvedSection = {
  readonly designation: string;
  readonly ei: number;
  readonly selfWeight: number;
  readonly depth: number;
  readonly elastic: ElasticSection;
};

export type SectionResolution =
  | { readonly ok: true; readonly section: ResolvedSection }
  | { readonly ok: false; readonly message: string };

const CM = 0.01;

/**
 * Stiffness, weight and strength of a section of a material. Timber weighs its area times the material's mean density,
 * since a table's mass is of one density; steel as its table says. Refused where the material has no strength for the
 * thickness.
 */
export function resolveSection(values: SectionValues, material: Material): SectionResolution {
  const { designation, dimensions } = values;
  const thickness = governingThickness(dimensions);
  const strength = elasticStrength(material, thickness);
  if (!strength)
    return {
      ok: false,
      message: `${material.name} has no strength for a thickness of ${(thickness * 1000).toFixed(1)} mm. Choose another material or section.`,
    };
  const properties = sectionProperties(dimensions);
  const mass = material.kind === 'steel' ? values.massKgM : properties.area * material.density;
  return {
    ok: true,
    section: {
      designation,
      ei: material.e * values.iMajorCm4 * CM ** 4,
      selfWeight: mass * STANDARD_GRAVITY,
      depth: depthOf(dimensions),
      elastic: {
        designation,
        elasticModulus: values.wElCm3 * CM ** 3,
        shearAreaAtAxis: (properties.iMajor * properties.webThickness) / properties.firstMoment,
        bendingStrength: strength.bending,
        shearStrength: strength.shear,
      },
    },
  };
}
