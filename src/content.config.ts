import { defineCollection } from 'astro:content';
import { file, glob } from 'astro/loaders';
import { z } from 'astro/zod';

/** Pages of /help, in their order. */
const help = defineCollection({
  loader: glob({ base: 'src/content/help', pattern: '*.mdx' }),
  schema: z.object({ title: z.string(), summary: z.string(), order: z.number() }),
});

/** Terms as this product uses them. */
const glossary = defineCollection({
  loader: file('src/content/glossary.yaml'),
  schema: z.object({ term: z.string(), symbol: z.string().optional(), meaning: z.string() }),
});

/**
 * Cautions, approved and versioned: a sheet records which wording was read, so a change of `text` raises `version`.
 * `sheet` ones are printed on every calc sheet; `entry` ones stand beside the fields that they are about.
 */
const cautions = defineCollection({
  loader: file('src/content/cautions.yaml'),
  schema: z.object({
    order: z.number(),
    title: z.string(),
    version: z.number().int().positive(),
    place: z.enum(['sheet', 'entry']),
    text: z.string(),
    why: z.string(),
  }),
});

export const collections = { help, glossary, cautions };
