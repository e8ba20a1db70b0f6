import { beforeAll, describe, expect, test } from 'vitest';
import { withPractice } from '@/db/tenancy';
import { refusal, webConnection } from '../../../tests/support/database';
import { foundPractice, type Member, owner } from '../../../tests/support/practice';
import { recordAudit, verifyAllChains, verifyChain } from './audit.server';

let member: Member;

beforeAll(async () => {
  member = await newMember();
});

async function newMember(): Promise<Member> {
  const [first] = await foundPractice(['engineer']);
  if (!first) throw new Error('one person was founded');
  return first;
}

const record = (by: Member, subjectId: string, after: unknown = { width: 0.1 + 0.2, name: 'Träger “A”' }) =>
  withPractice(by, (tx) =>
    recordAudit(tx, by, { action: 'job.create', subjectKind: 'job', subjectId, after }),
  );

/** As somebody with the owner's powers would who switches the guards off. */
const tamper = (statement: string) =>
  owner.sql.begin(async (tx) => {
    await tx`alter table audit_event disable trigger user`;
    await tx.unsafe(statement);
    await tx`alter table audit_event enable trigger user`;
  });

const chainOf = async (length: number): Promise<Member> => {
  const by = await newMember();
  for (let index = 1; index <= length; index += 1) await record(by, String(index));
  return by;
};

describe('the chain of a practice', () => {
  test('is whole after events written at once', async () => {
    await Promise.all(Array.from({ length: 20 }, (_, index) => record(member, String(index))));
    expect(await verifyChain(member.practiceId)).toMatchObject({ fault: null, head: { sequence: 20 } });
  });

  test('has no event of a transaction that failed', async () => {
    const by = await chainOf(1);
    const failing = withPractice(by, async (tx) => {
      await recordAudit(tx, by, { action: 'job.create', subjectKind: 'job', subjectId: 'x' });
      throw new Error('something else went wrong');
    });
    await expect(failing).rejects.toThrow('something else');
    expect(await verifyChain(by.practiceId)).toMatchObject({ fault: null, head: { sequence: 1 } });
  });

  test('is the practice’s own', async () => {
    const other = await chainOf(2);
    expect((await verifyChain(other.practiceId)).head.sequence).toBe(2);
    const reports = await verifyAllChains();
    expect(reports.map(({ practiceId }) => practiceId)).toEqual(
      expect.arrayContaining([member.practiceId, other.practiceId]),
    );
  });

  test('shows an event that was changed', async () => {
    const by = await chainOf(3);
    await tamper(
      `update audit_event set data = '{"after": 1}' where practice_id = '${by.practiceId}' and sequence = 2`,
    );
    expect((await verifyChain(by.practiceId)).fault).toBe('event 2 was changed');
  });

  test('shows an event that was taken out', async () => {
    const by = await chainOf(3);
    await tamper(`delete from audit_event where practice_id = '${by.practiceId}' and sequence = 2`);
    expect((await verifyChain(by.practiceId)).fault).toBe('event 2 is missing');
  });

  test('shows events cut off its end since it was last read', async () => {
    const by = await chainOf(3);
    await verifyChain(by.practiceId);
    await tamper(`delete from audit_event where practice_id = '${by.practiceId}' and sequence >= 2`);
    expect((await verifyChain(by.practiceId)).fault).toBe('events 2 to 3 were cut off the end');
  });

  test('written anew with hashes that fit shows against the last reading', async () => {
    const by = await chainOf(3);
    await verifyChain(by.practiceId);
    await tamper(`delete from audit_event where practice_id = '${by.practiceId}' and sequence >= 2`);
    await record(by, 'forged');
    await record(by, 'forged');
    expect((await verifyChain(by.practiceId)).fault).toBe('event 3 is not the one that was there before');
    // Still so at the next reading: a fault does not move the mark.
    expect((await verifyChain(by.practiceId)).fault).toBe('event 3 is not the one that was there before');
  });
});

test('web’s role can neither change nor remove an event, nor write one out of turn', async () => {
  const by = await chainOf(2);
  const sql = webConnection();
  const asWeb = (statement: string) =>
    refusal(
      sql.begin(async (tx) => {
        await tx`select set_config('app.practice_id', ${by.practiceId}, true)`;
        await tx.unsafe(statement);
      }),
    );
  const denied = '42501';
  expect(await asWeb(`update audit_event set action = 'x'`)).toBe(denied);
  expect(await asWeb('delete from audit_event')).toBe(denied);
  expect(await asWeb('truncate audit_event')).toBe(denied);
  const columns = 'practice_id, sequence, at, action, subject_kind, subject_id, data, previous_hash, hash';
  const forged = (sequence: number) =>
    `insert into audit_event (${columns}) values ('${by.practiceId}', ${sequence}, now(), 'x', 'x', 'x', '{}', repeat('0', 64), repeat('1', 64))`;
  expect(await asWeb(forged(3))).toBe('PL003');
  expect(await asWeb(forged(7))).toBe('PL003');
  await sql.end();
});

test('not even the owner changes or removes an event while the guards are on', async () => {
  await chainOf(1);
  expect(await refusal(owner.sql`update audit_event set action = 'x'`)).toBe('PL001');
  expect(await refusal(owner.sql`delete from audit_event`)).toBe('PL001');
  expect(await refusal(owner.sql`truncate audit_event cascade`)).toBe('PL001');
});
