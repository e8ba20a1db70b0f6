/** What the form of a material set shows of each kind of material, and does to its rows: pure. */
import { type DimensionName, readQuantity } from '@/engine/quantity';
import type { MaterialEntry } from '@/engine/section';
import { freshId } from '@/features/author/add';
import { type Edit, listAt, type Pointer, textAt, valueAt } from '@/features/author/edit';
import { sameValue } from '@/features/author/merge';
import type { Written } from '@/features/review/draft';
import { type Column, unitOf } from './cells';

export const LIST = '/materials';

export const KINDS = ['steel', 'timber_en', 'timber_nds'] as const satisfies MaterialEntry['kind'][];
export type Kind = (typeof KINDS)[number];

/** A value of a material: its letters and what it is in words. */
export interface Value {
  readonly key: string;
  readonly letter: string;
  readonly sub: string;
  readonly words: string;
  readonly dimension: DimensionName;
  readonly isOptional?: boolean;
  /** What an optional one is where it is empty. */
  readonly placeholder?: string;
}

const value = (key: string, letter: string, sub: string, words: string, dimension: DimensionName): Value => ({
  key,
  letter,
  sub,
  words,
  dimension,
});

const E = value('e', 'E', '', 'Modulus of elasticity', 'modulus');
const G = value('g', 'G', '', 'Shear modulus', 'modulus');
const DENSITY = value('density', 'ρ', 'mean', 'Mean density', 'density');
export const EXPANSION = value('expansion', 'α', '', 'Thermal expansion', 'expansion');

/** The values of each kind in the order of its table; a timber's expansion stands with the rest of its fields. */
export const VALUES: Readonly<Record<Kind, readonly Value[]>> = {
  steel: [E, G, DENSITY, EXPANSION],
  timber_en: [
    value('fm', 'f', 'm,k', 'Bending', 'stress'),
    value('ft0', 'f', 't,0,k', 'Tension along the grain', 'stress'),
    value('fc0', 'f', 'c,0,k', 'Compression along the grain', 'stress'),
    value('fc90', 'f', 'c,90,k', 'Compression across the grain', 'stress'),
    value('fv', 'f', 'v,k', 'Shear', 'stress'),
    E,
    value('e05', 'E', '0,05', 'Modulus, 5 % fractile', 'modulus'),
    G,
    value('density_k', 'ρ', 'k', 'Characteristic density', 'density'),
    DENSITY,
  ],
  timber_nds: [
    value('fb', 'F', 'b', 'Bending', 'stress'),
    {
      ...value('fb_reversed', 'F', 'b−', 'Bending, reversed', 'stress'),
      isOptional: true,
      placeholder: 'as Fb',
    },
    value('ft', 'F', 't', 'Tension', 'stress'),
    value('fv', 'F', 'v', 'Shear', 'stress'),
    value('fc_perp', 'F', 'c⊥', 'Compression across the grain', 'stress'),
    value('fc', 'F', 'c', 'Compression along the grain', 'stress'),
    E,
    value('e_min', 'E', 'min', 'Modulus of stability', 'modulus'),
    G,
    DENSITY,
  ],
};

/** Strength of steel in one thickness step. */
export const BAND_VALUES: readonly Value[] = [
  { ...value('up_to', 't', '', 'Thickness up to', 'length'), isOptional: true, placeholder: 'any' },
  value('fy', 'f', 'y', 'Yield strength', 'stress'),
  value('fu', 'f', 'u', 'Tensile strength', 'stress'),
];

type Units = Readonly<Partial<Record<DimensionName, string>>>;

const EUROPEAN: Units = {
  stress: 'N/mm2',
  modulus: 'N/mm2',
  density: 'kg/m3',
  expansion: '1/K',
  length: 'mm',
};
const AMERICAN: Units = { stress: 'psi', modulus: 'psi', density: 'lb/ft3', expansion: '1/F', length: 'in' };

