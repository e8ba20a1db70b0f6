import { type DimensionName, readQuantity, type UnitSystemName } from '@/engine/quantity';
import {
  asciiDesignation,
  type Corner,
  compound,
  depthOf,
  designationKey,
  dimensionFaults,
  type Placed,
  type SectionDimensions,
  sectionProperties,
  sideBySide,
  solidOutline,
  widthOf,
} from '@/engine/section';
import type { Fault } from '@/lib/app-error';
import type { SectionRow } from './section';

/** How a section that no table has is made. */
export const BUILDS = {
  side: 'Beams side by side',
  plated: 'A beam with plates on its flanges',
  outline: 'Any outline, by its corners',
  values: 'By values that are known',
} as const;
export type Build = keyof typeof BUILDS;
export const isBuild = (text: string): text is Build => Object.hasOwn(BUILDS, text);
/** Of these the beam of a table is asked for. */
export const ofBeam = (build: Build): boolean => build === 'side' || build === 'plated';

/** A field of the form as it was typed; "" where nothing was. */
export type Typed = (name: string) => string;

export type Built =
  | { readonly ok: true; readonly dimensions: SectionDimensions }
  | { readonly ok: false; readonly faults: readonly Fault[] };

const MOST_BEAMS = 6;

/** Reads the form, field by field: every fault at once, each by the name of its field. */
class Form {
  readonly faults: Fault[] = [];
  constructor(
    private readonly typed: Typed,
    private readonly system: UnitSystemName,
  ) {}

  refuse(field: string, message: string, code = 'not_allowed'): void {
    this.faults.push({ pointer: `/${field}`, code, message });
  }

  text(field: string): string {
    return this.typed(field).trim();
  }

  /** In SI; NaN with a fault where it cannot be read. `usual` stands where nothing is typed. */
  quantity(
    field: string,
    dimension: DimensionName,
    least: 'more than 0' | '0 or more',
    usual?: number,
  ): number {
    const text = this.text(field);
    if (text === '' && usual !== undefined) return usual;
    const unit = dimension === 'length' ? (this.system === 'us' ? 'in' : 'mm') : undefined;
    const reading = readQuantity(text, dimension, { unit });
    if (!reading.ok) {
      this.refuse(field, reading.message, reading.code);
      return Number.NaN;
    }
    const isEnough = least === '0 or more' ? reading.value >= 0 : reading.value > 0;
    if (!isEnough) this.refuse(field, `Give ${least}.`, 'out_of_range');
    return reading.value;
  }

  size(field: string): number {
    return this.quantity(field, 'length', 'more than 0');
  }

  /** A bare number of the corners, in m. */
  length(number: number): number {
    return number * (this.system === 'us' ? 0.0254 : 0.001);
  }
}

/** The section of a table that a made one starts from. */
interface TableBeam {
  readonly designation: string;
  readonly dimensions: SectionDimensions;
}

/**
 * The section that the form describes. `beam` is the section of a table that it starts from, where it does. Lengths
 * without a unit are in mm, or in inches.
 */
export function build(kind: Build, typed: Typed, beam: TableBeam | null, system: UnitSystemName): Built {
  const form = new Form(typed, system);
  const made = MAKERS[kind](form, beam);
  if (form.faults.length > 0 || made === null) return { ok: false, faults: form.faults };
  const faults = dimensionFaults(made).map(({ message }) => ({
    pointer: kind === 'outline' ? '/corners' : '/build',
    code: 'geometry',
    message: `This section cannot exist: ${message}.`,
  }));
  return faults.length > 0 ? { ok: false, faults } : { ok: true, dimensions: made };
}

type Maker = (form: Form, beam: TableBeam | null) => SectionDimensions | null;

const MAKERS: Readonly<Record<Build, Maker>> = {
  side: makeSideBySide,
  plated: makePlated,
  outline: makeOutline,
  values: makeOfValues,
};

