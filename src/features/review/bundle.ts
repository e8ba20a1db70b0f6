import { z } from 'zod';
import { CHANGE_CLASSES, CONSEQUENCES, DOCUMENT_KINDS } from './review';

export const BUNDLE_SCHEMA = 1;

/**
 * A revision as it travels between practices: the document as its author writes it, so that whoever takes it in reads
 * every expression anew. Its hash tells a changed file; it says nothing about who made it.
 */
export const Bundle = z.strictObject({
  format: z.literal('putlog-document'),
  schema_version: z.literal(BUNDLE_SCHEMA),
  kind: z.enum(DOCUMENT_KINDS),
  slug: z.string(),
  reference: z.string(),
  name: z.string(),
  revision: z.int().positive(),
  engine_version: z.string(),
  change_note: z.string().max(2000),
  change_class: z.enum(CHANGE_CLASSES).nullable(),
  consequence: z.enum(CONSEQUENCES).nullable(),
  document: z.record(z.string(), z.unknown()),
  /** SHA-256 of the canonical JSON (RFC 8785) of all the rest. */
  sha256: z.string().regex(/^[0-9a-f]{64}$/, 'Give a SHA-256 in hexadecimal.'),
});
export type Bundle = z.output<typeof Bundle>;
