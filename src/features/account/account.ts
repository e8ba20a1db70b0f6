import { z } from 'zod';
import type { UnitSystemName } from '@/engine/quantity';
import { PASSWORD_LENGTH } from './password';
import { ROLES, type Role } from './roles';

/** Whoever makes a request, in the practice in which they make it. It is a tenant for the database as it stands. */
export interface User {
  readonly personId: string;
  readonly practiceId: string;
  readonly practiceName: string;
  readonly email: string;
  readonly name: string;
  readonly initials: string;
  readonly roles: readonly Role[];
  readonly unitSystem: UnitSystemName;
  /** How the request was signed: a browser's session, or a bearer token. */
  readonly via: { readonly kind: 'session' | 'token'; readonly id: string };
}

/** The sign-in form and POST /api/v1/session. */
export const SignIn = z.strictObject({
  email: z.string().trim().min(1, 'Give your e-mail address.').max(254),
  password: z
    .string()
    .min(1, 'Give your password.')
    .max(PASSWORD_LENGTH.most, `A password has at most ${PASSWORD_LENGTH.most} characters.`),
});
export type SignIn = z.output<typeof SignIn>;

/** GET /api/v1/me. */
export const MeView = z.strictObject({
  name: z.string(),
  initials: z.string(),
  email: z.string(),
  practice: z.string(),
  roles: z.array(z.enum(ROLES)),
  unit_system: z.enum(['metric', 'us']),
});

export const toMeView = (user: User): z.output<typeof MeView> => ({
  name: user.name,
  initials: user.initials,
  email: user.email,
  practice: user.practiceName,
  roles: [...user.roles],
  unit_system: user.unitSystem,
});
