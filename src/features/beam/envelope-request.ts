import { z } from 'zod';
import { beamFields, group, LIMITS, loadSchema, Support } from './request';

const OneSidedSupport = Support.extend({
  lift_off: z
    .boolean()
    .optional()
    .describe(
      'The support cannot pull: every combination and pattern is then solved anew, never superposed.',
    ),
});

const Combination = z.strictObject({
  name: z
    .string()
    .min(1)
    .max(120)
    .describe('Results name their combination by it, so that no two may share one.'),
  factors: z
    .record(group, z.number())
    .describe(
      'By load group. A group without a factor does not act; a factor for a group without loads has no effect.',
    ),
});

/** The body of POST /api/v1/beams/envelope: the beam of beams/solve, its loads in groups, and their combinations. */
export const envelopeRequest = z.strictObject({
  ...beamFields,
  supports: z.array(OneSidedSupport).max(LIMITS.supports),
  loads: z.array(loadSchema(group)).max(LIMITS.loads).optional(),
  combinations: z.array(Combination).min(1).max(LIMITS.combinations),
  patterns: z
    .array(group)
    .max(LIMITS.patterns)
    .optional()
    .describe(
      'Groups whose loads act only where adverse, span by span; several of them load a span together.',
    ),
  arrangements: z
    .boolean()
    .optional()
    .describe('Answer with every arrangement that governs anything, whole.'),
});

export type EnvelopeRequest = z.output<typeof envelopeRequest>;
