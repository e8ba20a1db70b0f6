import { readFileSync } from 'node:fs';
import { setTimeout as sleep } from 'node:timers/promises';

/** Since when a process has run: with its number, an identity that is not given out twice. Null when it is gone. */
function startedAt(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    return fields[0] === 'Z' ? null : fields[19];
  } catch {
    return null;
  }
}

export const identify = (pid) => ({ pid, startedAt: startedAt(pid) });

/** Whether it is the process that was recorded, not a later one of the same number, and runs what we think. */
export function isSame(recorded, command) {
  if (!recorded?.pid || startedAt(recorded.pid) !== recorded.startedAt) return false;
  return recorded.startedAt !== null && commandLine(recorded.pid).includes(command);
}

export function commandLine(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').replaceAll('\0', ' ');
  } catch {
    return '';
  }
}

/** Asks a process to end, and after `seconds` ends it. */
export async function endProcess(pid, seconds) {
  const since = startedAt(pid);
  const gone = () => since === null || startedAt(pid) !== since;
  const deadline = Date.now() + seconds * 1000;
  if (!gone()) process.kill(pid, 'SIGTERM');
  while (!gone() && Date.now() < deadline) await sleep(50);
  if (!gone()) process.kill(pid, 'SIGKILL');
}

/** Calls `probe` until it answers true; false when the time is over. */
export async function waitUntil(probe, seconds, everyMs = 100) {
  const deadline = Date.now() + seconds * 1000;
  for (;;) {
    if (await probe()) return true;
    if (Date.now() > deadline) return false;
    await sleep(everyMs);
  }
}
