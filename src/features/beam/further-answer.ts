import { z } from 'zod';
import type { Reading } from '@/engine/model/index';
import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';
import { position } from './request';

export type Outcome<T> = { ok: true; answer: T } | { ok: false; errors: Fault[] };

/** A reading as an endpoint answers with it: every fault at a JSON Pointer into the body. */
export function toOutcome<A>(reading: Reading<A>): Outcome<A> {
  if (reading.ok) return { ok: true, answer: reading.value };
  const errors = reading.faults.map(({ path, code, message }) => ({ pointer: pointer(path), code, message }));
  return { ok: false, errors };
}

const side = z.enum(['left', 'right']);

/** What an influence line is of. */
export const quantityRequest = z
  .discriminatedUnion('kind', [
    z.strictObject({
      kind: z.literal('reaction'),
      support: z.int().min(0),
      component: z.enum(['vertical', 'rotation']),
    }),
    z.strictObject({ kind: z.literal('shear'), at: position, side: side.optional() }),
    z.strictObject({ kind: z.literal('moment'), at: position, side: side.optional() }),
    z.strictObject({ kind: z.literal('deflection'), at: position }),
  ])
  .describe(
    'A reaction by its support’s index, or the shear, moment or deflection at a section; without `side` just right of it, and inside the beam at its ends.',
  );

/** The same as it was understood: the section on its point, with its side. */
export const quantityAnswer = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('reaction'),
    support: z.int(),
    component: z.enum(['vertical', 'rotation']),
  }),
  z.strictObject({ kind: z.literal(['shear', 'moment']), at: z.number(), side }),
  z.strictObject({ kind: z.literal('deflection'), at: z.number() }),
]);
