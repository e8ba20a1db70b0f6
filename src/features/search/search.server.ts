import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { type Tenant, withPractice } from '@/db/tenancy';
import type { UnitSystemName } from '@/engine/quantity';
import { designationRank } from '@/engine/section';
import { may, type Person, requirePermission } from '@/features/account/permission';
import { sizeLine } from '@/features/section/display';
import type { SectionItem } from '@/features/section/section';
import {
  type Hit,
  hrefOf,
  inOrder,
  type KindFound,
  type Marked,
  type SearchView,
  stateWords,
} from './search';
import { findSections, type SectionsFound } from './section-hits.server';
import { ENTRY_KINDS, type HitKind, SHOWN_OF_KIND } from './terms';
import {
  allWords,
  anyReading,
  excerptOf,
  marksIn,
  mendable,
  mended,
  type Question,
  readQuestion,
  slips,
  swaps,
} from './words';

type Actor = Person & Tenant & { readonly personId: string; readonly unitSystem: UnitSystemName };

interface Asked {
  readonly q: string;
  /** Without it the best few of every kind. */
  readonly kind?: HitKind | undefined;
  readonly from: number;
  readonly limit: number;
}

interface Found extends Omit<SearchView, 'next'> {
  /** Where the list of a kind goes on. */
  readonly next: number | null;
}

/** Everything in the practice that answers and that the person may read, the best answer first. */
export function search(actor: Actor, asked: Asked): Promise<Found> {
  requirePermission(actor, 'library.read');
  const question = readQuestion(asked.q);
  if (question.words.length === 0)
    return Promise.resolve({ items: [], next: null, total: 0, kinds: [], instead: [] });
  return withPractice(actor, async (tx) => {
    const [sections, entries] = await Promise.all([
      sectionsOf(tx, actor, asked),
      entriesOf(tx, actor, asked, question),
    ]);
    if (entries.length > 0 || sections.total > 0)
      return toFound(actor, asked, question, { entries, sections });
    const meant = await wordsMeant(tx, actor, question);
    if (meant.size === 0) return toFound(actor, asked, question, { entries, sections });
    const read = mended(question, meant);
    const second = await entriesOf(tx, actor, asked, read);
    // A word is known from what others may read alone: it is named where the person finds it.
    const instead =
      second.length === 0 ? [] : [...meant].map(([typed, words]) => ({ typed, meant: [...words] }));
    return { ...toFound(actor, asked, read, { entries: second, sections }), instead };
  });
}

const sectionsOf = (tx: Tx, { practiceId }: Actor, { q, kind, from, limit }: Asked): Promise<SectionsFound> =>
  findSections(tx, practiceId, q, {
    from: kind === 'section' ? from : 0,
    limit: kind === 'section' ? limit : SHOWN_OF_KIND,
  });

const entryRow = z.object({
  kind: z.enum(ENTRY_KINDS),
  mark: z.string(),
  title: z.string(),
  detail: z.string(),
  body: z.string(),
  state: z.string(),
  place: z.array(z.string()),
  grade: z.int(),
  total: z.int(),
});
type EntryRow = z.output<typeof entryRow>;

/**
 * Of each kind the best entries: by grade, then what is in use, then one's own, then what was changed last. What
 * search_matches() finds beyond the person's jobs and requests is left out here, so that it is not counted either; what
 * an entry says is read under its own policy.
 */
async function entriesOf(tx: Tx, actor: Actor, asked: Asked, question: Question): Promise<EntryRow[]> {
  const { practiceId, personId } = actor;
  const title = question.words.map(([typed]) => typed).join(' ');
  const rows = await tx.execute(sql`
    with open_job as materialized (
      select id, created_by_id = ${personId} or id in (select job_id from job_person where person_id = ${personId}) as own
      from job where practice_id = ${practiceId}
    ), matched as materialized (
      select m.kind, m.id, m.grade, m.standing, m.changed_at, m.person_id = ${personId} or coalesce(j.own, false) as own
      from search_matches(${anyReading(question)}::tsquery, ${allWords(question)}::tsquery, ${question.key}, ${title}) m
      left join open_job j on j.id = m.job_id
      where (m.job_id is null or j.id is not null)
        and (m.reader_id is null or m.reader_id = ${personId} or ${may(actor, 'request.answer')})
    ), counted as (
      select kind, count(*)::int as total from matched group by kind
    )
    select e.kind, e.mark, e.title, e.detail, e.state, e.place, left(e.body, 8000) as body, best.grade, counted.total
    from counted cross join lateral (
      select one.id, one.grade, row_number() over () as place from (
        select id, grade from matched where matched.kind = counted.kind
        order by grade, standing, own desc, changed_at desc, id
        limit case counted.kind when ${asked.kind ?? ''} then ${asked.limit}::int else ${SHOWN_OF_KIND}::int end
        offset case counted.kind when ${asked.kind ?? ''} then ${asked.from}::int else 0 end
      ) one
    ) best join search_entry e on e.practice_id = ${practiceId} and e.kind = counted.kind and e.id = best.id
    order by e.kind, best.place`);
  return z.array(entryRow).parse(rows);
}

