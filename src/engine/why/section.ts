import { STANDARD_GRAVITY } from '../quantity/index';
import { elasticStrength, governingThickness, type Material, sectionProperties } from '../section/index';
import { cited, constant, formula, leaf, node } from './node';
import { DIMENSIONS_OF } from './section-property';
import type { Measure, Part, SectionProperty, Source, SubjectSection, Trace } from './types';

const CM = 0.01;

/** The columns of a section table that a member uses. */
const COLUMNS = {
  mass_kg_m: { label: 'Mass', symbol: 'm', measure: 'mass_per_length' },
  i_major_cm4: { label: 'Second moment of area, major axis', symbol: 'I', measure: 'second_moment' },
  w_el_cm3: { label: 'Elastic modulus, major axis', symbol: 'W_{el}', measure: 'section_modulus' },
} as const satisfies Record<string, { label: string; symbol: string; measure: Measure }>;

const LENGTHS: Readonly<Record<string, { label: string; symbol: string }>> = {
  h: { label: 'Depth', symbol: 'h' },
  b: { label: 'Width', symbol: 'b' },
  d: { label: 'Diameter', symbol: 'd' },
  t: { label: 'Wall', symbol: 't' },
  tw: { label: 'Web', symbol: 't_w' },
  tf: { label: 'Flange', symbol: 't_f' },
  r: { label: 'Root radius', symbol: 'r' },
  toe: { label: 'Toe radius', symbol: 'r_2' },
  slope: { label: 'Slope of the flanges', symbol: 's' },
  at: { label: 'Where the flange is measured, from its tip', symbol: 'u' },
  ro: { label: 'Outer corner radius', symbol: 'r_o' },
  ri: { label: 'Inner corner radius', symbol: 'r_i' },
};

/** What a section of a table and its material give, each down to the row and the standard. */
export class SectionTraces {
  constructor(private readonly section: SubjectSection) {}

  /** EI = E·I */
  stiffness(): Trace {
    const [e, i] = [this.modulus(), this.column('i_major_cm4', this.section.iMajorCm4 * CM ** 4)];
    return formula(
      {
        label: 'Bending stiffness',
        symbol: 'EI',
        value: e.value * i.value,
        measure: 'bending_stiffness',
      },
      { method: 'definition', tree: ['*', 'E', 'I'] },
      () => parts({ E: e, I: i }),
    );
  }

  /** The section's own weight, N/m: its mass, or its area times the mean density of timber, times g. */
  weight(): Trace {
    const { material } = this.section;
    const g = constant(
      { label: 'Standard gravity', symbol: 'g', value: STANDARD_GRAVITY, measure: 'acceleration' },
      '3rd General Conference on Weights and Measures, 1901',
    );
    const head = {
      label: 'Own weight of the section',
      symbol: 'w_{\\text{self}}',
      measure: 'line_load',
    } as const;
    if (material.kind === 'steel') {
      const m = this.column('mass_kg_m', this.section.massKgM);
      return formula(
        { ...head, value: m.value * g.value },
        { method: 'definition', tree: ['*', 'm', 'g'] },
        () => parts({ m, g }),
      );
    }
    const area = this.property('area', 'Area', 'A', 'area');
    const density = this.ofMaterial('Mean density', '\\rho', material.density, 'density');
    return formula(
      { ...head, value: area.value * density.value * g.value },
      { method: 'definition', tree: ['*', ['*', '\\rho', 'A'], 'g'] },
      () => parts({ '\\rho': density, A: area, g }),
    );
  }

  elasticModulus(): Trace {
    return this.column('w_el_cm3', this.section.wElCm3 * CM ** 3);
  }

  /** I t/Q where the shear stress is greatest: at the major axis. */
  shearAreaAtAxis(): Trace {
    const i = this.property('iMajor', 'Second moment of area, from the dimensions', 'I', 'second_moment');
    const t = this.property('webThickness', 'Thickness at the axis', 't', 'section_size');
    const q = this.property('firstMoment', 'First moment of half the section', 'Q', 'section_modulus');
    return formula(
      {
        label: 'Area that the shear is divided by',
        symbol: 'A_{\\tau}',
        value: (i.value * t.value) / q.value,
        measure: 'area',
      },
      { method: 'definition', tree: ['/', ['*', 'I', 't'], 'Q'] },
      () => parts({ I: i, t, Q: q }),
    );
  }

