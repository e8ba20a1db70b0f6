import { z } from 'zod';
import { Redundant } from '@/features/beam/request';

/** A section by its table and designation, of a material: what the server resolves before it evaluates. */
export const sectionChoice = z.strictObject({
  designation: z.string().min(1).max(80),
  table: z.string().min(1).max(80).optional(),
  material: z.string().min(1).max(80),
});

/** The body of POST /api/v1/templates/{slug}/evaluate. Parameters are read by the template itself. */
export const evaluateRequest = z.strictObject({
  revision: z.int().positive().optional(),
  parameters: z.record(z.string(), z.unknown()),
  section: sectionChoice.optional(),
  ei: z.union([z.number(), z.string()]).optional(),
  redundants: z.array(Redundant).max(40).optional(),
  self_weight: z.boolean().optional(),
});
export type EvaluateRequest = z.output<typeof evaluateRequest>;
