import { spawn } from 'node:child_process';
import { setTimeout as sleep } from 'node:timers/promises';
import { ROOT } from './command.mjs';
import { isReady } from './ports.mjs';
import { endProcess, identify, waitUntil } from './processes.mjs';

const FIRST_WAIT = 500;
const LONGEST_WAIT = 30_000;
const STEADY_AFTER = 60_000;
/** Seconds in which a child may finish what it has in hand. */
const DRAIN = 25;

export const PROGRAMS = {
  web: ['scripts/web.mjs'],
  // It reads files of 100,000 rows. Collected so late as by default, what it is done with would take 450 MB; so it is 240.
  worker: [
    '--max-semi-space-size=32',
    '--heap-growing-percent=40',
    '--enable-source-maps',
    'dist/worker.mjs',
  ],
};

/**
 * Keeps one of our programs running: when it dies it is started again, after a longer wait each time it dies young.
 * In a process group of its own, so that Ctrl-C reaches it through us; it ends by itself when our channel to it closes.
 */
function keepRunning(name, env, onStart) {
  let child;
  let wait = FIRST_WAIT;
  let stopping = false;
  let sayReady;
  const ready = new Promise((resolve) => {
    sayReady = resolve;
  });

  const start = () => {
    const began = Date.now();
    child = spawn(process.execPath, PROGRAMS[name], {
      cwd: ROOT,
      env: { ...process.env, ...env },
      detached: true,
      stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
    });
    onStart(identify(child.pid));
    child.once('message', sayReady);
    child.on('exit', async (code, signal) => {
      if (stopping) return;
      if (Date.now() - began > STEADY_AFTER) wait = FIRST_WAIT;
      console.log(`The ${name} process ended (${signal ?? code}). Starting it again in ${wait / 1000} s.`);
      await sleep(wait);
      wait = Math.min(wait * 2, LONGEST_WAIT);
      if (!stopping) start();
    });
  };

  start();
  return {
    /** It has said for the first time that it does its work. */
    ready,
    stop: async () => {
      stopping = true;
      if (child.exitCode === null && child.signalCode === null) await endProcess(child.pid, DRAIN);
    },
  };
}

/** Starts web and worker. They are ready when both have said so and the web process agrees; false after a minute. */
export function startAll(env, port, onStart = () => undefined) {
  const children = Object.keys(PROGRAMS).map((name) =>
    keepRunning(name, env, (identity) => onStart(name, identity)),
  );
  const said = Promise.all(children.map(({ ready }) => ready));
  const late = sleep(60_000, 'late', { ref: false });
  return {
    stop: () => Promise.all(children.map((child) => child.stop())),
    ready: Promise.race([said, late]).then((first) => first !== 'late' && waitUntil(() => isReady(port), 30)),
  };
}
