import { constants, setPriority } from 'node:os';
import { closeConnection } from '@/db/client';
import { sweepSignIns } from '@/features/account/sweep.server';
import { BEAT, beat } from '@/features/admin/health.server';
import { verifyAllChains } from '@/features/audit/audit.server';
import { resumeImpacts, runImpact } from '@/features/impact/weigh.server';
import { resumeImports, runImport } from '@/features/imports/work.server';
import { keepSending, readMailing } from '@/features/notice/mailer.server';
import { sweepMail } from '@/features/notice/outbox-sweep.server';
import { proveIssued, resumeProofs, runProof } from '@/features/proof/prove.server';
import { remindOfReviews } from '@/features/review/remind.server';
import { log } from '@/lib/log';
import { type Handlers, type Queue, workQueue } from '@/services/queue';

const handlers: Handlers = {
  'sweep-sign-ins': async () => {
    log.info('swept sign-ins', await sweepSignIns());
    log.info('swept mail', { removed: await sweepMail() });
  },
  'verify-audit-chains': async () => {
    const reports = await verifyAllChains();
    for (const report of reports.filter(({ fault }) => fault !== null))
      log.error('audit chain broken', { ...report });
    log.info('verified audit chains', { practices: reports.length });
  },
  'prove-issued': proveIssued,
  'remind-of-reviews': async () => {
    log.info('reminded of reviews', await remindOfReviews());
  },
  'run-proof': runProof,
  'run-impact': runImpact,
  'run-import': runImport,
};

/** Goes on with what a worker that is gone left behind. */
async function resumeRuns(): Promise<void> {
  await resumeProofs();
  await resumeImpacts();
  await resumeImports();
}

/** Works the queue, and gives a sign of life: late by one database failover, never dead by it. */
async function work(): Promise<Queue> {
  const url = process.env['DATABASE_URL'];
  if (!url)
    throw new Error('DATABASE_URL is not set: give the connection of the role that web and worker share');
  const mailing = readMailing(process.env);
  if (!mailing) log.info('no mail is sent: PUTLOG_SMTP_URL is not set');
  // On a machine that both share, whoever waits for a page comes before whoever waits for a file.
  setPriority(constants.priority.PRIORITY_BELOW_NORMAL);
  const startedAt = new Date();
  const queue = await workQueue(url, handlers, (error) => log.error('queue', { error }));
  await beat(startedAt);
  const pulse = setInterval(
    () => beat(startedAt).catch((error: unknown) => log.error('no sign of life given', { error })),
    BEAT.every * 1000,
  );
  const mailer = mailing && keepSending(mailing);
  resumeRuns().catch((error: unknown) => log.error('runs not resumed', { error }));
  process.send?.('ready');
  return {
    stop: async () => {
      clearInterval(pulse);
      await Promise.all([queue.stop(), mailer?.stop()]);
      await closeConnection();
    },
  };
}

/** Ends the process; whoever keeps it running starts another. */
async function end(code: number, queue?: Promise<Queue>): Promise<never> {
  await queue
    ?.then(({ stop }) => stop())
    .catch((error: unknown) => log.error('worker not ended well', { error }));
  process.exit(code);
}

const queue = work();
queue.catch((error: unknown) => {
  log.error('worker cannot work', { error });
  return end(1);
});

for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => end(0, queue));
// The program that started us is gone, and with it whoever would have stopped us.
process.once('disconnect', () => end(0, queue));
