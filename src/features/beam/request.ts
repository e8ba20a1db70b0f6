import { z } from 'zod';
import { MOST_REACHING, SUPPORT_KINDS } from '@/engine/model/index';
import { DIMENSION_WORDS, type DimensionName, readQuantity } from '@/engine/quantity/index';

/** Sizes beyond which a request is no beam of a building, and would keep others waiting. */
export const LIMITS = {
  supports: 400,
  hinges: 400,
  segments: 400,
  loads: 2000,
  stations: 5001,
  /** Chosen ones. */
  redundants: MOST_REACHING,
  combinations: 200,
  patterns: 60,
} as const;

/** A JSON number in SI, or what a person types, with its unit. */
export const quantity = (dimension: DimensionName) =>
  z
    .union([z.number(), z.string()], {
      error: ({ input }) =>
        input === undefined
          ? undefined
          : `Give ${DIMENSION_WORDS[dimension]}: a finite number in SI units, or text with its unit.`,
    })
    .transform((given, context) => {
      if (typeof given === 'number') return given;
      const reading = readQuantity(given, dimension);
      if (reading.ok) return reading.value;
      const { code, message } = reading;
      context.issues.push({ code: 'custom', input: given, message, params: { code } });
      return z.NEVER;
    });

export const position = quantity('length');
const shearStiffness = quantity('shear_stiffness').nullable().optional();
export const group = z.string().min(1).max(60);

const Segment = z.strictObject({
  from: position,
  to: position,
  ei: quantity('bending_stiffness'),
  ga: shearStiffness,
});

export const Support = z.strictObject({
  at: position,
  kind: z.enum(SUPPORT_KINDS),
  kv: quantity('spring').optional(),
  kr: quantity('rotational_spring').optional(),
  rise: quantity('length').optional(),
  rotation: quantity('rotation').optional(),
});

const lineLoad = quantity('line_load');

/** A load, its group as the request has it: optional where nothing is combined. */
export const loadSchema = <G extends z.ZodType>(inGroup: G) =>
  z.discriminatedUnion('kind', [
    z.strictObject({ kind: z.literal('point'), at: position, p: quantity('force'), group: inGroup }),
    z.strictObject({
      kind: z.literal('line'),
      from: position,
      to: position,
      w0: lineLoad,
      w1: lineLoad,
      group: inGroup,
    }),
    z.strictObject({ kind: z.literal('couple'), at: position, m: quantity('moment'), group: inGroup }),
    z.strictObject({
      kind: z.literal('curvature'),
      from: position,
      to: position,
      kappa: quantity('curvature'),
      group: inGroup,
    }),
  ]);

export const Redundant = z.discriminatedUnion('component', [
  z.strictObject({ support: z.int().min(0), component: z.literal(['vertical', 'rotation']) }),
  z.strictObject({ at: position, component: z.literal('moment') }),
]);

/** All of a beam but its supports and loads. */
export const beamFields = {
  length: position,
  segments: z.array(Segment).max(LIMITS.segments).optional(),
  ei: quantity('bending_stiffness').optional(),
  ga: shearStiffness,
  hinges: z.array(position).max(LIMITS.hinges).optional(),
  redundants: z.array(Redundant).max(LIMITS.redundants).optional(),
  stations: z.union([z.int().min(2).max(LIMITS.stations), z.array(position).max(LIMITS.stations)]).optional(),
  horizontal: z.literal('ignore').optional(),
};

/** The body of POST /api/v1/beams/solve. Numbers are SI; a quantity may be text with its unit instead. */
export const solveRequest = z.strictObject({
  ...beamFields,
  supports: z.array(Support).max(LIMITS.supports),
  loads: z.array(loadSchema(group.optional())).max(LIMITS.loads).optional(),
});

export type SolveRequest = z.output<typeof solveRequest>;
