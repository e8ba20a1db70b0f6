import { z } from 'zod';
import { DOCUMENT_KINDS, REQUEST_KINDS, REQUEST_STATES, type RequestState } from './review';

export const REQUEST_KIND_NAMES = { request: 'Request', defect: 'Defect' } as const;

/** Where a request may go from each state: a librarian's work list, in which nothing is lost for good. */
export const REQUEST_MOVES: Readonly<Record<RequestState, readonly RequestState[]>> = {
  open: ['accepted', 'declined', 'done'],
  accepted: ['declined', 'done'],
  declined: ['open'],
  done: ['open'],
};

export const LARGEST_CONTEXT = 20_000; // characters of its JSON

const documentRef = z.strictObject({ kind: z.enum(DOCUMENT_KINDS), slug: z.string().min(1).max(80) });

/** POST /api/v1/requests. */
export const NewRequest = z.strictObject({
  kind: z.enum(REQUEST_KINDS),
  title: z.string().trim().min(1, 'Say in a line what you need, or what is wrong.').max(160),
  body: z.string().trim().max(4000).default(''),
  /** Where it was raised: the address, and what stood on the screen. */
  context: z
    .record(z.string().max(80), z.unknown())
    .default({})
    .refine((value) => JSON.stringify(value).length <= LARGEST_CONTEXT, 'This is too much. Attach less.'),
  document: documentRef.nullable().default(null),
});
export type NewRequest = z.output<typeof NewRequest>;

/** PUT /api/v1/requests/{number}. */
export const AnswerRequest = z
  .strictObject({
    state: z.enum(REQUEST_STATES),
    answer: z.string().trim().max(4000),
    /** The document that it led to, or is about. */
    document: documentRef.nullable(),
  })
  .check(({ value, issues }) => {
    if (value.state !== 'declined' || value.answer !== '') return;
    issues.push({
      code: 'custom',
      input: value,
      path: ['answer'],
      message: 'Say why it is declined, for whoever asked.',
      params: { code: 'required' },
    });
  });
export type AnswerRequest = z.output<typeof AnswerRequest>;

export const RequestView = z.strictObject({
  number: z.int(),
  kind: z.enum(REQUEST_KINDS),
  title: z.string(),
  body: z.string(),
  context: z.record(z.string(), z.unknown()),
  document: documentRef.extend({ reference: z.string(), name: z.string() }).nullable(),
  state: z.enum(REQUEST_STATES),
  /** Where it may go from here; empty for who may not answer it. */
  moves: z.array(z.enum(REQUEST_STATES)),
  answer: z.string(),
  version: z.int(),
  raised_by: z.string(),
  mine: z.boolean(),
  created_at: z.iso.datetime(),
  handled_by: z.string().nullable(),
  changed_at: z.iso.datetime(),
});
export type RequestView = z.output<typeof RequestView>;

/** A request in the queue. */
export const RequestItem = RequestView.omit({ body: true, context: true });
export type RequestItem = z.output<typeof RequestItem>;

export const requestQuery = {
  state: z.enum(REQUEST_STATES).optional(),
  kind: z.enum(REQUEST_KINDS).optional(),
  mine: z.stringbool().default(false),
};
const query = z.strictObject(requestQuery);
export type RequestQuery = z.output<typeof query>;
