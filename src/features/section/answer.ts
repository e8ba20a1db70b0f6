import { designationRank } from '@/engine/section';
import type { SectionQuery } from './query';
import type { SectionItem } from './section';
import type { Spread } from './spread';

/** What the server found for a query: its first rows, and how all of them are spread. */
export interface FirstAnswer {
  readonly items: readonly SectionItem[];
  readonly next: string | null;
  readonly total: number;
  readonly spread: Spread;
}

/** What the sections page shows of an answer, wherever it was found. */
export interface Answer {
  readonly query: SectionQuery;
  /** As far as they are read, in the order of the query. */
  readonly rows: readonly SectionItem[];
  readonly total: number;
  readonly spread: Spread;
  /** The pinned sections, whether or not they answer. */
  readonly pinned: readonly SectionItem[];
  /** Whether this is the answer to what is asked now. */
  readonly isSettled: boolean;
  readonly isReading: boolean;
  readonly failure: string | null;
  readonly again: () => void;
  /** Reads on, where there are more rows than are read. */
  readonly more: () => void;
}

/** Nothing is called as was typed; the rows are only like it. */
export const isNearest = ({ q }: SectionQuery, [top]: readonly SectionItem[]): boolean =>
  q !== '' && top !== undefined && designationRank(q, top.designation) === null;

/** Rows of one question, as its pages come. */
export interface Read {
  readonly asked: string;
  readonly rows: readonly SectionItem[];
  readonly next: string | null;
  readonly total: number;
}

/** With another page of the same question; a page of another question, or one that came before, changes nothing. */
export function withPage(
  read: Read,
  page: {
    readonly asked: string;
    readonly cursor: string;
    readonly items: readonly SectionItem[];
    readonly next: string | null;
    readonly total: number;
  },
): Read {
  if (page.asked !== read.asked || page.cursor !== read.next) return read;
  return { ...read, rows: [...read.rows, ...page.items], next: page.next, total: page.total };
}

/** A key of a section apart: the table's slug has no slash, a designation may. */
export function ofKey(key: string): { readonly table: string; readonly designation: string } | null {
  const slash = key.indexOf('/');
  return slash < 1 || slash === key.length - 1
    ? null
    : { table: key.slice(0, slash), designation: key.slice(slash + 1) };
}
