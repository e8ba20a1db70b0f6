import { z } from 'zod';
import {
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
  pins: [],
};
export const MOST_PINS = 4;

export const keyOf = ({ table, designation }: Pick<SectionItem, 'table' | 'designation'>): string =>
  `${table}/${designation}`;

const BOUNDS = Object.keys(SECTION_MEASURES).flatMap((measure) => [
  `${measure}_min`,
  `${measure}_max`,
]) as Bound[];

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
    pins: [...new Set(given.getAll('pin'))].slice(0, MOST_PINS),
  };
}

export function writeAddress({ bounds, pins, ...words }: PageState): string {
  const entries = [
    ...Object.entries(words).filter(([, value]) => value !== ''),
    ...Object.entries(bounds).map(([name, value]) => [name, String(value)]),
    ...pins.map((pin) => ['pin', pin]),
  ];
  const search = new URLSearchParams(entries).toString();
  return search === '' ? '' : `?${search}`;
}

/** What is asked, pins apart: the query of the list's endpoint too. */
export const askedOf = (state: PageState): string => writeAddress({ ...state, pins: [] });

export const queryOf = ({ bounds, pins: _, ...words }: PageState): SectionQuery =>
  toSectionQuery({ ...words, ...bounds });

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