function placeable(form: Form, beam: TableBeam | null): Pick<Placed, 'name' | 'of'> | null {
  if (beam === null) {
    form.refuse('beam', 'Name the beam as its table does: IPE 300, W12x26.', 'empty');
    return null;
  }
  const { designation, dimensions } = beam;
  if (dimensions.shape !== 'values') return { name: designation, of: dimensions };
  form.refuse('beam', 'Only the values of this section are known, not its outline. Choose another.');
  return null;
}

function makeSideBySide(form: Form, given: TableBeam | null) {
  const beam = placeable(form, given);
  const count = Number(form.text('count') || '2');
  const gap = form.quantity('gap', 'length', '0 or more', 0);
  if (!(Number.isInteger(count) && count >= 2 && count <= MOST_BEAMS))
    form.refuse('count', `Give 2 to ${MOST_BEAMS}.`);
  return beam === null || form.faults.length > 0 ? null : sideBySide(beam, count, gap);
}

/** A plate below, a plate above, or both, each in the middle of the beam. */
function makePlated(form: Form, given: TableBeam | null) {
  const beam = placeable(form, given);
  const plates = (['top', 'bottom'] as const).map((side) => {
    const [b, t] = [`${side}_width`, `${side}_thickness`] as const;
    if (form.text(b) === '' && form.text(t) === '') return null;
    return { shape: 'rectangle', b: form.size(b), h: form.size(t) } as const;
  });
  const [top, bottom] = plates;
  if (!top && !bottom)
    form.refuse('top_width', 'Give the width and the thickness of at least one plate.', 'empty');
  if (beam === null || form.faults.length > 0) return null;
  const [under, width] = [bottom?.h ?? 0, widthOf(beam.of)];
  const plate = (of: { shape: 'rectangle'; b: number; h: number }, name: string, y: number): Placed => ({
    name,
    of,
    z: (width - of.b) / 2,
    y,
  });
  return compound([
    ...(bottom ? [plate(bottom, 'Plate below', 0)] : []),
    { ...beam, z: 0, y: under },
    ...(top ? [plate(top, 'Plate on top', under + depthOf(beam.of))] : []),
  ]);
}

const MOST_CORNERS = 200;

function makeOutline(form: Form) {
  const rings = readCorners(form);
  const t = form.size('thickness');
  const isHollow = rings.some(({ isHole }) => isHole);
  const j = form.text('j') === '' ? null : form.quantity('j', 'second_moment', '0 or more');
  if (isHollow && j === null)
    form.refuse('j', 'Give the torsion constant: that of a section with holes is not estimated.', 'empty');
  if (form.faults.length > 0) return null;
  const drawn = rings.map(({ corners, isHole }) => turned(corners, isHole ? -1 : 1));
  const bare = { shape: 'outline', rings: drawn, t, j: j ?? 0, iw: 0 } as const;
  return j === null && dimensionFaults(bare).length === 0 ? solidOutline(drawn, t) : bare;
}

interface TypedRing {
  readonly corners: Corner[];
  readonly isHole: boolean;
}

/** A corner on each line, "across up" or "across up radius"; an empty line ends a ring, and "hole" begins one. */
function readCorners(form: Form): TypedRing[] {
  const rings: TypedRing[] = [];
  let open: TypedRing | null = null;
  for (const [index, line] of form.text('corners').split('\n').entries()) {
    const words = line.split(/[\s;,]+/).filter((word) => word !== '');
    if (words.length === 0 || words[0]?.toLowerCase() === 'hole') {
      open = words.length === 0 ? null : { corners: [], isHole: true };
      if (open) rings.push(open);
      continue;
    }
    const numbers = words.map(Number);
    if (words.length < 2 || words.length > 3 || !numbers.every(Number.isFinite)) {
      form.refuse(
        'corners',
        `Line ${index + 1} is no corner. Give across and up, and a radius where it is rounded: 0 0, or 120 10 8.`,
      );
      return rings;
    }
    if (!open) {
      open = { corners: [], isHole: false };
      rings.push(open);
    }
    const [z = 0, y = 0, r = 0] = numbers.map((number) => form.length(number));
    open.corners.push({ z, y, r });
  }
  if (rings.flatMap(({ corners }) => corners).length > MOST_CORNERS)
    form.refuse('corners', `Give at most ${MOST_CORNERS} corners.`);
  else if (rings.length === 0) form.refuse('corners', 'Give the corners, one on each line.', 'empty');
  return rings;
}

