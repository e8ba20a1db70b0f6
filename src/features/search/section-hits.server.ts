import type { Tx } from '@/db/client';
import { designationParts, designationRank } from '@/engine/section';
import { toSectionQuery } from '@/features/section/query';
import { namedRows } from '@/features/section/search.server';
import type { SectionItem } from '@/features/section/section';
import { GRADES } from './search';

export interface SectionsFound {
  readonly items: readonly SectionItem[];
  readonly total: number;
  readonly grade: number;
}

const NONE: SectionsFound = { items: [], total: 0, grade: GRADES.words };

/** Letters of the longest family: 250 UB, HSS, 2L. What has more and no size is a word. */
const LONGEST_FAMILY = 4;

function namesSection(q: string): boolean {
  const { family, sizes } = designationParts(q);
  return family.length <= LONGEST_FAMILY && (sizes.length > 0 || family.length > 1);
}

/** The grade of a designation by how well it answers what was typed; see designationRank. */
const GRADE_OF_RANK = [GRADES.mark, GRADES.mark, GRADES.markBegins, GRADES.markBegins, GRADES.names];

/** Sections that are called as was typed, the best answer first. */
export async function findSections(
  tx: Tx,
  practiceId: string,
  q: string,
  page: { readonly from: number; readonly limit: number },
): Promise<SectionsFound> {
  if (!namesSection(q)) return NONE;
  const query = toSectionQuery({ q });
  const found = await namedRows(tx, practiceId, query, { place: null, limit: page.from + page.limit });
  const [best] = found.items;
  if (!best) return NONE;
  const rank = designationRank(q, best.designation) ?? GRADE_OF_RANK.length - 1;
  return {
    items: found.items.slice(page.from),
    total: found.total,
    grade: GRADE_OF_RANK[rank] ?? GRADES.names,
  };
}
