import { spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';

/** The project's folder, wherever the command was given. */
export const ROOT = fileURLToPath(new URL('../..', import.meta.url));

/** Something that the person at the terminal must do first. Shown without a stack. */
export class Stop extends Error {}

/** Whoever reads our output may go away; that is no reason to fall over. */
process.stdout.on('error', () => undefined);

const running = new Set();
process.on('exit', () => {
  for (const child of running) child.kill();
});

/** Runs a program to its end and gives back what it printed. Its last lines are part of the error when it fails. */
export function run(program, args, { cwd = ROOT, env = process.env, input = '' } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, { cwd, env, stdio: ['pipe', 'pipe', 'pipe'] });
    running.add(child);
    let out = '';
    let all = '';
    child.stdout.on('data', (text) => {
      out += text;
      all += text;
    });
    child.stderr.on('data', (text) => {
      all += text;
    });
    child.stdin.on('error', () => undefined); // it may end without reading
    child.stdin.end(input);
    child.on('error', (cause) => reject(new Stop(`${program} cannot be started: ${cause.message}`)));
    child.on('close', (code, signal) => {
      running.delete(child);
      if (code === 0) resolve(out);
      else reject(new Stop(`${[program, ...args].join(' ')} failed (${signal ?? code}).\n${tail(all)}`));
    });
  });
}

const tail = (text) => text.trimEnd().split('\n').slice(-40).join('\n');

/** A TypeScript program of ours, to its end. */
export const runScript = (name, args, env) =>
  run(process.execPath, ['--import', 'tsx', `scripts/${name}.ts`, ...args], {
    env: { ...process.env, ...env },
  });

/** One line on the terminal for each step, with its seconds. */
export async function step(title, work) {
  const began = performance.now();
  process.stdout.write(`${title} … `);
  try {
    const result = await work();
    process.stdout.write(`${((performance.now() - began) / 1000).toFixed(1)} s\n`);
    return result;
  } catch (error) {
    process.stdout.write('failed\n');
    throw error;
  }
}
