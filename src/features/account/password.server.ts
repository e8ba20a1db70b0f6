import { randomBytes } from 'node:crypto';
import { Argon2id } from 'oslo/password';

const argon = new Argon2id();

/** Verified in place of the hash that an unknown account has not got, so that both answers cost the same work. */
const decoy = argon.hash(randomBytes(32).toString('base64url'));

export const hashPassword = (password: string): Promise<string> => argon.hash(password);

/** False for a null hash too (no such account, or one without a password), after the same work. */
export async function verifyPassword(hash: string | null, password: string): Promise<boolean> {
  const matches = await argon.verify(hash ?? (await decoy), password);
  return hash !== null && matches;
}
