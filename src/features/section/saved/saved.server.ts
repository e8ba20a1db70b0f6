import { and, count, eq, ne, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { person } from '@/db/schema/account';
import { savedSearch } from '@/db/schema/saved-search';
import { withPractice } from '@/db/tenancy';
import type { User } from '@/features/account/account';
import { requirePermission } from '@/features/account/permission';
import { recordAudit } from '@/features/audit/audit.server';
import { AppError, invalid, notFound } from '@/lib/app-error';
import {
  type ChangeSavedSearch,
  MOST_SAVED,
  type NewSavedSearch,
  type SavedSearchView,
  understood,
} from './saved';

/** The person's own searches, then those that others share; each by name. */
export function listSavedSearches(user: User): Promise<SavedSearchView[]> {
  requirePermission(user, 'library.read');
  return withPractice(user, async (tx) => {
    const rows = await selectSaved(tx, user);
    return rows.map(({ personId, ...row }) => ({ ...row, mine: personId === user.personId }));
  });
}

/** As row-level security leaves them: one's own, and those that are shared. */
const selectSaved = (tx: Tx, { practiceId, personId }: User, id?: string) =>
  tx
    .select({
      id: savedSearch.id,
      personId: savedSearch.personId,
      name: savedSearch.name,
      query: savedSearch.query,
      shared: savedSearch.shared,
      by: person.name,
    })
    .from(savedSearch)
    .innerJoin(person, eq(person.id, savedSearch.personId))
    .where(and(eq(savedSearch.practiceId, practiceId), id === undefined ? undefined : eq(savedSearch.id, id)))
    .orderBy(sql`${savedSearch.personId} <> ${personId}`, sql`lower(${savedSearch.name})`, savedSearch.id)
    .execute();

async function findSaved(tx: Tx, user: User, id: string) {
  const [found] = await selectSaved(tx, user, id);
  if (!found) throw notFound('This saved search');
  return found;
}

/** Kept from whoever else would change or delete it, until this is done. */
async function holdSaved(tx: Tx, user: User, id: string) {
  await tx
    .select({ id: savedSearch.id })
    .from(savedSearch)
    .where(and(eq(savedSearch.practiceId, user.practiceId), eq(savedSearch.id, id)))
    .for('update');
  return findSaved(tx, user, id);
}

export function saveSearch(user: User, body: NewSavedSearch): Promise<SavedSearchView> {
  requirePermission(user, 'search.save');
  if (body.shared) requirePermission(user, 'search.share');
  const { practiceId, personId } = user;
  return withPractice(user, async (tx) => {
    await oneAtATime(tx, user);
    const [held] = await tx.select({ count: count() }).from(savedSearch).where(ofPerson(user));
    if ((held?.count ?? 0) >= MOST_SAVED)
      throw new AppError(
        'conflict',
        `You keep ${MOST_SAVED} searches already. Delete one that is not needed any more.`,
      );
    await requireFreeName(tx, user, body.name, { hint: 'Give another name, or replace that search.' });
    const row = { ...body, query: readQuery(body.query) };
    const id = crypto.randomUUID();
    await tx.insert(savedSearch).values({ practiceId, id, personId, ...row });
    await recordAudit(tx, user, {
      action: 'search.save',
      subjectKind: 'search',
      subjectId: id,
      after: row,
    });
    return { id, ...row, mine: true, by: user.name };
  });
}

/** Another name, another query, shared or no longer: by whoever saved it. */
export function changeSavedSearch(
  user: User,
  id: string,
  change: ChangeSavedSearch,
): Promise<SavedSearchView> {
  return withPractice(user, async (tx) => {
    await oneAtATime(tx, user);
    const { id: _, personId, by, ...before } = await holdSaved(tx, user, id);
    requirePermission(user, 'search.change', { authorId: personId });
    if (change.shared) requirePermission(user, 'search.share');
    const after = {
      name: change.name ?? before.name,
      query: change.query === undefined ? before.query : readQuery(change.query),
      shared: change.shared ?? before.shared,
    };
    await requireFreeName(tx, user, after.name, { except: id, hint: 'Give another name.' });
    await tx.update(savedSearch).set(after).where(eq(savedSearch.id, id));
    await recordAudit(tx, user, {
      action: 'search.change',
      subjectKind: 'search',
      subjectId: id,
      before,
      after,
    });
    return { id, ...after, mine: true, by };
  });
}

export function removeSavedSearch(user: User, id: string): Promise<void> {
  return withPractice(user, async (tx) => {
    const { id: _, personId, by: _by, ...before } = await holdSaved(tx, user, id);
    requirePermission(user, 'search.remove', { authorId: personId });
    await tx.delete(savedSearch).where(eq(savedSearch.id, id));
    await recordAudit(tx, user, { action: 'search.remove', subjectKind: 'search', subjectId: id, before });
  });
}

const ofPerson = ({ practiceId, personId }: User) =>
  and(eq(savedSearch.practiceId, practiceId), eq(savedSearch.personId, personId));

/** Of two that a person saves at once the second waits, and is counted and named after the first. */
const oneAtATime = (tx: Tx, { personId }: User) =>
  tx.execute(sql`select pg_advisory_xact_lock(hashtext(${personId}))`);

async function requireFreeName(
  tx: Tx,
  user: User,
  name: string,
  { except, hint }: { readonly except?: string; readonly hint: string },
): Promise<void> {
  const [taken] = await tx
    .select({ name: savedSearch.name })
    .from(savedSearch)
    .where(
      and(
        ofPerson(user),
        sql`lower(${savedSearch.name}) = lower(${name})`,
        except === undefined ? undefined : ne(savedSearch.id, except),
      ),
    );
  if (taken)
    throw invalid([
      {
        pointer: '/name',
        code: 'duplicate',
        message: `You have a search called “${taken.name}” already. ${hint}`,
      },
    ]);
}

function readQuery(query: string): string {
  const read = understood(query);
  if (read !== '') return read;
  throw invalid([
    {
      pointer: '/query',
      code: 'not_allowed',
      message: 'This asks for nothing. Set a filter, an order or columns first.',
    },
  ]);
}
