import type { UnitSystemName } from '@/engine/quantity';
import { type Bound, type PageState, readAddress, writeAddress } from './address';
import { FIELD_WORDS, fromShown, shownName, toShown } from './display';
import { type SectionMeasure, shapeGroup, toSectionQuery } from './query';
import type { SectionItem } from './section';

const shapesOf = (group: string) => toSectionQuery({ shape: group }).shapes ?? [];

/** What is asked, where the section answers it: its own shapes, and no other table. */
const among = (state: PageState, { shape, table }: SectionItem): PageState => ({
  ...state,
  q: '',
  // Of one material, since the lightest means nothing across several.
  shape: shapesOf(state.shape).includes(shape) ? state.shape : shapeGroup(shape),
  table: state.table === table ? table : '',
  sort: 'mass',
});

function bounded(
  state: PageState,
  lifted: readonly SectionMeasure[],
  bounds: Readonly<Partial<Record<Bound, number>>>,
): PageState {
  const kept = Object.entries(state.bounds).filter(
    ([name]) => !lifted.some((measure) => name === `${measure}_min` || name === `${measure}_max`),
  );
  return readAddress(writeAddress({ ...state, bounds: { ...Object.fromEntries(kept), ...bounds } }));
}

/** The modulus that such a section is usually designed with: timber's elastic one. */
const modulusOf = (item: SectionItem): Partial<Record<Bound, number>> =>
  item.shape === 'rectangle' || item.w_pl_cm3 === null
    ? { w_el_min: item.w_el_cm3 }
    : { w_pl_min: item.w_pl_cm3 };

/** Sections of its shape with at least its second moment and modulus, the lightest first; other ranges stay. */
export const lightestLike = (state: PageState, item: SectionItem): PageState =>
  bounded(among(state, item), ['mass', 'i_major', 'w_el', 'w_pl'], {
    i_major_min: item.i_major_cm4,
    ...modulusOf(item),
  });

/** How far the sizes of one series lie about its depth. */
const TOLERANCE = 0.05;
const STEP = { metric: 1, us: 0.1 } as const; // mm and in: what the bounds are rounded out to

/** Sections of its shape and about its depth, the lightest first; ranges other than depth and mass stay. */
export function sameDepth(state: PageState, item: SectionItem, system: UnitSystemName): PageState {
  const step = STEP[system];
  const depth = toShown('depth_mm', item.depth_mm, system) / step;
  const bound = (steps: number) => fromShown('depth_mm', Number((steps * step).toFixed(1)), system);
  return bounded(among(state, item), ['mass', 'depth'], {
    depth_min: bound(Math.floor(depth * (1 - TOLERANCE))),
    depth_max: bound(Math.ceil(depth * (1 + TOLERANCE))),
  });
}

export interface NamedAction {
  readonly key: string;
  readonly words: string;
  readonly state: PageState;
  /** The section stands among its neighbours, and the list opens at it. */
  readonly opensAtIt: boolean;
}

/** What can be asked from a section, by its key. */
export function namedActions(
  state: PageState,
  item: SectionItem,
  system: UnitSystemName,
): readonly NamedAction[] {
  const modulus = FIELD_WORDS['w_pl_min' in modulusOf(item) ? 'w_pl_cm3' : 'w_el_cm3'].name;
  const name = shownName(item.designation);
  return [
    {
      key: 'L',
      words: `Lightest with at least the second moment and ${modulus.replace(', major axis', '')} of ${name}`,
      state: lightestLike(state, item),
      opensAtIt: false,
    },
    {
      key: 'D',
      words: `Same depth as ${name}, lighter and heavier`,
      state: sameDepth(state, item, system),
      opensAtIt: true,
    },
  ];
}
