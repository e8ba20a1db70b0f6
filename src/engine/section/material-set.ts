import { type DimensionName, readQuantity } from '../quantity/index';
import type { Material, MaterialCommon } from './material-types';

type Entry = {
  /** By which members name it: "s355". Unique in the set. */
  id: string;
  name: string;
  standard: string;
  edition: string;
  clause: string;
  from_memory: boolean;
  note: string;
  e: string;
  g: string;
  density: string;
  expansion: string;
};

type SteelEntry = Entry & {
  kind: 'steel';
  strength: { up_to?: string | undefined; fy: string; fu: string }[];
};

type EuropeanTimberEntry = Entry & { kind: 'timber_en'; product: 'solid' | 'glulam' } & Record<
    'fm' | 'ft0' | 'fc0' | 'fc90' | 'fv' | 'e05' | 'density_k',
    string
  >;

type AmericanTimberEntry = Entry & {
  kind: 'timber_nds';
  product: 'sawn' | 'glulam';
  fb_reversed?: string | undefined;
  size_factor: boolean;
} & Record<'fb' | 'ft' | 'fv' | 'fc_perp' | 'fc' | 'e_min', string>;

/** A material as it is written: every value a quantity string, as its standard prints it. */
export type MaterialEntry = SteelEntry | EuropeanTimberEntry | AmericanTimberEntry;

/** The materials of a standard and edition, as the practice's document of them says. */
export type MaterialSet = {
  schema_version: 1;
  slug: string;
  reference: string;
  name: string;
  summary: string;
  materials: MaterialEntry[];
};

/** A quantity of a set that was read by its schema: SI. Throws RangeError where it was not. */
function si(text: string, dimension: DimensionName): number {
  const reading = readQuantity(text, dimension);
  if (!reading.ok) throw new RangeError(`“${text}” is no ${dimension}: ${reading.message}`);
  return reading.value;
}

/** The materials of a set in SI, in their order. */
export const materialsOf = ({ materials }: Pick<MaterialSet, 'materials'>): Material[] =>
  materials.map(toMaterial);

function toMaterial(given: MaterialEntry): Material {
  const pascals = (text: string) => si(text, 'stress');
  const common = commonOf(given);
  switch (given.kind) {
    case 'steel':
      return {
        ...common,
        kind: 'steel',
        strength: given.strength.map(({ up_to: limit, fy, fu }) => ({
          upTo: limit === undefined ? Number.POSITIVE_INFINITY : si(limit, 'length'),
          fy: pascals(fy),
          fu: pascals(fu),
        })),
      };
    case 'timber_en':
      return {
        ...common,
        kind: 'timber_en',
        product: given.product,
        fm: pascals(given.fm),
        ft0: pascals(given.ft0),
        fc0: pascals(given.fc0),
        fc90: pascals(given.fc90),
        fv: pascals(given.fv),
        e05: si(given.e05, 'modulus'),
        densityK: si(given.density_k, 'density'),
      };
    case 'timber_nds':
      return {
        ...common,
        kind: 'timber_nds',
        product: given.product,
        fb: pascals(given.fb),
        fbReversed: pascals(given.fb_reversed ?? given.fb),
        ft: pascals(given.ft),
        fv: pascals(given.fv),
        fcPerp: pascals(given.fc_perp),
        fc: pascals(given.fc),
        eMin: si(given.e_min, 'modulus'),
        sizeFactor: given.size_factor,
      };
  }
}

const commonOf = (given: MaterialEntry): MaterialCommon => ({
  id: given.id,
  name: given.name,
  source: {
    standard: given.standard,
    edition: given.edition,
    clause: given.clause,
    fromMemory: given.from_memory,
    note: given.note,
  },
  e: si(given.e, 'modulus'),
  g: si(given.g, 'modulus'),
  density: si(given.density, 'density'),
  expansion: si(given.expansion, 'expansion'),
});
