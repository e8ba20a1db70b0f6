import { type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import { type Actor, requireRevision } from '@/features/review/rows.server';
import {
  COMPARED,
  type ComparedColumn,
  type EditionChangesView,
  ROW_CHANGES,
  type RowChange,
  type RowDifference,
} from './edition-changes';
import type { SectionRow } from './section';

interface Asked {
  readonly table: string;
  readonly from: number;
  readonly to: number;
  /** Without it the first kind of which there is any. */
  readonly what?: RowChange | undefined;
  readonly place: number;
  readonly limit: number;
}

type Changes = Omit<EditionChangesView, 'next'> & { readonly next: number | null };

/** What edition `to` changes in the rows of edition `from`: sections are the same by their designation. */
export function readEditionChanges(actor: Actor, { table, from, to, ...asked }: Asked): Promise<Changes> {
  requirePermission(actor, 'library.read');
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const [older, newer] = await Promise.all(
      [from, to].map((number) =>
        requireRevision(tx, practiceId, { kind: 'section-table', slug: table, number }),
      ),
    );
    if (!older || !newer) throw new Error('requireRevision answers or throws');
    const pair = joined(practiceId, older.id, newer.id);
    const counts = await countChanges(tx, pair);
    const what = asked.what ?? ROW_CHANGES.find((one) => counts[one] > 0) ?? 'changed';
    const items = await pageOf(tx, practiceId, pair, what, asked);
    const total = counts[what];
    const next = asked.place + asked.limit;
    return { table, from, to, counts, what, items, total, next: next < total ? next : null };
  });
}

const column = (name: ComparedColumn) => ({ old: sql.raw(`o.${name}`), new: sql.raw(`n.${name}`) });

/** A difference beyond what rounding in binary leaves. */
const differs = (name: ComparedColumn): SQL => {
  const of = column(name);
  return sql`(coalesce(abs(${of.new} - ${of.old}) > 1e-9 * abs(${of.old}), num_nulls(${of.new}, ${of.old}) = 1))`;
};

const WHAT = sql`case when o.id is null then 'added' when n.id is null then 'removed'
  when ${sql.join(COMPARED.map(differs), sql` or `)} or o.dimensions is distinct from n.dimensions then 'changed' else 'same' end`;

const joined = (practiceId: string, older: string, newer: string): SQL => sql`
  (select * from section where practice_id = ${practiceId} and revision_id = ${older}) as o
  full join (select * from section where practice_id = ${practiceId} and revision_id = ${newer}) as n
  on n.designation_key = o.designation_key`;

async function countChanges(tx: Tx, pair: SQL): Promise<EditionChangesView['counts']> {
  const found = await tx.execute<{ what: RowChange | 'same'; count: number }>(
    sql`select what, count(*)::int as count from (select ${WHAT} as what from ${pair}) as compared group by what`,
  );
  const counts = { changed: 0, added: 0, removed: 0, same: 0 };
  for (const { what, count } of found) counts[what] = count;
  return counts;
}

type Page = Pick<Asked, 'place' | 'limit'>;
type Row = { designation: string; dimensions: boolean; members: number } & Record<string, number | null>;

async function pageOf(
  tx: Tx,
  practiceId: string,
  pair: SQL,
  what: RowChange,
  { place, limit }: Page,
): Promise<RowDifference[]> {
  const values = COMPARED.flatMap((name) => [
    sql`${column(name).old} as ${sql.identifier(`old_${name}`)}`,
    sql`${column(name).new} as ${sql.identifier(`new_${name}`)}`,
  ]);
  const rows = await tx.execute<Row>(sql`
    select coalesce(n.designation, o.designation) as designation, o.dimensions is distinct from n.dimensions as dimensions,
      ${sql.join(values, sql`, `)},
      (select count(*)::int from member m where m.practice_id = ${practiceId} and m.section_id = o.id and m.status <> 'removed') as members
    from ${pair}
    where ${WHAT} = ${what}
    order by members desc, coalesce(n.designation_key, o.designation_key)
    limit ${limit} offset ${place}`);
  return rows.map((row) => ({
    designation: row.designation,
    what,
    dimensions: row.dimensions && what === 'changed',
    members: row.members,
    values: COMPARED.map((name) =>
      toValue(name, row[`old_${name}`] ?? null, row[`new_${name}`] ?? null),
    ).filter(({ from, to }) => from !== to),
  }));
}

const toValue = (name: ComparedColumn, from: number | null, to: number | null) => ({
  column: name,
  from,
  to,
  share: from !== null && to !== null && from !== 0 ? (to - from) / from : null,
});

/** How many rows stand in an edition by their designation, and how many of these have other values there. */
export async function countAgainst(
  tx: Tx,
  practiceId: string,
  revisionId: string,
  rows: readonly SectionRow[],
): Promise<{ matched: number; changed: number }> {
  const given = rows.map((row) => ({
    key: row.key,
    ...Object.fromEntries(COMPARED.map((name) => [name, row[name]])),
  }));
  const columns = sql.raw(COMPARED.map((name) => `${name} float8`).join(', '));
  const [found] = await tx.execute<{ matched: number; changed: number }>(sql`
    select count(*)::int as matched, count(*) filter (where ${sql.join(COMPARED.map(differs), sql` or `)})::int as changed
    from jsonb_to_recordset(${JSON.stringify(given)}::text::jsonb) as n (key text, ${columns})
    join section o on o.practice_id = ${practiceId} and o.revision_id = ${revisionId} and o.designation_key = n.key`);
  return found ?? { matched: 0, changed: 0 };
}
