import type { Material, SectionShape } from '@/engine/section';
import type { MaterialChoice } from '@/features/material/choice';
import { resolveSection, type SectionValues } from '@/features/section/resolve';
import type { RowOrigin } from '@/features/section/section';
import type { PickedSection } from './page';

/** Whether such sections are made of such a material: rectangles of timber, all others of steel. */
export const isMadeOf = (
  { dimensions }: Pick<SectionValues, 'dimensions'>,
  { kind }: Pick<Material, 'kind'>,
): boolean => (kind !== 'steel') === (dimensions.shape === 'rectangle');

const USUAL: Readonly<Record<string, string>> = {
  'american-wide-flange': 'a992',
  'american-tees': 'a992',
  'american-tapered-i': 'a36',
  'american-tapered-channels': 'a36',
  'american-angles': 'a36',
  'dimension-lumber': 'dfl-no2',
  'glulam-inch': '24f-v4',
  glulam: 'gl24h',
};

const HOLLOW: readonly SectionShape[] = ['rhs', 'shs', 'chs'];

/** What a section of a table is usually made of. */
export function usualMaterial({ dimensions }: Pick<SectionValues, 'dimensions'>, table: string): string {
  const { shape } = dimensions;
  if (shape === 'rectangle') return USUAL[table] ?? 'c24';
  return USUAL[table] ?? (HOLLOW.includes(shape) ? 's355h' : 's355');
}

export type PickOutcome =
  | { readonly ok: true; readonly section: PickedSection }
  | { readonly ok: false; readonly message: string };

/** A section of a table, made of a material. */
export function pickSection(
  table: string,
  values: SectionValues,
  { key, material }: Pick<MaterialChoice, 'key' | 'material'>,
  origin?: RowOrigin | undefined,
): PickOutcome {
  const resolution = resolveSection(values, material);
  if (!resolution.ok) return resolution;
  const { designation, ei, selfWeight, depth } = resolution.section;
  const resolved = { designation, ei, selfWeight, depth };
  return {
    ok: true,
    section: { table, origin, values, material: key, made: material, resolved },
  };
}
