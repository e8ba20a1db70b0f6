import { z } from 'zod';
import { ChangePassword } from './password';

/** The account page's settings. `device` follows the device's own light and dark. */
export const Settings = z.strictObject({
  units: z.enum(['metric', 'us']),
  theme: z.enum(['device', 'day', 'night']),
  keys: z.enum(['on', 'off']),
});
export type Settings = z.output<typeof Settings>;

/** The account page's password form: the new password twice, since nobody can read it on the screen. */
export const PasswordForm = ChangePassword.extend({ again: z.string() }).refine(
  ({ password, again }) => password === again,
  { path: ['again'], error: 'The two new passwords differ. Type the same one twice.' },
);

export type AccountErrors = Readonly<Record<string, string>>;

/** What was just done, as the page says it after it was loaded anew. */
export const DONE = {
  settings: 'Saved.',
  password: 'The password is changed. Other sessions were ended.',
  session: 'The session is ended.',
  notices: 'Saved.',
  token: 'The token is withdrawn. Nothing works with it any more.',
} as const;
export type Done = keyof typeof DONE;

export const readDone = (text: string | null): Done | undefined =>
  (['settings', 'password', 'session', 'notices', 'token'] as const).find((done) => done === text);
