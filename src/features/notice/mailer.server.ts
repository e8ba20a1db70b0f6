import { setTimeout as sleep } from 'node:timers/promises';
import { log } from '@/lib/log';
import { mailServer } from '@/services/mail';
import { type Mailing, sendDueMail } from './outbox.server';

/** Milliseconds between two looks into the outbox, and while the server or the database is away. */
const PAUSE = { usual: 2000, away: 30_000 };

export interface Mailer {
  /** Ends with the message in hand. */
  readonly stop: () => Promise<void>;
}

/** What the worker's environment says about mail; null: none is sent. */
export function readMailing(env: NodeJS.ProcessEnv): Mailing | null {
  const url = env['PUTLOG_SMTP_URL'];
  if (!url) return null;
  const origin = env['ORIGIN'];
  if (!origin) throw new Error('ORIGIN is not set: the links in e-mails need it');
  const { hostname, origin: base } = new URL(origin);
  const address = env['PUTLOG_MAIL_FROM'] || `putlog@${hostname}`;
  return { server: mailServer(url), from: { name: 'Putlog', address }, origin: base };
}

/** Sends what is in the outbox for as long as the worker runs. */
export function keepSending(mailing: Mailing): Mailer {
  const stopping = new AbortController();
  const done = sendUntil(stopping.signal, mailing);
  return {
    stop: () => {
      stopping.abort();
      return done;
    },
  };
}

async function sendUntil(stopping: AbortSignal, mailing: Mailing): Promise<void> {
  while (!stopping.aborted) {
    const reached = await sendDueMail(mailing, stopping).catch((error: unknown) => {
      log.error('mail not sent', { error });
      return false;
    });
    mailing.server.rest();
    await sleep(reached ? PAUSE.usual : PAUSE.away, undefined, { signal: stopping }).catch(() => undefined);
  }
}
