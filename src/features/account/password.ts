import { z } from 'zod';

/** Characters. The longest keeps the work of hashing bounded. */
export const PASSWORD_LENGTH = { least: 12, most: 200 } as const;

export const ChangePassword = z.strictObject({
  current: z.string().min(1, 'Give your current password.').max(PASSWORD_LENGTH.most),
  password: z
    .string()
    .min(PASSWORD_LENGTH.least, `Use at least ${PASSWORD_LENGTH.least} characters.`)
    .max(PASSWORD_LENGTH.most, `Use at most ${PASSWORD_LENGTH.most} characters.`),
});
export type ChangePassword = z.output<typeof ChangePassword>;

/** The words that are tried first, alone or one after another, with any digits and signs around them. */
const COMMON = [
  'password passwort qwertyuiop qwertzuiop azertyuiop asdfghjkl zxcvbnm qwerty qwertz azerty asdfgh abcdefghijkl',
  'abcdef letmein welcome iloveyou administrator admin changeme default secret monkey dragon football baseball',
  'sunshine princess superman batman master trustno hello login spring summer autumn winter putlog',
]
  .join(' ')
  .split(' ');

const letters = (text: string): string =>
  text
    .normalize('NFKC')
    .toLowerCase()
    .replace(/[^\p{L}]/gu, '');

const ADVICE = 'Use several words that have nothing to do with each other or with you.';

/** Why a password would soon be guessed, and what to do; null when it would not. */
export function weakness(
  password: string,
  owner: { readonly email: string; readonly name: string },
): string | null {
  const core = letters(password);
  if (core === '') return `It has no letters. ${ADVICE}`;
  if (new Set(core).size < 5) return `It repeats a few letters. ${ADVICE}`;
  const names = [owner.email, ...owner.email.split('@'), owner.name, ...owner.name.split(/\s+/)].map(letters);
  if (names.includes(core)) return `It is your name or your e-mail address. ${ADVICE}`;
  if (COMMON.reduce((rest, word) => rest.replaceAll(word, ''), core) === '')
    return `It is among the passwords that are tried first. ${ADVICE}`;
  return null;
}
