import { z } from 'zod';
import {
  MEASURES,
  SECTION_MEASURES,
  type SectionMeasure,
  type SectionQuery,
  sectionQueryFields,
  toSectionQuery,
} from './query';
import type { SectionItem } from './section';

export type Bound = `${SectionMeasure}_${'min' | 'max'}`;

/** What the sections page shows; its address says the same, in mm and kg/m whatever the person reads. */
export interface PageState {
  readonly q: string;
  readonly table: string;
  readonly shape: string;
  readonly sort: string;
  /** '1': only what a supplier holds. */
  readonly stock: string;
  /** The address of a stock list; empty for anybody's. */
  readonly supplier: string;
  readonly bounds: Readonly<Partial<Record<Bound, number>>>;
  /** What is bounded at a line of its own, or is about to be: the address has its bounds alone. */
  readonly required: readonly SectionMeasure[];
  /** What the schedule shows, in order; null where the person's own choice holds. */
  readonly columns: readonly SectionMeasure[] | null;
  /** Keys of the pinned sections, first pinned first. */
  readonly pins: readonly string[];
}

export const EMPTY: PageState = {
  q: '',
  table: '',
  shape: '',
  sort: '',
  stock: '',
  supplier: '',
  bounds: {},
  required: [],
  columns: null,
  pins: [],
};
export const MOST_PINS = 4;

/** Asked so often that they have a field of their own, besides either end of depth and mass. */
export const USUAL_BOUNDS = [
  ['w_pl', 'min'],
  ['i_major', 'min'],
  ['width', 'max'],
] as const satisfies readonly (readonly [SectionMeasure, 'min' | 'max'])[];
const WITH_FIELD: readonly Bound[] = [
  'depth_min',
  'depth_max',
  'mass_min',
  'mass_max',
  ...USUAL_BOUNDS.map(([measure, end]) => `${measure}_${end}` as const),
];

export const keyOf = ({ table, designation }: Pick<SectionItem, 'table' | 'designation'>): string =>
  `${table}/${designation}`;

const endsOf = (measure: SectionMeasure) => [`${measure}_min`, `${measure}_max`] as const;
const BOUNDS: readonly Bound[] = MEASURES.flatMap(endsOf);

const isMeasure = (name: string): name is SectionMeasure => Object.hasOwn(SECTION_MEASURES, name);

/** Measures by their names, each once and in their order; what is none is left out. */
export function readColumns(names: readonly string[]): readonly SectionMeasure[] | null {
  const known = [...new Set(names)].filter(isMeasure);
  return known.length === 0 ? null : known;
}

/** What an address asks for; a part of it that cannot be read asks for nothing. */
export function readAddress(search: string): PageState {
  const given = new URLSearchParams(search);
  const read = <T>(name: string, schema: z.ZodType<T>): T | undefined => {
    const reading = schema.safeParse(given.get(name) ?? undefined);
    return reading.success ? reading.data : undefined;
  };
  const bounds = BOUNDS.flatMap((name) => {
    const value = read(name, z.coerce.number());
    return value === undefined || !given.get(name)?.trim() ? [] : [[name, value] as const];
  });
  return {
    q: read('q', sectionQueryFields.q) ?? '',
    table: read('table', sectionQueryFields.table) ?? '',
    shape: read('shape', sectionQueryFields.shape) ?? '',
    sort: read('sort', sectionQueryFields.sort) ?? '',
    stock: read('stock', sectionQueryFields.stock) ?? '',
    supplier: read('supplier', sectionQueryFields.supplier) ?? '',
    bounds: Object.fromEntries(bounds),
    required: MEASURES.filter((measure) =>
      endsOf(measure).some((end) => !WITH_FIELD.includes(end) && bounds.some(([name]) => name === end)),
    ),
    columns: readColumns(given.get('columns')?.split(/[\s,]+/) ?? []),
    pins: [...new Set(given.getAll('pin'))].slice(0, MOST_PINS),
  };
}

export function writeAddress({ bounds, pins, required: _, columns, ...words }: PageState): string {
  const entries = [
    ...Object.entries(words).filter(([, value]) => value !== ''),
    ...Object.entries(bounds).map(([name, value]) => [name, String(value)]),
    ...(columns === null ? [] : [['columns', columns.join(' ')]]),
    ...pins.map((pin) => ['pin', pin]),
  ];
  const search = new URLSearchParams(entries).toString();
  return search === '' ? '' : `?${search}`;
}

/** What is asked, and not how it is shown: the query of the list's endpoint too. */
export const askedOf = (state: PageState): string => writeAddress({ ...state, columns: null, pins: [] });

export const queryOf = (state: PageState): SectionQuery => toSectionQuery({ ...state, ...state.bounds });

/** Nothing asked; what is pinned and shown stays. */
export const cleared = ({ pins, columns }: PageState): PageState => ({ ...EMPTY, pins, columns });

export const withRequired = (state: PageState, measure: SectionMeasure): PageState =>
  state.required.includes(measure) ? state : { ...state, required: [...state.required, measure] };

/** Takes a measure's line out, and its bounds with it. */
export function withoutRequired(state: PageState, measure: SectionMeasure): PageState {
  const lifted = endsOf(measure).reduce((now, name) => withBound(now, name, null), state);
  return { ...lifted, required: state.required.filter((one) => one !== measure) };
}

/** Sets or lifts a bound. */
export function withBound(state: PageState, name: Bound, value: number | null): PageState {
  const { [name]: _, ...others } = state.bounds;
  return { ...state, bounds: value === null ? others : { ...others, [name]: value } };
}

/** A second press on a column turns its order round. */
export function withSort(state: PageState, name: string): PageState {
  const current = state.sort === '' ? 'mass' : state.sort;
  return { ...state, sort: current === name ? `-${name}` : name };
}

/** Pins or unpins; null when there is no room for another. */
export function withPin(state: PageState, key: string): PageState | null {
  if (state.pins.includes(key)) return { ...state, pins: state.pins.filter((pin) => pin !== key) };
  return state.pins.length < MOST_PINS ? { ...state, pins: [...state.pins, key] } : null;
}
