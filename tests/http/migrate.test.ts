import { afterAll, beforeAll, expect, test } from 'vitest';
import { connect } from '@/db/client';
import { migrate } from '@/db/migrate';
import { freshDatabase } from '../support/database';

let fresh: Awaited<ReturnType<typeof freshDatabase>>;

beforeAll(async () => {
  fresh = await freshDatabase();
});
afterAll(() => fresh.drop());

test('migrations started at once by several processes are applied once', async () => {
  await Promise.all(Array.from({ length: 5 }, () => migrate(fresh.url)));
  const { sql, close } = connect(fresh.url, 1);
  const applied =
    await sql`select hash, count(*)::int as times from drizzle.__drizzle_migrations group by hash`;
  await close();
  expect(applied.length).toBeGreaterThan(2);
  expect(applied.every(({ times }) => times === 1)).toBe(true);
});
