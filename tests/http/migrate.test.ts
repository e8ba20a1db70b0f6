import { readFile } from 'node:fs/promises';
import { generateDrizzleJson, generateMigration } from 'drizzle-kit/api';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { connect } from '@/db/client';
import { migrate } from '@/db/migrate';
import journal from '../../drizzle/meta/_journal.json';
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
  expect(applied).toHaveLength(journal.entries.length);
  expect(applied.every(({ times }) => times === 1)).toBe(true);
});

test('the migrations make what the schema says', async () => {
  const files = import.meta.glob<Record<string, unknown>>('/src/db/schema/*.ts', { eager: true });
  const last = String(journal.entries.length - 1).padStart(4, '0');
  const migrated = JSON.parse(
    await readFile(new URL(`../../drizzle/meta/${last}_snapshot.json`, import.meta.url), 'utf8'),
  );
  const schema = generateDrizzleJson(
    Object.assign({}, ...Object.values(files)),
    migrated.id,
    undefined,
    'snake_case',
  );
  // Roles are of the server and made by hand; the generator is told to leave them out (drizzle.config.ts).
  expect(await generateMigration(migrated, { ...schema, roles: {} })).toEqual([]);
});
