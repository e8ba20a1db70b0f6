import { asc, gt, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { auditCheck, auditEvent } from '@/db/schema/audit';
import { type Tenant, withoutPractice, withPractice } from '@/db/tenancy';
import { type AuditEntry, CHAIN_START, type ChainHead, followChain, linkEvent } from './audit';

/**
 * Writes what was done into the practice's chain, in the transaction that does it. Until that ends no other
 * transaction of the practice can write to the chain, so call it last.
 */
export async function recordAudit(tx: Tx, tenant: Tenant, entry: AuditEntry): Promise<void> {
  const [head] = await tx.execute<{ sequence: string; hash: string }>(
    sql`select sequence, hash from audit_head()`,
  );
  if (!head) throw new Error('audit_head() answers with one row, always');
  const event = linkEvent({ sequence: Number(head.sequence), hash: head.hash }, entry, tenant, new Date());
  await tx.insert(auditEvent).values(event);
}

export interface ChainReport {
  readonly practiceId: string;
  readonly head: ChainHead;
  readonly fault: string | null;
}

const PAGE = 1000;

/** Reads a practice's whole chain, and holds it against the place that the last reading reached. */
export function verifyChain(practiceId: string): Promise<ChainReport> {
  return withPractice({ practiceId, personId: null }, async (tx) => {
    const [before] = await tx.select().from(auditCheck);
    let head = CHAIN_START;
    let fault: string | null = null;
    let read = PAGE;
    while (read === PAGE && fault === null) {
      const events = await tx
        .select()
        .from(auditEvent)
        .where(gt(auditEvent.sequence, head.sequence))
        .orderBy(asc(auditEvent.sequence))
        .limit(PAGE);
      read = events.length;
      if (before) fault = missesEarlierHead(before, events);
      const followed = followChain(head, events);
      head = followed.head;
      fault = followed.fault ?? fault;
    }
    if (fault === null && before && before.sequence > head.sequence)
      fault = `events ${head.sequence + 1} to ${before.sequence} were cut off the end`;
    await keep(tx, practiceId, fault ? { ...(before ?? CHAIN_START) } : head, fault);
    return { practiceId, head, fault };
  });
}

/** A chain that was written anew from some event on is whole in itself, but does not pass where it passed before. */
function missesEarlierHead(before: ChainHead, events: readonly ChainHead[]): string | null {
  const same = events.find(({ sequence }) => sequence === before.sequence);
  return same && same.hash !== before.hash
    ? `event ${same.sequence} is not the one that was there before`
    : null;
}

async function keep(
  tx: Tx,
  practiceId: string,
  { sequence, hash }: ChainHead,
  fault: string | null,
): Promise<void> {
  const found = { sequence, hash, fault, checkedAt: new Date() };
  await tx
    .insert(auditCheck)
    .values({ practiceId, ...found })
    .onConflictDoUpdate({ target: auditCheck.practiceId, set: found });
}

/** Every practice's chain, one after the other. */
export async function verifyAllChains(): Promise<readonly ChainReport[]> {
  const practices = await withoutPractice().execute<{ id: string }>(sql`select practice_ids() as id`);
  const reports: ChainReport[] = [];
  for (const { id } of practices) reports.push(await verifyChain(id));
  return reports;
}
