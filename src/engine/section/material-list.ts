import { type DimensionName, readQuantity } from '@/engine/quantity';
import type { Material, MaterialCommon, StrengthBand } from './material-types';

/** The shipped list breaks its own rules: our mistake. */
export class MaterialListFault extends Error {
  constructor(id: string, field: string, reason: string) {
    super(`material ${id}, ${field}: ${reason}`);
    this.name = 'MaterialListFault';
  }
}

type Fields = Readonly<Record<string, unknown>>;
const isFields = (value: unknown): value is Fields => typeof value === 'object' && value !== null;

/** Typed access to one entry; every failure names the material and the field. */
function reader(fields: Fields, id: string) {
  const text = (field: string): string => {
    const value = fields[field];
    if (typeof value !== 'string' || value === '') throw new MaterialListFault(id, field, 'is no text');
    return value;
  };
  const quantity = (field: string, name: DimensionName): number => {
    const reading = readQuantity(text(field), name);
    if (!reading.ok) throw new MaterialListFault(id, field, reading.message);
    return reading.value;
  };
  const flag = (field: string): boolean => fields[field] === true;
  const choice = <T extends string>(field: string, choices: readonly T[]): T => {
    const value = text(field);
    const found = choices.find((one) => one === value);
    if (found === undefined) throw new MaterialListFault(id, field, `is none of ${choices.join(', ')}`);
    return found;
  };
  return { text, quantity, flag, choice, stress: (field: string) => quantity(field, 'stress') };
}

function readBands(fields: Fields, id: string): StrengthBand[] {
  const bands = fields['strength'];
  if (!Array.isArray(bands) || bands.length === 0) throw new MaterialListFault(id, 'strength', 'is no list');
  return bands.filter(isFields).map((band) => {
    const { quantity, stress } = reader(band, id);
    const upTo = 'up_to' in band ? quantity('up_to', 'length') : Number.POSITIVE_INFINITY;
    return { upTo, fy: stress('fy'), fu: stress('fu') };
  });
}

function readMaterial(fields: Fields): Material {
  const id = String(fields['id'] ?? '(no id)');
  const { text, quantity, stress, flag, choice } = reader(fields, id);
  const common: MaterialCommon = {
    id: text('id'),
    name: text('name'),
    source: {
      standard: text('standard'),
      edition: text('edition'),
      clause: text('clause'),
      fromMemory: flag('from_memory'),
      note: text('note'),
    },
    e: quantity('e', 'modulus'),
    g: quantity('g', 'modulus'),
    density: quantity('density', 'density'),
    expansion: quantity('expansion', 'expansion'),
  };
  switch (choice('kind', ['steel', 'timber_en', 'timber_nds'])) {
    case 'steel':
      return { ...common, kind: 'steel', strength: readBands(fields, id) };
    case 'timber_en':
      return {
        ...common,
        kind: 'timber_en',
        product: choice('product', ['solid', 'glulam']),
        fm: stress('fm'),
        ft0: stress('ft0'),
        fc0: stress('fc0'),
        fc90: stress('fc90'),
        fv: stress('fv'),
        e05: quantity('e05', 'modulus'),
        densityK: quantity('density_k', 'density'),
      };
    case 'timber_nds':
      return {
        ...common,
        kind: 'timber_nds',
        product: choice('product', ['sawn', 'glulam']),
        fb: stress('fb'),
        fbReversed: 'fb_reversed' in fields ? stress('fb_reversed') : stress('fb'),
        ft: stress('ft'),
        fv: stress('fv'),
        fcPerp: stress('fc_perp'),
        fc: stress('fc'),
        eMin: quantity('e_min', 'modulus'),
        sizeFactor: flag('size_factor'),
      };
  }
}

/** Reads a list of materials, its values written as quantity strings. Throws MaterialListFault. */
export function readMaterials(list: unknown): Material[] {
  const entries = isFields(list) ? list['materials'] : undefined;
  if (!Array.isArray(entries)) throw new MaterialListFault('(list)', 'materials', 'is no list');
  return entries.filter(isFields).map(readMaterial);
}