/** For each word that begins no word of the practice's, those it is a slip away from, however much of them was typed. */
async function wordsMeant(
  tx: Tx,
  { practiceId }: Actor,
  question: Question,
): Promise<Map<string, readonly string[]>> {
  const meant = new Map<string, readonly string[]>();
  for (const typed of mendable(question)) {
    const most = slips(typed);
    const lengths = [typed.length - 1, typed.length, typed.length + 1];
    const apart = sql.join(
      lengths.map(
        (length) => sql`levenshtein_less_equal(left(word, ${length}::int), ${typed}, ${most}::int)`,
      ),
      sql`, `,
    );
    const rows = await tx.execute(sql`
      select word, min(case when left(word, ${typed.length}::int) = any (${sql.param(swaps(typed))}::text[]) then 1
        else least(${apart}) end) as slips
      from search_word where practice_id = ${practiceId} and length(word) >= ${typed.length - most}::int
        and not exists (select from search_word where practice_id = ${practiceId} and starts_with(word, ${typed}))
      group by word having min(least(${apart})) <= ${most}::int
        or bool_or(left(word, ${typed.length}::int) = any (${sql.param(swaps(typed))}::text[]))
      order by slips, word limit 20`);
    const near = z.array(z.object({ word: z.string(), slips: z.int() })).parse(rows);
    const [best] = near;
    if (best)
      meant.set(
        typed,
        near.filter(({ slips: own }) => own === best.slips).map(({ word }) => word),
      );
  }
  return meant;
}

interface Answers {
  readonly entries: readonly EntryRow[];
  readonly sections: SectionsFound;
}

function toFound(actor: Actor, asked: Asked, question: Question, { entries, sections }: Answers): Found {
  const { kind, from, limit } = asked;
  const found = new Map<HitKind, KindFound>();
  for (const { kind: of, grade, total } of entries)
    if (!found.has(of)) found.set(of, { kind: of, total, grade });
  if (sections.total > 0) found.set('section', { kind: 'section', ...sections });
  const order = inOrder([...found.values()]);
  const hitsOf = (of: HitKind): Hit[] =>
    of === 'section'
      ? sections.items.map((item) => toSectionHit(actor, asked, question, item))
      : entries.filter((entry) => entry.kind === of).map((entry) => toHit(question, entry));
  const shown = order.filter((one) => kind === undefined || one.kind === kind);
  const items = shown.flatMap((one) => hitsOf(one.kind)).slice(0, kind === undefined ? undefined : limit);
  const total = shown.reduce((sum, one) => sum + one.total, 0);
  return {
    items,
    next: kind !== undefined && from + items.length < total ? from + items.length : null,
    total,
    kinds: order.map(({ kind: of, total: all }) => ({ kind: of, total: all })),
    instead: [],
  };
}

const marked = (text: string, question: Question): Marked => ({ text, marks: marksIn(text, question) });

function toHit(question: Question, { kind, mark, title, detail, body, state, place }: EntryRow): Hit {
  return {
    kind,
    mark: marked(mark, question),
    title: marked(title, question),
    detail: marked(detail, question),
    excerpt: body === '' ? null : marked(excerptOf(body, question), question),
    state: stateWords(kind, state),
    href: hrefOf(kind, place, state),
  };
}

function toSectionHit(actor: Actor, { q }: Asked, question: Question, item: SectionItem): Hit {
  const { printed } = item;
  const isCalledSo = (designationRank(q, printed) ?? WHOLE_DESIGNATION + 1) <= WHOLE_DESIGNATION;
  return {
    kind: 'section',
    mark: isCalledSo ? { text: printed, marks: [[0, printed.length]] } : marked(printed, question),
    title: { text: item.table.replaceAll('-', ' '), marks: [] },
    detail: { text: sizeLine(item, actor.unitSystem), marks: [] },
    excerpt: null,
    state: '',
    href: hrefOf('section', [item.table, item.designation], ''),
  };
}

/** The worst rank at which all of a designation was typed, but perhaps for its family. */
const WHOLE_DESIGNATION = 1;
