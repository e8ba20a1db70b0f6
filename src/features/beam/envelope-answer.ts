import { z } from 'zod';
import { solveAnswer } from './answer';

const governing = z.strictObject({
  value: z.number(),
  combination: z.string(),
  pattern: z
    .array(z.int())
    .describe(
      'Indices of the loaded pattern spans, from the left; a span that adds nothing there is not listed.',
    ),
  lifted: z
    .array(z.int())
    .optional()
    .describe('Supports that the beam is off; only where supports cannot pull.'),
});
const range = z.strictObject({ max: governing, min: governing });
const extreme = governing.extend({
  at: z.array(z.number()).describe('Ascending, every position where this arrangement attains the value.'),
});
const extremeRange = z.strictObject({ max: extreme, min: extreme });
const reaction = z.strictObject({ vertical: governing, moment: governing });
const ofGroup = z.union([z.number(), z.strictObject({ max: z.number(), min: z.number() })]);

/** What POST /api/v1/beams/envelope answers with. SI; the signs are the engine's. */
export const envelopeAnswer = z.strictObject({
  stations: z.array(
    z.strictObject({ x: z.number(), shear: range, moment: range, slope: range, deflection: range }),
  ),
  extremes: z.strictObject({
    shear: extremeRange,
    moment: extremeRange,
    slope: extremeRange,
    deflection: extremeRange,
  }),
  reactions: z.array(
    z.strictObject({
      at: z.number(),
      max: reaction,
      min: reaction,
      groups: z
        .record(z.string(), z.strictObject({ vertical: ofGroup, moment: ofGroup }))
        .describe('Unfactored and without the supports’ own movements; most and least of a patterned group.'),
    }),
  ),
  arrangements: z
    .array(
      solveAnswer.extend({
        combination: z.string(),
        pattern: z.array(z.int()),
        lifted: z.array(z.int()).optional(),
      }),
    )
    .optional(),
});

export type EnvelopeAnswer = z.output<typeof envelopeAnswer>;
