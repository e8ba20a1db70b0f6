import { z } from 'zod';

const body = z.string().trim().min(1, 'Write what you mean.').max(4000);
/** RFC 6901: '' is the whole document. */
const place = z
  .string()
  .max(300)
  .regex(/^(?:\/(?:[^~/]|~[01])*)*$/, 'Give a JSON Pointer, such as /beam/supports/1.');

/** POST …/comments. A reply stands where its comment does. */
export const NewComment = z.strictObject({
  body,
  pointer: place.optional().describe('The part of the document; the whole of it when left out'),
  reply_to: z.uuid().optional(),
});
export type NewComment = z.output<typeof NewComment>;

const Said = {
  id: z.uuid(),
  body: z.string(),
  author: z.string(),
  at: z.iso.datetime(),
};

export const CommentView = z.strictObject({
  ...Said,
  pointer: z.string(),
  /** By whoever raised it, and nobody else. */
  resolved_at: z.iso.datetime().nullable(),
  /** Whether the reader raised it. */
  mine: z.boolean(),
  replies: z.array(z.strictObject(Said)),
});
export type CommentView = z.output<typeof CommentView>;

/** POST …/return: what the author has to change, and where. */
export const ReturnStep = z.strictObject({ comment: body, pointer: place.default('') });
export type ReturnStep = z.output<typeof ReturnStep>;
