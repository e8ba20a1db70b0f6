import { pgTable, text } from 'drizzle-orm/pg-core';
import { now } from './tenant';

/** A sign of life of each kind of process that serves no requests itself. */
export const processBeat = pgTable('process_beat', {
  name: text().primaryKey(),
  startedAt: now(),
  beatAt: now(),
});
