import { sql } from 'drizzle-orm';
import { withoutPractice, withPractice } from '@/db/tenancy';
import { recordAudit } from '@/features/audit/audit.server';
import { AppError } from '@/lib/app-error';
import { read } from '@/lib/read';
import { localPath } from '@/paths';
import { SignIn } from './account';
import { admitAttempt, noteSuccess } from './attempt.server';
import { type CookieJar, setSessionCookie } from './cookie';
import { verifyPassword } from './password.server';
import type { RequestSource } from './session';
import { startSession } from './session.server';

/** What a refusal says at each field; `form` stands above them. */
export interface SignInErrors {
  readonly email?: string;
  readonly password?: string;
  readonly form?: string;
}

interface RefusedSignIn {
  readonly ok: false;
  readonly fieldErrors: SignInErrors;
  readonly retryAfterSeconds: number | null;
}

export type SignInResult = { readonly ok: true; readonly token: string } | RefusedSignIn;

const refused = (fieldErrors: SignInErrors, retryAfterSeconds: number | null = null): SignInResult => ({
  ok: false,
  fieldErrors,
  retryAfterSeconds,
});

/** Proves a password and begins a session. An unknown account, a wrong password and a person who left get one answer. */
export async function proveSignIn(
  form: unknown,
  from: RequestSource,
  now = new Date(),
): Promise<SignInResult> {
  const reading = read(SignIn, form);
  if (!reading.ok)
    return refused(
      Object.fromEntries(reading.faults.map(({ pointer, message }) => [pointer.slice(1), message])),
    );
  const { email, password } = reading.value;
  const admission = await admitAttempt(email.toLowerCase(), from.address, now);
  if (!admission.admitted)
    return refused({ form: waitWords(admission.retryAfterSeconds) }, admission.retryAfterSeconds);

  const [account] = await withoutPractice()
    .select({
      practiceId: sql<string>`practice_id`,
      personId: sql<string>`person_id`,
      passwordHash: sql<string>`password_hash`,
    })
    .from(sql`find_sign_in(${email})`);
  const proven = await verifyPassword(account?.passwordHash ?? null, password);
  if (!account || !proven) {
    if (account) await recordRefusal(account, from);
    return refused({ password: 'The e-mail address or the password is wrong. Check both and try again.' });
  }
  await noteSuccess(admission.attemptId, now);
  return { ok: true, token: await withPractice(account, (tx) => startSession(tx, account, from, now)) };
}

const recordRefusal = (account: { practiceId: string; personId: string }, from: RequestSource) =>
  withPractice(account, (tx) =>
    recordAudit(
      tx,
      { ...account, personId: null },
      {
        action: 'session.refuse',
        subjectKind: 'person',
        subjectId: account.personId,
        after: from,
      },
    ),
  );

/** A refused sign-in as an endpoint's refusal. */
export function signInRefusal({ fieldErrors, retryAfterSeconds }: RefusedSignIn): AppError {
  const faults = Object.entries(fieldErrors).map(([field, message]) => ({
    pointer: field === 'form' ? '' : `/${field}`,
    code: 'refused',
    message,
  }));
  const detail = faults[0]?.message ?? 'Sign in again.';
  return retryAfterSeconds === null
    ? new AppError('unauthenticated', detail, {
        faults,
        headers: { 'WWW-Authenticate': 'Bearer realm="putlog"' },
      })
    : new AppError('too_many_requests', detail, {
        faults,
        headers: { 'Retry-After': String(retryAfterSeconds) },
      });
}

export function waitWords(seconds: number): string {
  const minutes = Math.ceil(seconds / 60);
  return `Too many attempts did not succeed. Try again in ${minutes === 1 ? 'a minute' : `${minutes} minutes`}.`;
}

interface SignInContext {
  readonly request: Request;
  readonly clientAddress: string;
  readonly cookies: CookieJar;
  readonly locals: { readonly origin: string };
}

export const sourceOf = ({
  request,
  clientAddress,
}: Pick<SignInContext, 'request' | 'clientAddress'>): RequestSource => ({
  address: clientAddress,
  agent: request.headers.get('user-agent')?.slice(0, 300) ?? null,
});

export type PageSignIn =
  | { readonly ok: true; readonly redirect: string }
  | {
      readonly ok: false;
      readonly status: 422 | 429;
      readonly fieldErrors: SignInErrors;
      readonly retryAfter: number | null;
    };

/** The sign-in page's form (email, password, next): sets the cookie and says where to go, or what is wrong. */
export async function signIn(context: SignInContext, form: FormData): Promise<PageSignIn> {
  const text = (name: string) => String(form.get(name) ?? '');
  const result = await proveSignIn({ email: text('email'), password: text('password') }, sourceOf(context));
  if (!result.ok)
    return {
      ok: false,
      status: result.retryAfterSeconds === null ? 422 : 429,
      fieldErrors: result.fieldErrors,
      retryAfter: result.retryAfterSeconds,
    };
  setSessionCookie(context.cookies, context.locals.origin, result.token);
  return { ok: true, redirect: localPath(text('next')) };
}
