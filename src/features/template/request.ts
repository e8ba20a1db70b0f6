import { z } from 'zod';
import { SEVERITIES } from '@/engine/template/document';
import { solveAnswer } from '@/features/beam/answer';
import { Redundant, solveRequest } from '@/features/beam/request';

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

const derivationStep = z.strictObject({
  title: z.string(),
  symbols: z.string().describe('TeX'),
  numbers: z.string().describe('TeX, in kN, m and mm'),
  value: z.number().nullable().describe('SI; null where a step lists several'),
  unit: z.string(),
});

/** What the endpoint answers with. `beam` is a body of POST /api/v1/beams/solve, which gives the same result. */
export const evaluateAnswer = z.strictObject({
  template: z.string(),
  revision: z.int().positive(),
  beam: solveRequest,
  result: solveAnswer,
  derivation: z.array(derivationStep),
  rules: z.array(
    z.strictObject({ rule: z.string(), ok: z.boolean(), severity: z.enum(SEVERITIES), message: z.string() }),
  ),
});
export type EvaluateAnswer = z.output<typeof evaluateAnswer>;
