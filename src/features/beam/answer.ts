import { z } from 'zod';
import { MOST_REACHING } from '@/engine/model/index';

const pair = z.tuple([z.number(), z.number()]).describe('just left, just right');
const extreme = z.strictObject({ value: z.number(), at: z.array(z.number()) });
const range = z.strictObject({ max: extreme, min: extreme });

const redundant = z.union([
  z.strictObject({ support: z.int(), component: z.literal(['vertical', 'rotation']) }),
  z.strictObject({ at: z.number(), component: z.literal('moment') }),
]);

/** What POST /api/v1/beams/solve answers with. SI; the signs are the engine's. */
export const solveAnswer = z.strictObject({
  degree: z.int(),
  reactions: z.array(z.strictObject({ at: z.number(), vertical: z.number(), moment: z.number() })),
  stations: z.array(
    z.strictObject({ x: z.number(), shear: pair, moment: pair, slope: pair, deflection: z.number() }),
  ),
  extremes: z.strictObject({ shear: range, moment: range, slope: range, deflection: range }),
  contraflexure: z.array(z.number()),
  force_method: z.strictObject({
    redundants: z
      .array(redundant)
      .describe(
        `Those asked for, else the beam’s own. More than ${MOST_REACHING} of these are moments over the supports and within the spans, each of which bends no more than the spans beside it.`,
      ),
    eligible: z.array(redundant),
    flexibility: z.array(z.array(z.number())),
    gaps: z.array(z.number()),
    values: z.array(z.number()),
  }),
  proof: z.strictObject({
    equilibrium: z.number(),
    compatibility: z.number(),
    agreement: z.number(),
    method: z.literal('direct stiffness'),
  }),
});

export type SolveAnswer = z.output<typeof solveAnswer>;
