import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { person } from '@/db/schema/account';
import { withPractice } from '@/db/tenancy';
import { recordAudit } from '@/features/audit/audit.server';
import { AppError, notFound } from '@/lib/app-error';
import { read } from '@/lib/read';
import type { User } from './account';
import { changePassword } from './change-password.server';
import { NewToken, type RequestSource } from './session';
import { endAllSessions, endSession } from './session.server';
import { type AccountErrors, type Done, PasswordForm, Settings } from './settings';
import { makeToken, revokeToken } from './token.server';

/** What a form of the account page came to. The page sets the cookies. */
export type AccountOutcome =
  | { readonly kind: 'done'; readonly done: Done; readonly settings?: Settings }
  | { readonly kind: 'signed-out' }
  /** Shown on the page that answers, and never again. */
  | { readonly kind: 'token'; readonly token: string; readonly name: string }
  | { readonly kind: 'refused'; readonly status: number; readonly errors: AccountErrors };

const text = (form: FormData, name: string) => String(form.get(name) ?? '');

function idOf(form: FormData, what: string): string {
  const reading = z.uuid().safeParse(text(form, 'id'));
  if (!reading.success) throw notFound(what);
  return reading.data;
}

/** Takes the account page's form by the act it names. */
export async function takeAccountForm(
  user: User,
  form: FormData,
  from: RequestSource,
): Promise<AccountOutcome> {
  try {
    switch (text(form, 'act')) {
      case 'settings':
        return await saveSettings(user, form);
      case 'password':
        return await savePassword(user, form, from);
      case 'end-session':
        await endSession(user, idOf(form, 'This session'));
        return { kind: 'done', done: 'session' };
      case 'make-token':
        return await saveToken(user, form);
      case 'revoke-token':
        await revokeToken(user, idOf(form, 'This token'));
        return { kind: 'done', done: 'token' };
      case 'end-all':
        await endAllSessions(user);
        return { kind: 'signed-out' };
      default:
        return {
          kind: 'refused',
          status: 422,
          errors: { form: 'This form is not known here. Load the page again.' },
        };
    }
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    return refused(error.status, error.faults);
  }
}

function refused(status: number, faults: readonly { pointer: string; message: string }[]): AccountOutcome {
  const errors = Object.fromEntries(
    faults.map(({ pointer, message }) => [pointer.slice(1) || 'form', message]),
  );
  return { kind: 'refused', status, errors };
}

async function saveSettings(user: User, form: FormData): Promise<AccountOutcome> {
  const reading = read(Settings, {
    units: text(form, 'units'),
    theme: text(form, 'theme'),
    keys: form.has('keys') ? 'on' : 'off',
  });
  if (!reading.ok) return refused(422, reading.faults);
  const { units } = reading.value;
  if (units !== user.unitSystem) await saveUnits(user, units);
  return { kind: 'done', done: 'settings', settings: reading.value };
}

const saveUnits = (user: User, unitSystem: Settings['units']) =>
  withPractice(user, async (tx) => {
    await tx.update(person).set({ unitSystem }).where(eq(person.id, user.personId));
    await recordAudit(tx, user, {
      action: 'person.set-units',
      subjectKind: 'person',
      subjectId: user.personId,
      before: { unitSystem: user.unitSystem },
      after: { unitSystem },
    });
  });

async function saveToken(user: User, form: FormData): Promise<AccountOutcome> {
  const reading = read(NewToken, { name: text(form, 'name') });
  if (!reading.ok) return refused(422, reading.faults);
  return { kind: 'token', token: await makeToken(user, reading.value), name: reading.value.name };
}

async function savePassword(user: User, form: FormData, from: RequestSource): Promise<AccountOutcome> {
  const reading = read(PasswordForm, {
    current: text(form, 'current'),
    password: text(form, 'password'),
    again: text(form, 'again'),
  });
  if (!reading.ok) return refused(422, reading.faults);
  const { current, password } = reading.value;
  await changePassword(user, { current, password }, from);
  return { kind: 'done', done: 'password' };
}
