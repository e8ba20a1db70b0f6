import { contentHash } from '@/lib/fingerprint';

/** What a use case says about what it did. */
export interface AuditEntry {
  /** noun.verb: `member.save`, `revision.issue`. */
  readonly action: string;
  readonly subjectKind: string;
  readonly subjectId: string;
  /** What changed, from and to; enough to read the event without the row. */
  readonly before?: unknown;
  readonly after?: unknown;
}

export interface AuditEvent {
  readonly practiceId: string;
  readonly sequence: number;
  readonly at: Date;
  readonly actorId: string | null;
  readonly action: string;
  readonly subjectKind: string;
  readonly subjectId: string;
  readonly data: unknown;
  readonly previousHash: string;
  readonly hash: string;
}

/** Where a chain stands. An empty one stands at event 0. */
export interface ChainHead {
  readonly sequence: number;
  readonly hash: string;
}

export const CHAIN_START: ChainHead = { sequence: 0, hash: '0'.repeat(64) };

/** The hash covers everything in the row and, through the hash before it, every row since the first. */
const eventHash = ({ hash: _, at, ...rest }: Omit<AuditEvent, 'hash'> & { readonly hash?: string }): string =>
  contentHash({ ...rest, at: at.toISOString() });

/** The next event of a chain. */
export function linkEvent(
  head: ChainHead,
  entry: AuditEntry,
  by: { readonly practiceId: string; readonly personId: string | null },
  at: Date,
): AuditEvent {
  const { action, subjectKind, subjectId, before = null, after = null } = entry;
  const event = {
    practiceId: by.practiceId,
    sequence: head.sequence + 1,
    at,
    actorId: by.personId,
    action,
    subjectKind,
    subjectId,
    // as the database will give it back: without undefined, with dates as text
    data: JSON.parse(JSON.stringify({ before, after })),
    previousHash: head.hash,
  };
  return { ...event, hash: eventHash(event) };
}

/** Follows a chain on from `head`: where it ends, or the first event at which it is broken. */
export function followChain(
  head: ChainHead,
  events: readonly AuditEvent[],
): { readonly head: ChainHead; readonly fault: string | null } {
  let last = head;
  for (const event of events) {
    const fault = brokenAt(last, event);
    if (fault) return { head: last, fault };
    last = { sequence: event.sequence, hash: event.hash };
  }
  return { head: last, fault: null };
}

function brokenAt(last: ChainHead, event: AuditEvent): string | null {
  const expected = last.sequence + 1;
  if (event.sequence !== expected) return `event ${expected} is missing`;
  if (event.previousHash !== last.hash)
    return `event ${event.sequence} does not follow event ${last.sequence}`;
  return event.hash === eventHash(event) ? null : `event ${event.sequence} was changed`;
}