/** The units in which a kind's values are usually printed. */
export const usualUnit = (kind: Kind, dimension: DimensionName): string =>
  (kind === 'timber_nds' ? AMERICAN : EUROPEAN)[dimension] ?? '';

/** The rows of one kind, wherever they stand in the list. */
export const rowsOf = (document: Written, kind: Kind): Pointer[] =>
  listAt(document, LIST).flatMap((one, index) => (textAt(one, '/kind') === kind ? [`${LIST}/${index}`] : []));

/** The thickness steps of every steel. */
export const bandsOf = (document: Written): Pointer[] =>
  rowsOf(document, 'steel').flatMap((row) =>
    listAt(document, `${row}/strength`).map((_, index) => `${row}/strength/${index}`),
  );

/** A value's column, in the unit that its rows are mostly in. */
export function columnOf(document: Written, rows: readonly Pointer[], of: Value, usual: string): Column {
  const { key, letter, sub, words, dimension, placeholder, isOptional = false } = of;
  const unit = unitOf(
    rows.map((row) => valueAt(document, `${row}/${key}`)),
    usual,
  );
  const label = `${words} ${letter}${sub && `_${sub}`}`;
  return { key, label, isOptional, placeholder, kind: 'quantity', dimension, unit };
}

/** What a new material has in common with the last of its kind: where it is printed, and what does not go by its class. */
const PRINTED = ['product', 'standard', 'edition', 'clause', 'note', 'size_factor', 'expansion'];
const SHARED: Readonly<Record<Kind, readonly string[]>> = {
  steel: [...PRINTED, 'e', 'g', 'density'],
  timber_en: PRINTED,
  timber_nds: PRINTED,
};

const FIRST: Readonly<Record<Kind, object>> = {
  steel: { strength: [{ fy: '', fu: '' }] },
  timber_en: { product: 'solid' },
  timber_nds: { product: 'sawn', size_factor: true },
};

export function newMaterial(document: Written, kind: Kind): object {
  const last = rowsOf(document, kind).at(-1);
  const shared = SHARED[kind].flatMap((key) => {
    const common = last === undefined ? undefined : valueAt(document, `${last}/${key}`);
    return common === undefined ? [] : [[key, common] as const];
  });
  const empty = { standard: '', edition: '', clause: '', note: '', e: '', g: '', density: '', expansion: '' };
  return {
    id: freshId(document, LIST, kind === 'steel' ? 'steel' : 'class'),
    name: '',
    kind,
    ...empty,
    ...FIRST[kind],
    ...Object.fromEntries(shared),
    from_memory: true,
  };
}

/** A further thickness step of a steel behind its last, with the strengths of that. */
export function newBand(document: Written, material: Pointer): Edit[] {
  const bands = listAt(document, `${material}/strength`);
  const last = bands.at(-1);
  const value = { fy: textAt(last, '/fy'), fu: textAt(last, '/fu') };
  return [{ do: 'insert', at: `${material}/strength/-`, value }];
}

/** The step's limit in m; a step without one goes to any thickness. */
function limitOf(band: unknown): number {
  const reading = readQuantity(textAt(band, '/up_to'), 'length');
  return reading.ok ? reading.value : Number.POSITIVE_INFINITY;
}

/** Puts the thickness steps of a steel in order, thin first; none where they are. */
export function orderBands(document: Written, material: Pointer): Edit[] {
  const at = `${material}/strength`;
  const bands = listAt(document, at);
  const ordered = bands.toSorted((a, b) => limitOf(a) - limitOf(b) || 0);
  return sameValue(bands, ordered) ? [] : [{ do: 'set', at, value: ordered }];
}

/** Moves a material before or after the next of its kind; none where there is no other that way. */
export function moveAmongKind(document: Written, at: Pointer, kind: Kind, by: 1 | -1): number | null {
  const rows = rowsOf(document, kind);
  const next = rows[rows.indexOf(at) + by];
  return next === undefined ? null : Number(next.slice(LIST.length + 1));
}
