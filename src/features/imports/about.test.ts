import { expect, test } from 'vitest';
import { read } from '@/lib/read';
import { About } from './imports';

const ABOUT = {
  ...{ name: 'Steel', reference: 'ST-1', supplier: 'Works', standard: 'EN 10365' },
  ...{ source: 'Catalogue', catalogue_date: '2026-01-31', licence: 'Own' },
};

test.each(['stock', 'build', 'searches', 'spread'])('no section table is at the address “%s”', (table) => {
  expect(read(About, { ...ABOUT, table })).toMatchObject({ ok: false, faults: [{ pointer: '/table' }] });
  expect(read(About, { ...ABOUT, table: `${table}-2` }).ok).toBe(true);
});
