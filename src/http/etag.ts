import { AppError, stale } from '@/lib/app-error';

/** A document's version as its entity tag. */
export const etag = (version: number): string => `"${version}"`;

/** The version that the writer has read: 428 when it is not said, 412 when it cannot be one of ours. */
export function ifMatch({ request }: { readonly request: Request }): number {
  const header = request.headers.get('if-match')?.trim();
  if (!header)
    throw new AppError(
      'precondition_required',
      'Send If-Match with the ETag that you read, so that nobody’s change is lost.',
    );
  // A compressing proxy may have made the tag weak; the version in it is still the one that was read.
  const version = /^(?:W\/)?"(\d{1,9})"$/.exec(header)?.[1];
  if (version === undefined) throw stale();
  return Number(version);
}
