import type { DimensionName } from '@/engine/quantity';
import type { MaterialEntry } from '@/engine/section';

/** Symbols of a set's values, as HTML. */
export const LABELS: Readonly<Record<string, string>> = {
  e: '<i>E</i>',
  g: '<i>G</i>',
  density: '<i>ρ</i><sub>mean</sub>',
  expansion: '<i>α</i>',
  fm: '<i>f</i><sub>m,k</sub>',
  ft0: '<i>f</i><sub>t,0,k</sub>',
  fc0: '<i>f</i><sub>c,0,k</sub>',
  fc90: '<i>f</i><sub>c,90,k</sub>',
  fv: '<i>f</i><sub>v,k</sub>',
  e05: '<i>E</i><sub>0,05</sub>',
  density_k: '<i>ρ</i><sub>k</sub>',
  fb: '<i>F</i><sub>b</sub>',
  fb_reversed: '<i>F</i><sub>b</sub>, reversed',
  ft: '<i>F</i><sub>t</sub>',
  fv_nds: '<i>F</i><sub>v</sub>',
  fc_perp: '<i>F</i><sub>c⊥</sub>',
  fc: '<i>F</i><sub>c</sub>',
  e_min: '<i>E</i><sub>min</sub>',
};

interface Value {
  readonly key: string;
  readonly text: string;
  readonly dimension: DimensionName;
}

/** The strengths of a timber in the order of its table; of steel they stand by thickness. */
export function valuesOf(entry: MaterialEntry): Value[] {
  const stress = (key: string, text: string): Value => ({ key, text, dimension: 'stress' });
  switch (entry.kind) {
    case 'steel':
      return [];
    case 'timber_en':
      return [
        ...(['fm', 'ft0', 'fc0', 'fc90', 'fv'] as const).map((key) => stress(key, entry[key])),
        { key: 'e05', text: entry.e05, dimension: 'modulus' },
        { key: 'density_k', text: entry.density_k, dimension: 'density' },
      ];
    case 'timber_nds':
      return [
        stress('fb', entry.fb),
        stress('fb_reversed', entry.fb_reversed ?? entry.fb),
        stress('ft', entry.ft),
        stress('fv_nds', entry.fv),
        stress('fc_perp', entry.fc_perp),
        stress('fc', entry.fc),
        { key: 'e_min', text: entry.e_min, dimension: 'modulus' },
      ];
  }
}
