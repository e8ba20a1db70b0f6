import { randomBytes } from 'node:crypto';
import { chmodSync, existsSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { homedir } from 'node:os';
import { join, resolve } from 'node:path';

/** Where this machine's Putlog keeps its database and what it must remember. PUTLOG_HOME overrides. */
function homeFolder() {
  if (process.env.PUTLOG_HOME) return resolve(process.env.PUTLOG_HOME);
  // Not below /root: the database's own user could not reach it there.
  if (process.getuid?.() === 0) return '/var/lib/putlog';
  return join(process.env.XDG_DATA_HOME || join(homedir(), '.local/share'), 'putlog');
}

/** Opens the folder: passwords of the database's roles, made once, and a file for what is running. */
export function openHome(folder = homeFolder()) {
  mkdirSync(folder, { recursive: true });
  chmodSync(folder, 0o711);
  const state = join(folder, 'state.json');
  if (!existsSync(state)) writeJson(state, { ownerPassword: secret(), appPassword: secret() });
  return {
    folder,
    data: join(folder, 'postgres'),
    objects: join(folder, 'objects'),
    running: join(folder, 'running.json'),
    ...readJson(state),
  };
}

const secret = () => randomBytes(24).toString('base64url');

export function readJson(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch (error) {
    if (error.code === 'ENOENT' || error instanceof SyntaxError) return null;
    throw error;
  }
}

/** Readable by its owner only, and never half written. */
export function writeJson(file, value) {
  writeFileSync(`${file}.new`, `${JSON.stringify(value, null, 2)}\n`, { mode: 0o600 });
  renameSync(`${file}.new`, file);
}
