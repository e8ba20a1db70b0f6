import type { APIContext } from 'astro';
import { z } from 'zod';
import type { User } from '@/features/account/account';
import type { RevisionKey } from '@/features/review/draft';
import { DOCUMENT_KINDS, type DocumentKind, REVISION_STATES } from '@/features/review/review';
import type { Moved, StepRequest } from '@/features/review/review.server';
import { takeStepAt } from '@/features/review/review.server';
import { notFound } from '@/lib/app-error';
import { ifMatch } from './etag';
import { numberParam } from './params';

type Params = APIContext['params'];

interface DocumentKey {
  readonly kind: DocumentKind;
  readonly slug: string;
}

/** A document by its address under /library/[kind]/[slug], or under /templates/[slug], which names the kind itself. */
export function documentKey({ kind = 'template', slug = '' }: Params): DocumentKey {
  const known = DOCUMENT_KINDS.find((one) => one === kind);
  if (!known) throw notFound('This kind of document');
  return { kind: known, slug };
}

export const revisionKey = (params: Params): RevisionKey => ({
  ...documentKey(params),
  number: numberParam(params, 'number', 'This revision'),
});

/** The answer to a step. */
export const StepView = z.strictObject({
  kind: z.enum(DOCUMENT_KINDS),
  slug: z.string(),
  revision: z.int(),
  state: z.enum(REVISION_STATES),
  /** The recall that a withdrawal opened; null where nothing uses the revision. */
  recall: z.uuid().nullable(),
});

/**
 * Takes a step of the revision in the address. With If-Match it is the version that was read, or 412: what is issued is
 * what was reviewed, though it was returned and sent again in between.
 */
export async function takeStepHere(context: APIContext, user: User, step: StepRequest) {
  const { kind, slug, number } = revisionKey(context.params);
  const version = context.request.headers.has('if-match') ? ifMatch(context) : null;
  const { state, recallId }: Moved = await takeStepAt(user, { kind, slug, number }, step, version);
  return { kind, slug, revision: number, state, recall: recallId } satisfies z.output<typeof StepView>;
}