  /** Of steel by the thickness of its thickest part. */
  bendingStrength(): Trace {
    const { material, dimensions } = this.section;
    if (material.kind !== 'steel') {
      const [label, symbol] = TIMBER[material.kind].bending;
      return this.ofMaterial(label, symbol, this.strength().bending, 'stress');
    }
    const thickness = governingThickness(dimensions);
    const band = material.strength.find(({ upTo }) => thickness <= upTo);
    const limit = band && Number.isFinite(band.upTo) ? ` up to ${Math.round(band.upTo * 1000)} mm` : '';
    const label = `Yield strength${limit}`;
    return this.ofMaterial(label, 'f_y', this.strength().bending, 'stress');
  }

  shearStrength(): Trace {
    const { material } = this.section;
    const value = this.strength().shear;
    if (material.kind !== 'steel') {
      const [label, symbol] = TIMBER[material.kind].shear;
      return this.ofMaterial(label, symbol, value, 'stress');
    }
    return formula(
      { label: 'Yield strength in shear', symbol: 'f_{y,v}', value, measure: 'stress' },
      {
        method: 'definition',
        tree: ['/', 'f_y', ['sqrt', 3]],
        sources: [cited('von Mises’ criterion')],
      },
      () => parts({ f_y: this.bendingStrength() }),
    );
  }

  /** Fails with RangeError for a thickness that the material has no strength for. */
  private strength(): { bending: number; shear: number } {
    const { material, dimensions } = this.section;
    const found = elasticStrength(material, governingThickness(dimensions));
    if (!found) throw new RangeError(`${material.name} has no strength for this thickness`);
    return found;
  }

  private modulus(): Trace {
    return this.ofMaterial('Modulus of elasticity', 'E', this.section.material.e, 'modulus');
  }

  private ofMaterial(label: string, symbol: string, value: number, measure: Measure): Trace {
    const { material } = this.section;
    return leaf(
      { label: `${label} of ${material.name}`, symbol, value, measure },
      { kind: 'material', material: material.name, source: sourceOf(material) },
    );
  }

  private column(column: keyof typeof COLUMNS, value: number): Trace {
    const { designation, table, tableName, edition, computed } = this.section;
    const place = { designation, table, tableName, edition };
    return leaf(
      { ...COLUMNS[column], value },
      { kind: 'row', column, isComputed: computed.includes(column), ...place },
    );
  }

  private property(
    property: SectionProperty['property'],
    label: string,
    symbol: string,
    measure: Measure,
  ): Trace {
    const { dimensions } = this.section;
    const value = sectionProperties(dimensions)[property];
    const { shape } = dimensions;
    if (shape === 'outline' || shape === 'values') {
      const { designation, table, tableName, edition } = this.section;
      return leaf(
        { label, symbol, value, measure },
        {
          kind: 'row',
          column: shape,
          isComputed: shape === 'outline',
          designation,
          table,
          tableName,
          edition,
        },
      );
    }
    return node({ label, symbol, value, measure }, { kind: 'section', shape, property }, () =>
      DIMENSIONS_OF[shape].map((name) => ({ name, trace: this.length(name) })),
    );
  }

  private length(name: string): Trace {
    const { designation, table, tableName, edition, dimensions } = this.section;
    const place = { designation, table, tableName, edition };
    const { label, symbol } = LENGTHS[name]!;
    return leaf(
      {
        label,
        symbol,
        value: Number(Object(dimensions)[name]),
        measure: name === 'slope' ? 'ratio' : 'section_size',
      },
      { kind: 'row', column: name, isComputed: false, ...place },
    );
  }
}

const TIMBER = {
  timber_en: {
    bending: ['Characteristic bending strength', 'f_{m,k}'],
    shear: ['Characteristic shear strength', 'f_{v,k}'],
  },
  timber_nds: {
    bending: ['Reference bending design value', 'F_b'],
    shear: ['Reference shear design value', 'F_v'],
  },
} as const;

const sourceOf = ({ source: { standard, edition, clause, fromMemory } }: Material): Source => ({
  text: [standard, edition, clause].filter((part) => part !== '').join(', '),
  fromMemory,
});

const parts = (traces: Readonly<Record<string, Trace>>): Part[] =>
  Object.entries(traces).map(([name, trace]) => ({ name, trace }));
