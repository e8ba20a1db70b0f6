import type { SectionValues } from './resolve';
import { type SectionItem, sectionDimensionsSchema } from './section';

/** What a beam is made of, out of a section as the endpoint gives it. */
export const sectionValuesOf = (item: SectionItem): SectionValues => ({
  designation: item.designation,
  dimensions: sectionDimensionsSchema.parse({
    shape: item.shape,
    ...Object.fromEntries(Object.entries(item.dimensions_mm).map(([name, mm]) => [name, mm / 1000])),
  }),
  massKgM: item.mass_kg_m,
  iMajorCm4: item.i_major_cm4,
  wElCm3: item.w_el_cm3,
});
