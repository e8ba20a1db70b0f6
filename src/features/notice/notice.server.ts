/** Telling people: writes the rows. Streams, preferences' screens and sending build on them. */
import { and, eq, inArray } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { mail, notice, noticePreference } from '@/db/schema/notice';
import type { Tenant } from '@/db/tenancy';
import type { MailMode, NoticeKind } from './terms';

export interface Telling {
  readonly people: readonly string[];
  readonly kind: NoticeKind;
  readonly title: string;
  readonly detail?: string;
  /** Path of the page that it is about. */
  readonly href: string;
  /** Names the event: nobody is told of one twice. */
  readonly dedupe: string;
  /** What the message says besides. */
  readonly mailData?: Readonly<Record<string, unknown>>;
}

/** Tells people of something in the app and by e-mail, in the transaction in which it happens. */
export async function tell(tx: Tx, { practiceId }: Tenant, telling: Telling): Promise<void> {
  const people = [...new Set(telling.people)];
  if (people.length === 0) return;
  const { kind, title, detail = '', href, dedupe, mailData = {} } = telling;
  const one = { practiceId, kind, dedupe };
  await tx
    .insert(notice)
    .values(people.map((personId) => ({ ...one, personId, title, detail, href })))
    .onConflictDoNothing();
  const modes = await modesOf(tx, practiceId, kind, people);
  const sent = people.flatMap((personId) => {
    const mode = modes.get(personId) ?? defaultMode(kind);
    return mode === 'none' ? [] : [{ ...one, personId, mode, data: { title, detail, href, ...mailData } }];
  });
  if (sent.length > 0) await tx.insert(mail).values(sent).onConflictDoNothing();
}

/** A recall is read at once, whatever was chosen. */
const defaultMode = (kind: NoticeKind): MailMode => (kind === 'recall' ? 'immediate' : 'digest');

async function modesOf(tx: Tx, practiceId: string, kind: NoticeKind, people: readonly string[]) {
  if (kind === 'recall') return new Map<string, MailMode | 'none'>();
  const found = await tx
    .select({ personId: noticePreference.personId, mode: noticePreference.mode })
    .from(noticePreference)
    .where(
      and(
        eq(noticePreference.practiceId, practiceId),
        eq(noticePreference.kind, kind),
        inArray(noticePreference.personId, [...people]),
      ),
    );
  return new Map(found.map((one) => [one.personId, one.mode]));
}
