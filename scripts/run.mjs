import './support/node-version.mjs';
import { spawn } from 'node:child_process';
import { ROOT, Stop } from './support/command.mjs';
import { urls } from './support/database.mjs';
import { openHome, readJson } from './support/home.mjs';
import { isSame } from './support/processes.mjs';

/** What can be run on the installation that `npm start` keeps: node scripts/run.mjs token EMAIL */
const PROGRAMS = {
  token: ['--import', 'tsx', 'scripts/token.ts'],
  'audit-verify': ['--import', 'tsx', 'scripts/audit-verify.ts'],
  dev: ['node_modules/astro/astro.js', 'dev', '--port', '4322'],
};
/** Of the development server, beside the one that is running. */
const DEV_ORIGIN = 'http://localhost:4322';

function main([name, ...args]) {
  if (!Object.hasOwn(PROGRAMS, name)) throw new Stop(`Give one of: ${Object.keys(PROGRAMS).join(', ')}.`);
  const home = openHome();
  const child = spawn(process.execPath, [...PROGRAMS[name], ...args], {
    cwd: ROOT,
    stdio: 'inherit',
    env: {
      ORIGIN: DEV_ORIGIN,
      DEMO: 'true',
      ...readJson(home.running)?.store,
      ...process.env,
      DATABASE_URL: databaseUrl(home),
    },
  });
  child.on('exit', (code) => {
    process.exitCode = code ?? 1;
  });
}

function databaseUrl(home) {
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
