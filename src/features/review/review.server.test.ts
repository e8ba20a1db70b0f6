import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { auditEvent } from '@/db/schema/audit';
import { revision } from '@/db/schema/library';
import { withPractice } from '@/db/tenancy';
import type { Role } from '@/features/account/roles';
import { AppError } from '@/lib/app-error';
import { draftOf, issuedOf, refusal, webConnection } from '../../../tests/support/database';
import { foundPractice, type Member } from '../../../tests/support/practice';
import { REVISION_STATES, REVISION_STEPS, type RevisionState } from './review';
import { takeStep } from './review.server';

let librarian: Member;
let checker: Member;
let otherChecker: Member;
let reader: Member;

beforeAll(async () => {
  [librarian, checker, otherChecker, reader] = await members(
    ['librarian'],
    ['checker'],
    ['checker'],
    ['reader'],
  );
});

async function members(...staff: readonly (readonly Role[])[]) {
  const [a, b, c, d] = await foundPractice(...staff);
  if (!a || !b || !c || !d) throw new Error('four people were founded');
  return [a, b, c, d] as const;
}

const refusedWith = (step: Promise<unknown>): Promise<string> =>
  step.then(
    () => 'taken',
    (error: unknown) => (error instanceof AppError ? error.code : String(error)),
  );

const read = (id: string) =>
  withPractice(librarian, async (tx) => {
    const [row] = await tx.select().from(revision).where(eq(revision.id, id));
    if (!row) throw new Error('the revision was read');
    return row;
  });

describe('a revision', () => {
  test('goes from draft through review to issue, and each step is in the audit chain', async () => {
    const { revisionId } = await issuedOf(librarian, checker, 'whole-way');
    const row = await read(revisionId);
    expect(row).toMatchObject({
      state: 'issued',
      number: 1,
      authorId: librarian.personId,
      reviewerId: checker.personId,
    });
    expect(row.submittedAt && row.issuedAt && row.submittedAt <= row.issuedAt).toBe(true);
    const events = await withPractice(librarian, (tx) =>
      tx.select().from(auditEvent).where(eq(auditEvent.subjectId, revisionId)).orderBy(auditEvent.sequence),
    );
    expect(events.map(({ action, actorId }) => [action, actorId])).toEqual([
      ['revision.draft', librarian.personId],
      ['revision.submit', librarian.personId],
      ['revision.issue', checker.personId],
    ]);
  });

  test('returned to its author is a draft again', async () => {
    const { revisionId } = await draftOf(librarian, 'returned');
    await takeStep(librarian, revisionId, { step: 'submit' });
    await takeStep(checker, revisionId, {
      step: 'return',
      comment: 'The sign of the tip term.',
      pointer: '',
    });
    expect(await read(revisionId)).toMatchObject({ state: 'draft', submittedAt: null, reviewerId: null });
  });

  test('issued takes the place of the one before it', async () => {
    const first = await issuedOf(librarian, checker, 'replaced');
    const second = await issuedOf(librarian, checker, 'replaced');
    expect(second.number).toBe(2);
    expect((await read(first.revisionId)).state).toBe('superseded');
    expect((await read(second.revisionId)).state).toBe('issued');
  });

  test('withdrawn carries its reason, even when it had been superseded', async () => {
    const first = await issuedOf(librarian, checker, 'wrong');
    await issuedOf(librarian, checker, 'wrong');
    const reason = 'The sign of the tip term is wrong.';
    await takeStep(librarian, first.revisionId, { step: 'withdraw', reason, severity: 'safety' });
    expect(await read(first.revisionId)).toMatchObject({
      state: 'withdrawn',
      withdrawalReason: reason,
      withdrawalSeverity: 'safety',
      withdrawnById: librarian.personId,
    });
  });
});

