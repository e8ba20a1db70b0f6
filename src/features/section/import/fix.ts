import type { Edit, Fix, ImportState, Mapping, MappingEdit } from './contract';

const MAPPING_EDITS: ReadonlySet<string> = new Set<MappingEdit['kind']>([
  'set_column_unit',
  'swap_columns',
  'set_decimal_mark',
  'set_encoding',
  'set_density',
  'set_tube_standard',
  'leave_out_column',
]);

const isMappingEdit = (edit: Edit | MappingEdit): edit is MappingEdit => MAPPING_EDITS.has(edit.kind);

function applyToMapping(mapping: Mapping, edit: MappingEdit): Mapping {
  switch (edit.kind) {
    case 'set_decimal_mark':
      return { ...mapping, decimalMark: edit.value };
    case 'set_encoding':
      return { ...mapping, encoding: edit.value };
    case 'set_density':
      return { ...mapping, density: edit.value };
    case 'set_tube_standard':
      return { ...mapping, tubeStandard: edit.value };
    case 'set_column_unit': {
      const { unit, factor } = edit;
      const columns = mapping.columns.map((column) =>
        column.index === edit.column ? { ...column, unit, factor } : column,
      );
      return { ...mapping, columns };
    }
    case 'leave_out_column': {
      const columns = mapping.columns.map((column) =>
        column.index === edit.column ? { ...column, field: null } : column,
      );
      return { ...mapping, columns };
    }
    case 'swap_columns': {
      const [one, other] = edit.columns;
      const fieldOf = (index: number) =>
        mapping.columns.find((column) => column.index === index)?.field ?? null;
      const columns = mapping.columns.map((column) => {
        if (column.index === one) return { ...column, field: fieldOf(other) };
        return column.index === other ? { ...column, field: fieldOf(one) } : column;
      });
      return { ...mapping, columns };
    }
  }
}

const same = (a: Edit, b: Edit) => JSON.stringify(a) === JSON.stringify(b);
/** A cell typed anew replaces what was typed before. */
const replaces = (edit: Edit, before: Edit) =>
  edit.kind === 'set_cell' &&
  before.kind === 'set_cell' &&
  edit.line === before.line &&
  edit.column === before.column;

/** Mapping and edits with a fix applied. The bytes of the file are never changed. */
export function applyFix(
  { mapping, edits }: ImportState,
  { edit }: Pick<Fix, 'edit'> & Partial<Fix>,
): ImportState {
  if (isMappingEdit(edit)) return { mapping: applyToMapping(mapping, edit), edits };
  if (edits.some((before) => same(before, edit))) return { mapping, edits };
  return { mapping, edits: [...edits.filter((before) => !replaces(edit, before)), edit] };
}
