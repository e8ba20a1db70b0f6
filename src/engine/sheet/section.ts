import type { Figures } from './figures';
import type { SheetBlock, SheetInput, SheetRow } from './types';

/** Columns of a section's row by the property that they give. */
const COLUMN = { modulus: 'w_el_cm3', second: 'i_major_cm4', mass: 'mass_kg_m' } as const;

/** Every property that the figures above come from: supplied by the table, or computed. */
export function sectionBlocks({ section, result, ownWeight }: SheetInput, figures: Figures): SheetBlock[] {
  if (!section || !result.section) {
    const ei = figures.whole(result.ei, 'bending_stiffness');
    return [
      { kind: 'text', text: `No section is chosen. Deflections are for the template’s usual EI, ${ei}.` },
    ];
  }
  const { material, computed, table, edition, designation, cautions } = section;
  const { selfWeight, depth, elastic } = result.section;
  const supplied = (column: string): string =>
    computed.includes(column) ? 'computed from the dimensions' : `table, edition ${edition}`;
  const row = (
    name: string,
    tex: string,
    si: number,
    purpose: Parameters<Figures['value']>[1],
    from: string,
  ): SheetRow => ({
    cells: [name, { tex }, figures.value(si, purpose), figures.unit(purpose), from],
  });
  const rows = [
    row('Depth', 'h', depth, 'section_size', 'table, dimensions'),
    row('Second moment, major axis', 'I', result.ei / material.e, 'second_moment', supplied(COLUMN.second)),
    row(
      'Elastic modulus, major axis',
      'W_{el}',
      elastic.elasticModulus,
      'section_modulus',
      supplied(COLUMN.modulus),
    ),
    row('Area in shear at the axis', 'It/Q', elastic.shearAreaAtAxis, 'area', 'computed from the dimensions'),
    row('Modulus of elasticity', 'E', material.e, 'modulus', material.source),
    row('Strength in bending', 'f', elastic.bendingStrength, 'stress', material.source),
    row('Strength in shear', 'f_v', elastic.shearStrength, 'stress', material.source),
    ...(ownWeight.acts
      ? [row('Own weight', 'w_{\\text{self}}', selfWeight, 'line_load', supplied(COLUMN.mass))]
      : []),
  ];
  return [
    {
      kind: 'text',
      source: `edition ${edition}`,
      text: `${designation}, ${material.name}, from ${table}, edition ${edition}.`,
    },
    {
      kind: 'table',
      name: 'Section properties used',
      columns: [
        { title: 'Property' },
        { title: 'Symbol' },
        { title: 'Value', figures: true },
        { title: 'Unit' },
        { title: 'From' },
      ],
      rows,
    },
    ...cautions.map((text): SheetBlock => ({ kind: 'text', tone: 'warning', text })),
  ];
}
