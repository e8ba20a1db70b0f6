import { sql } from 'drizzle-orm';
import { connection, type Tx } from '@/db/client';
import { log } from '@/lib/log';

/** What every web process hears when it is committed. Ids only: whoever is told reads the rest as themselves. */
export type LiveEvent =
  /** What the person is told of has changed. */
  | { readonly type: 'notice' }
  /** A run of the worker's has come further. */
  | { readonly type: 'progress'; readonly id: string }
  /** A session or token has ended; without an id every one of the person's. The database's triggers say it. */
  | { readonly type: 'sign_in_ended'; readonly id: string | null };

export interface Published {
  readonly practice: string;
  /** Null: everybody in the practice. */
  readonly people: readonly string[] | null;
  readonly event: LiveEvent;
}

const CHANNEL = 'putlog_events';
/** A payload has at most 8000 bytes; an id takes 39 of them. */
const PEOPLE_AT_ONCE = 150;

/**
 * Tells the open pages of a person (null: of everybody in the practice), in whatever web process they are held, once
 * the transaction is committed. Outside a transaction, at once.
 */
export async function publish(
  tx: Pick<Tx, 'execute'>,
  practiceId: string,
  people: string | readonly string[] | null,
  event: LiveEvent,
): Promise<void> {
  const all = typeof people === 'string' ? [people] : people;
  if (all === null) return notify(tx, { practice: practiceId, people: null, event });
  for (let at = 0; at < all.length; at += PEOPLE_AT_ONCE)
    await notify(tx, { practice: practiceId, people: all.slice(at, at + PEOPLE_AT_ONCE), event });
}

async function notify(tx: Pick<Tx, 'execute'>, published: Published): Promise<void> {
  await tx.execute(sql`select pg_notify(${CHANNEL}, ${JSON.stringify(published)})`);
}

/**
 * Hears what is published, over one connection of this process's own that comes back by itself. Done when it hears for
 * the first time. `onGap`: the connection was away, and what was published meanwhile is missed.
 */
export function hearEvents(onEvent: (published: Published) => void, onGap: () => void): Promise<void> {
  return new Promise((resolve) => {
    let heardBefore = false;
    const onHearing = () => {
      if (heardBefore) onGap();
      heardBefore = true;
      resolve();
    };
    connection()
      .sql.listen(CHANNEL, (payload) => onEvent(JSON.parse(payload)), onHearing)
      .catch((error: unknown) => log.error('events are not heard yet', { error })); // the driver goes on trying
  });
}
