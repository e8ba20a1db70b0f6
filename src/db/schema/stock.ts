import { sql } from 'drizzle-orm';
import {
  check,
  date,
  doublePrecision,
  foreignKey,
  index,
  integer,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { PRICE_BANDS } from '@/features/stock/stock';
import { ofMember } from './account';
import { id, now, oneOf, practiceId, tenantPolicy } from './tenant';

/** What a supplier holds, as of a day. It changes week by week, so that no frozen edition carries it. */
export const stockList = pgTable(
  'stock_list',
  {
    practiceId: practiceId(),
    id: id(),
    slug: text().notNull(),
    supplier: text().notNull(),
    note: text().notNull().default(''),
    asOf: date({ mode: 'string' }).notNull(),
    /** Counts the changes of the list and of its lines. */
    version: integer().notNull().default(1),
    createdById: uuid().notNull(),
    createdAt: now(),
    changedById: uuid().notNull(),
    changedAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    uniqueIndex('stock_list_slug').on(table.practiceId, table.slug),
    ofMember('stock_list_created_by_fk', table.practiceId, table.createdById),
    ofMember('stock_list_changed_by_fk', table.practiceId, table.changedById),
    check('stock_list_slug_form', sql`${table.slug} ~ '^[a-z0-9]+(-[a-z0-9]+)*$'`),
    tenantPolicy('stock_list'),
  ],
);

/** A section that a supplier holds: named by table and designation, whatever the edition. */
export const stockLine = pgTable(
  'stock_line',
  {
    practiceId: practiceId(),
    id: id(),
    listId: uuid().notNull(),
    tableSlug: text().notNull(),
    designationKey: text().notNull(),
    /** As its table wrote it when the line was kept. */
    designation: text().notNull(),
    lengthsM: doublePrecision().array().notNull().default([]),
    leadTimeDays: integer(),
    priceBand: text({ enum: PRICE_BANDS }),
    note: text().notNull().default(''),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    foreignKey({
      name: 'stock_line_list_fk',
      columns: [table.practiceId, table.listId],
      foreignColumns: [stockList.practiceId, stockList.id],
    }),
    uniqueIndex('stock_line_section').on(
      table.practiceId,
      table.listId,
      table.tableSlug,
      table.designationKey,
    ),
    index('stock_line_of_section').on(table.practiceId, table.tableSlug, table.designationKey),
    check('stock_line_lead_time', sql`${table.leadTimeDays} >= 0`),
    check('stock_line_price_band', oneOf(table.priceBand, PRICE_BANDS)),
    tenantPolicy('stock_line'),
  ],
);
