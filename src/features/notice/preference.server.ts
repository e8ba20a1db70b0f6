import { and, eq } from 'drizzle-orm';
import { noticePreference } from '@/db/schema/notice';
import { type Tenant, withPractice } from '@/db/tenancy';
import type { AccountOutcome } from '@/features/account/settings.server';
import { recordAudit } from '@/features/audit/audit.server';
import { invalid } from '@/lib/app-error';
import { read } from '@/lib/read';
import { Preferences, USUAL_PREFERENCES } from './notice';

type Reader = Tenant & { readonly personId: string };

/** How the person takes e-mail: what they have chosen, and the usual for the rest. */
export function readPreferences(reader: Reader): Promise<Preferences> {
  return withPractice(reader, async (tx) => {
    const rows = await tx
      .select({ kind: noticePreference.kind, mode: noticePreference.mode })
      .from(noticePreference)
      .where(isOf(reader));
    return { ...USUAL_PREFERENCES, ...Object.fromEntries(rows.map(({ kind, mode }) => [kind, mode])) };
  });
}

const isOf = ({ practiceId, personId }: Reader) =>
  and(eq(noticePreference.practiceId, practiceId), eq(noticePreference.personId, personId));

export async function savePreferences(reader: Reader, chosen: Preferences): Promise<Preferences> {
  const { practiceId, personId } = reader;
  const before = await readPreferences(reader);
  const rows = KINDS.map((kind) => ({ practiceId, personId, kind, mode: chosen[kind] }));
  await withPractice(reader, async (tx) => {
    await tx.delete(noticePreference).where(isOf(reader));
    await tx.insert(noticePreference).values(rows);
    await recordAudit(tx, reader, {
      action: 'person.set-notices',
      subjectKind: 'person',
      subjectId: personId,
      before,
      after: chosen,
    });
  });
  return chosen;
}

const KINDS = Preferences.keyof().options;

/** The account page's form. */
export async function takePreferences(reader: Reader, form: FormData): Promise<AccountOutcome> {
  const reading = read(Preferences, Object.fromEntries(KINDS.map((kind) => [kind, form.get(kind)])));
  if (!reading.ok) return { kind: 'refused', status: 422, errors: { form: invalid(reading.faults).message } };
  await savePreferences(reader, reading.value);
  return { kind: 'done', done: 'notices' };
}
