import postgres from 'postgres';
import { withPractice } from '@/db/tenancy';
import type { DraftKey } from '@/features/review/review.server';
import { createDraft, takeStep } from '@/features/review/review.server';
import { type Member, owner } from './practice';

/** One connection of web's role, for SQL as an intruder or a forgetful colleague would write it. */
export function webConnection(): postgres.Sql {
  const url = process.env['DATABASE_URL'];
  if (!url) throw new Error('DATABASE_URL is not set: run node scripts/test.mjs --only database');
  return postgres(url, { max: 1, onnotice: () => undefined });
}

/** The code of what the database refused with; `none` when it let it pass. */
export const refusal = (query: Promise<unknown>): Promise<string> =>
  query.then(
    () => 'none',
    (error: { code?: string; cause?: { code?: string } }) => error.code ?? error.cause?.code ?? String(error),
  );

/** An empty database on the tests' server, and how to drop it. */
export async function freshDatabase(): Promise<{ url: string; drop: () => Promise<void> }> {
  const name = `fresh_${crypto.randomUUID().replaceAll('-', '')}`;
  await owner.sql`create database ${owner.sql(name)}`;
  const url = new URL(process.env['OWNER_DATABASE_URL'] ?? '');
  url.pathname = `/${name}`;
  const drop = async () => {
    await owner.sql`drop database ${owner.sql(name)} with (force)`;
  };
  return { url: url.href, drop };
}

/** A draft of a criteria document whose body is as good as any: for tests of the revision, not of what it says. */
export const draftOf = (author: Member, slug: string, body: unknown = { text: slug }): Promise<DraftKey> =>
  withPractice(author, (tx) =>
    createDraft(tx, author, {
      kind: 'criteria',
      slug,
      reference: `Reference of ${slug}`,
      name: `Name of ${slug}`,
      body,
      schemaVersion: 1,
      changeNote: 'First issue.',
      changeClass: 'improvement',
      consequence: 'service',
    }),
  );

export async function issuedOf(author: Member, reviewer: Member, slug: string): Promise<DraftKey> {
  const key = await draftOf(author, slug);
  await takeStep(author, key.revisionId, { step: 'submit' });
  await takeStep(reviewer, key.revisionId, { step: 'issue' });
  return key;
}
