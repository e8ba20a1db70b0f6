import './support/node-version.mjs';
import { spawn } from 'node:child_process';
import { ROOT, Stop } from './support/command.mjs';
import { urls } from './support/database.mjs';
import { openHome, readJson } from './support/home.mjs';
import { isSame } from './support/processes.mjs';

/** What can be run on the installation that `npm start` keeps: node scripts/run.mjs token EMAIL */
const PROGRAMS = ['token', 'audit-verify'];

function main([name, ...args]) {
  if (!PROGRAMS.includes(name)) throw new Stop(`Give one of: ${PROGRAMS.join(', ')}.`);
  const child = spawn(process.execPath, ['--import', 'tsx', `scripts/${name}.ts`, ...args], {
    cwd: ROOT,
    stdio: 'inherit',
    env: { ...process.env, DATABASE_URL: databaseUrl() },
  });
  child.on('exit', (code) => {
    process.exitCode = code ?? 1;
  });
}

function databaseUrl() {
  const home = openHome();
  if (process.env.DATABASE_URL) return urls(process.env.DATABASE_URL, home).app;
  const record = readJson(home.running);
  if (record?.database && isSame(record.start, 'start.mjs')) return record.database;
  throw new Stop('Putlog is not running here. Start it with npm start.');
}

try {
  main(process.argv.slice(2));
} catch (error) {
  console.error(error instanceof Stop ? error.message : error);
  process.exitCode = 1;
}
