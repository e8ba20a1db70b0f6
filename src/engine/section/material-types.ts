/** Where the values come from. `fromMemory`: not yet compared with the printed standard; say so wherever they are used. */
type MaterialSource = {
  standard: string;
  edition: string;
  clause: string;
  fromMemory: boolean;
  note: string;
};

export type MaterialCommon = {
  id: string;
  name: string;
  source: MaterialSource;
  /** Mean moduli, Pa, and mean density for self-weight, kg/m³. */
  e: number;
  g: number;
  density: number;
  /** Coefficient of thermal expansion, 1/K. */
  expansion: number;
};

/** Strength of steel up to a thickness, m; without limit where the standard has none. */
type StrengthBand = { upTo: number; fy: number; fu: number };
type Steel = MaterialCommon & { kind: 'steel'; strength: readonly StrengthBand[] };

/** Characteristic strengths of a European strength class, Pa. */
type EuropeanTimber = MaterialCommon & {
  kind: 'timber_en';
  product: 'solid' | 'glulam';
  fm: number;
  ft0: number;
  fc0: number;
  fc90: number;
  fv: number;
  e05: number;
  densityK: number;
};

/** Reference design values of the NDS, Pa. `fbReversed`: tension on the weaker side of a glulam. */
type AmericanTimber = MaterialCommon & {
  kind: 'timber_nds';
  product: 'sawn' | 'glulam';
  fb: number;
  fbReversed: number;
  ft: number;
  fv: number;
  fcPerp: number;
  fc: number;
  eMin: number;
  /** Whether the size factor C_F applies to fb. */
  sizeFactor: boolean;
};

export type Material = Steel | EuropeanTimber | AmericanTimber;