describe('a step is refused', () => {
  test('to the author who would issue her own work', async () => {
    const [author, , ,] = await members(['librarian', 'checker'], ['checker'], ['checker'], ['reader']);
    const { revisionId } = await draftOf(author, 'own-work');
    await takeStep(author, revisionId, { step: 'submit' });
    expect(await refusedWith(takeStep(author, revisionId, { step: 'issue' }))).toBe('forbidden');
    expect(
      await refusedWith(
        takeStep(author, revisionId, { step: 'return', comment: 'The sign of the tip term.', pointer: '' }),
      ),
    ).toBe('forbidden');
  });

  test('to a person without the role', async () => {
    const { revisionId } = await draftOf(librarian, 'no-role');
    expect(await refusedWith(takeStep(reader, revisionId, { step: 'submit' }))).toBe('forbidden');
    await takeStep(librarian, revisionId, { step: 'submit' });
    expect(await refusedWith(takeStep(reader, revisionId, { step: 'issue' }))).toBe('forbidden');
  });

  test('from any state that it does not start from', async () => {
    const { revisionId } = await issuedOf(librarian, checker, 'wrong-state');
    expect(await refusedWith(takeStep(librarian, revisionId, { step: 'submit' }))).toBe('illegal_step');
    expect(await refusedWith(takeStep(checker, revisionId, { step: 'issue' }))).toBe('illegal_step');
    const draft = await draftOf(librarian, 'still-a-draft');
    expect(await refusedWith(takeStep(checker, draft.revisionId, { step: 'issue' }))).toBe('illegal_step');
    expect((await read(draft.revisionId)).state).toBe('draft');
  });

  test('without a reason for a withdrawal', async () => {
    const { revisionId } = await issuedOf(librarian, checker, 'no-reason');
    const step = takeStep(librarian, revisionId, { step: 'withdraw', reason: ' ', severity: 'service' });
    expect(await refusedWith(step)).toBe('invalid');
  });

  test('for another practice’s revision, as if it did not exist', async () => {
    const [stranger] = await members(['librarian', 'checker'], ['reader'], ['reader'], ['reader']);
    const { revisionId } = await draftOf(librarian, 'of-others');
    expect(await refusedWith(takeStep(stranger, revisionId, { step: 'submit' }))).toBe('not_found');
  });
});

test('of two approvals at once one is told the state changed', async () => {
  const { revisionId } = await draftOf(librarian, 'two-at-once');
  await takeStep(librarian, revisionId, { step: 'submit' });
  const outcomes = await Promise.all([
    refusedWith(takeStep(checker, revisionId, { step: 'issue' })),
    refusedWith(takeStep(otherChecker, revisionId, { step: 'issue' })),
  ]);
  expect(outcomes.sort()).toEqual(['illegal_step', 'taken']);
});

test('of two revisions of a document issued at once one is left in force', async () => {
  const first = await draftOf(librarian, 'two-revisions');
  const second = await draftOf(librarian, 'two-revisions');
  for (const { revisionId } of [first, second]) await takeStep(librarian, revisionId, { step: 'submit' });
  await Promise.all([
    takeStep(checker, first.revisionId, { step: 'issue' }),
    takeStep(otherChecker, second.revisionId, { step: 'issue' }),
  ]);
  const states = [await read(first.revisionId), await read(second.revisionId)].map(({ state }) => state);
  expect(states.sort()).toEqual(['issued', 'superseded']);
});

test('drafts begun at once get numbers of their own', async () => {
  const keys = await Promise.all([1, 2, 3].map(() => draftOf(librarian, 'numbered')));
  expect(keys.map(({ number }) => number).sort()).toEqual([1, 2, 3]);
});

test('the database allows the moves of the step table and no others', async () => {
  const legal = new Set(
    Object.values(REVISION_STEPS).flatMap(({ from, to }) => from.map((state) => `${state}>${to}`)),
  );
  const reached: Record<RevisionState, () => Promise<string>> = {
    draft: async () => (await draftOf(librarian, crypto.randomUUID())).revisionId,
    in_review: async () => {
      const id = await reached.draft();
      await takeStep(librarian, id, { step: 'submit' });
      return id;
    },
    issued: async () => (await issuedOf(librarian, checker, crypto.randomUUID())).revisionId,
    superseded: async () => {
      const slug = crypto.randomUUID();
      const { revisionId } = await issuedOf(librarian, checker, slug);
      await issuedOf(librarian, checker, slug);
      return revisionId;
    },
    withdrawn: async () => {
      const id = await reached.issued();
      await takeStep(librarian, id, { step: 'withdraw', reason: 'Wrong.', severity: 'cosmetic' });
      return id;
    },
  };
  const sql = webConnection();
  const move = (id: string, to: RevisionState) =>
    refusal(
      sql.begin(async (tx) => {
        await tx`select set_config('app.practice_id', ${librarian.practiceId}, true)`;
        const [row] = await tx`select to_jsonb(revision) as was from revision where id = ${id}`;
        if (!row) throw new Error('the revision is there');
        const sets: Partial<Record<RevisionState, Record<string, string>>> = {
          issued: { state: to, reviewer_id: checker.personId },
          withdrawn: {
            state: to,
            withdrawn_by_id: checker.personId,
            withdrawal_reason: 'Wrong.',
            withdrawal_severity: 'safety',
          },
        };
        await tx`update revision set ${tx(sets[to] ?? { state: to })} where id = ${id}`;
        throw Object.assign(new Error('the move was made, and is undone'), { code: 'moved' });
      }),
    );
  for (const from of REVISION_STATES)
    for (const to of REVISION_STATES.filter((state) => state !== from)) {
      const outcome = await move(await reached[from](), to);
      expect(`${from}>${to} ${outcome}`).toBe(
        `${from}>${to} ${legal.has(`${from}>${to}`) ? 'moved' : 'PL002'}`,
      );
    }
  await sql.end();
});
