import type { RevisionState } from '@/features/review/review';
import type { SectionDetail } from './edition';
import type { RowDifference } from './edition-changes';
import type { MinorModuli } from './properties';
import type { SectionItem } from './section';

export type Neighbour = Pick<SectionItem, 'table' | 'designation' | 'depth_mm' | 'mass_kg_m'>;

export interface NeighbourPair {
  readonly lighter: Neighbour | null;
  readonly heavier: Neighbour | null;
}

/** What stands beside a section in the issued editions, by mass. */
export interface Neighbours {
  /** Of the same rolls or the same sizes but one, in its own table. */
  readonly series: NeighbourPair;
  /** About as deep and of the same kind of shape, in any table. */
  readonly depth: NeighbourPair;
}

interface SectionUse {
  readonly job: string;
  readonly jobName: string;
  readonly mark: string;
  readonly title: string;
  readonly edition: number;
  readonly state: RevisionState;
}

export interface SectionUses {
  readonly items: readonly SectionUse[];
  readonly total: number;
  /** Where the next page begins; null where there is none. */
  readonly next: number | null;
}

/** An edition of the table, and what became of the section in it against the edition before. */
export interface SectionEdition {
  readonly edition: number;
  readonly state: RevisionState;
  readonly date: Date;
  readonly withdrawalReason: string | null;
  readonly isThere: boolean;
  readonly what: 'first' | 'same' | 'changed' | 'added' | 'removed' | 'absent';
  readonly values: RowDifference['values'];
  /** Thickness or radius differs as well. */
  readonly dimensions: boolean;
}

export interface SectionPageView extends SectionDetail {
  /** Moduli about the minor axis, as the table has them. */
  readonly minor: MinorModuli;
  /** Newest first. */
  readonly editions: readonly SectionEdition[];
  readonly neighbours: Neighbours;
  readonly uses: SectionUses;
}
