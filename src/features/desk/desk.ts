import { z } from 'zod';
import { DOCUMENT_KINDS, REQUEST_STATES } from '@/features/review/review';

/** What of the library's work the desk shows, from its address. What is not known there counts as not given. */
export const DeskQuery = z.object({
  kind: z.enum(DOCUMENT_KINDS).optional().catch(undefined),
  /** Only what waits for the reader. */
  mine: z
    .literal('on')
    .optional()
    .catch(undefined)
    .transform((value) => value === 'on'),
  recalls: z.enum(['open', 'closed', 'all']).catch('open'),
  requests: z.enum([...REQUEST_STATES, 'all']).catch('open'),
});
export type DeskQuery = z.output<typeof DeskQuery>;
