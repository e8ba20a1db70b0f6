import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';

/** SHA-256 of a value's canonical JSON (RFC 8785), in hexadecimal: the same for the same content, however it was written. */
export function contentHash(value: unknown): string {
  const canonical = canonicalize(value);
  if (canonical === undefined) throw new TypeError('A value without a JSON form has no fingerprint');
  return createHash('sha256').update(canonical, 'utf8').digest('hex');
}

/** What a document says together with the version of what would compute it. */
export const fingerprint = (body: unknown, engineVersion: string): string =>
  contentHash({ body, engine: engineVersion });
