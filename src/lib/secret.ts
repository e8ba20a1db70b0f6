import { createHash, randomBytes } from 'node:crypto';

/** 256 random bits: nobody guesses it, so a plain hash of it may be kept. */
export const newSecret = (): string => randomBytes(32).toString('base64url');

export const hashSecret = (secret: string): string => createHash('sha256').update(secret).digest('hex');
