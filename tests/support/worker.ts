import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';
import { ORIGIN } from './env';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));

export interface Worker {
  /** As by power failure: nothing is finished, nothing is said. */
  readonly kill: () => Promise<void>;
  readonly stop: () => Promise<void>;
}

/** The product's own worker, in a process that can be killed. */
export async function startWorker(env: NodeJS.ProcessEnv): Promise<Worker> {
  const child = spawn(process.execPath, ['--import', 'tsx', 'scripts/worker.ts'], {
    cwd: ROOT,
    env: { ...process.env, ORIGIN, ...env },
    stdio: ['ignore', 'ignore', 'inherit', 'ipc'],
  });
  await Promise.race([
    once(child, 'message'),
    once(child, 'exit').then(() => Promise.reject(new Error('The worker ended before it was ready'))),
  ]);
  return { kill: () => end(child, 'SIGKILL'), stop: () => end(child, 'SIGTERM') };
}

async function end(child: ChildProcess, signal: NodeJS.Signals): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  child.kill(signal);
  await once(child, 'exit');
}