/** Anticlockwise (1) or clockwise (−1), whichever way round it was typed. */
function turned(corners: Corner[], way: 1 | -1): Corner[] {
  const twice = corners.reduce((sum, a, index) => {
    const b = corners[(index + 1) % corners.length] ?? a;
    return sum + a.z * b.y - b.z * a.y;
  }, 0);
  return twice * way < 0 ? corners.toReversed() : corners;
}

function makeOfValues(form: Form): SectionDimensions | null {
  const [h, b, t] = [form.size('depth'), form.size('width'), form.size('thickness')];
  const area = form.quantity('area', 'area', 'more than 0');
  const iMajor = form.quantity('i_major', 'second_moment', 'more than 0');
  const iMinor = form.quantity('i_minor', 'second_moment', 'more than 0');
  const wElMajor = form.quantity('w_el', 'section_modulus', 'more than 0');
  const wElMinor = form.quantity('w_el_minor', 'section_modulus', 'more than 0');
  return {
    shape: 'values',
    h,
    b,
    t,
    area,
    iMajor,
    iMinor,
    wElMajor,
    wElMinor,
    // Nothing beyond the elastic modulus is claimed where the plastic one is not known.
    wPlMajor: form.quantity('w_pl', 'section_modulus', 'more than 0', wElMajor),
    wPlMinor: form.quantity('w_pl_minor', 'section_modulus', 'more than 0', wElMinor),
    j: form.quantity('j', 'second_moment', '0 or more', 0),
    iw: form.quantity('iw', 'warping', '0 or more', 0),
    shearArea: form.quantity('shear_area', 'area', 'more than 0'),
  };
}

const STEEL = 7850; // kg/m³

/** What a made section weighs: its area times the density that is given, steel's where none is. */
export function readDensity(
  typed: Typed,
  system: UnitSystemName,
): { density: number; faults: readonly Fault[] } {
  const form = new Form(typed, system);
  return { density: form.quantity('density', 'density', 'more than 0', STEEL), faults: form.faults };
}

const COMPUTED = [
  'mass_kg_m',
  'area_cm2',
  'i_major_cm4',
  'i_minor_cm4',
  'w_el_cm3',
  'w_el_minor_cm3',
  'w_pl_cm3',
  'w_pl_minor_cm3',
  'j_cm4',
  'iw_cm6',
];

/** The row of a table that the section would be; of values that are known only the mass is computed. */
export function builtRow(printed: string, dimensions: SectionDimensions, density: number): SectionRow {
  const found = sectionProperties(dimensions);
  return {
    designation: asciiDesignation(printed),
    printed,
    key: designationKey(printed),
    shape: dimensions.shape,
    depth_mm: depthOf(dimensions) * 1e3,
    width_mm: widthOf(dimensions) * 1e3,
    mass_kg_m: found.area * density,
    area_cm2: found.area * 1e4,
    i_major_cm4: found.iMajor * 1e8,
    i_minor_cm4: found.iMinor * 1e8,
    w_el_cm3: found.wElMajor * 1e6,
    w_el_minor_cm3: found.wElMinor * 1e6,
    w_pl_cm3: found.wPlMajor * 1e6,
    w_pl_minor_cm3: found.wPlMinor * 1e6,
    j_cm4: found.j * 1e8,
    iw_cm6: found.iw * 1e12,
    computed: dimensions.shape === 'values' ? ['mass_kg_m'] : COMPUTED,
    dimensions,
  };
}
