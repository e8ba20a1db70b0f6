import { closeConnection } from '@/db/client';
import { sweepSignIns } from '@/features/account/sweep.server';
import { BEAT, beat } from '@/features/admin/health.server';
import { verifyAllChains } from '@/features/audit/audit.server';
import { log } from '@/lib/log';
import { type Task, workQueue } from '@/services/queue';

const url = process.env['DATABASE_URL'];
if (!url)
  throw new Error('DATABASE_URL is not set: give the connection of the role that web and worker share');

const handlers: Readonly<Record<Task, () => Promise<void>>> = {
  'sweep-sign-ins': async () => {
    log.info('swept sign-ins', await sweepSignIns());
  },
  'verify-audit-chains': async () => {
    const reports = await verifyAllChains();
    for (const report of reports.filter(({ fault }) => fault !== null))
      log.error('audit chain broken', { ...report });
    log.info('verified audit chains', { practices: reports.length });
  },
};

const startedAt = new Date();
const queue = await workQueue(url, handlers, (error) => log.error('queue', { error }));

/** Late by one database failover, never dead by it. */
const signalLife = () =>
  beat(startedAt).catch((error: unknown) => log.error('no sign of life given', { error }));
await signalLife();
process.send?.('ready');
const pulse = setInterval(signalLife, BEAT.every * 1000);

let stopping = false;
async function stop(): Promise<void> {
  if (stopping) return;
  stopping = true;
  clearInterval(pulse);
  await queue.stop();
  await closeConnection();
  process.exit(0);
}

for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, stop);
// The program that started us is gone, and with it whoever would have stopped us.
process.on('disconnect', stop);
