import type { User } from '@/features/account/account';
import { AppError } from '@/lib/app-error';
import { log } from '@/lib/log';
import { hearEvents, type Published } from '@/services/events';
import { liveMessage } from './live';
import { countUnread } from './notice.server';

/** Streams of one person in one web process. A browser needs one, however many pages it has open. */
export const MOST_STREAMS = 10;
/** Milliseconds between two signs of life: proxies cut what is silent for a minute. */
const BEAT_EVERY = 25_000;
/** Notices come in bursts; they are counted once, this many milliseconds after the first. */
const COUNT_AFTER = 50;
/** Milliseconds until a browser asks again, spread so that they do not all come at once. */
const retryAfter = () => 1000 + Math.floor(Math.random() * 3000);

interface Stream {
  readonly user: User;
  readonly send: (text: string) => void;
  readonly end: () => void;
}

/** By practice and person. */
const streams = new Map<string, Set<Stream>>();
const counting = new Set<string>();
let hearing: Promise<void> | undefined;
let beating: NodeJS.Timeout | undefined;

const keyOf = (practiceId: string, personId: string): string => `${practiceId}/${personId}`;

/**
 * Opens the person's stream: the number of unread notices, then whatever is published for them. It ends with their
 * sign-in; whoever comes back begins with the number again, so that nothing is missed.
 */
export async function openStream(user: User): Promise<ReadableStream<Uint8Array>> {
  hearing ??= hearEvents(onEvent, endAll);
  await hearing;
  const key = keyOf(user.practiceId, user.personId);
  if ((streams.get(key)?.size ?? 0) >= MOST_STREAMS)
    throw new AppError('too_many_requests', `${MOST_STREAMS} streams are open already. Close one.`, {
      headers: { 'Retry-After': '60' },
    });
  const stream = hold(user, key);
  // Held first: what is told while it counts is counted again.
  const unread = await countUnread(user).catch((error: unknown) => {
    stream.end();
    throw error;
  });
  stream.send(liveMessage('unread', { unread }));
  return stream.body;
}

function hold(user: User, key: string): Stream & { readonly body: ReadableStream<Uint8Array> } {
  const encoder = new TextEncoder();
  let controller: ReadableStreamDefaultController<Uint8Array> | undefined;
  const letGo = () => {
    controller = undefined;
    const held = streams.get(key);
    held?.delete(stream);
    if (held?.size === 0) streams.delete(key);
    if (streams.size === 0) clearInterval(beating);
  };
  const body = new ReadableStream<Uint8Array>({
    start: (given) => {
      controller = given;
    },
    cancel: letGo,
  });
  const stream = {
    user,
    body,
    send: (text: string) => controller?.enqueue(encoder.encode(text)),
    end: () => {
      controller?.close();
      letGo();
    },
  };
  stream.send(`retry: ${retryAfter()}\n\n`);
  if (streams.size === 0) beating = setInterval(beatAll, BEAT_EVERY);
  streams.set(key, (streams.get(key) ?? new Set()).add(stream));
  return stream;
}

const allStreams = (): Stream[] => [...streams.values()].flatMap((held) => [...held]);

function beatAll(): void {
  for (const stream of allStreams()) stream.send(':\n\n');
}

/** What was missed is not known: everybody comes back and begins anew. */
function endAll(): void {
  for (const stream of allStreams()) stream.end();
}

function onEvent({ practice, people, event }: Published): void {
  const found = people
    ? people.flatMap((person) => [...(streams.get(keyOf(practice, person)) ?? [])])
    : allStreams().filter(({ user }) => user.practiceId === practice);
  for (const stream of found) {
    if (event.type === 'notice') countSoon(stream.user);
    else if (event.type === 'progress') stream.send(liveMessage('progress', { id: event.id }));
    else if (event.id === null || event.id === stream.user.via.id) stream.end();
  }
}

function countSoon(user: User): void {
  const key = keyOf(user.practiceId, user.personId);
  if (counting.has(key)) return;
  counting.add(key);
  setTimeout(() => {
    counting.delete(key);
    countUnread(user)
      .then((unread) => {
        for (const stream of streams.get(key) ?? []) stream.send(liveMessage('unread', { unread }));
      })
      .catch((error: unknown) => log.error('unread notices not counted', { error }));
  }, COUNT_AFTER);
}
