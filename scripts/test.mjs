import './support/node-version.mjs';
import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { ensureBuild } from './support/build.mjs';
import { startAll } from './support/children.mjs';
import { startCluster, stopCluster } from './support/cluster.mjs';
import { ROOT, Stop, step } from './support/command.mjs';
import { createDatabase, prepareDatabase, urls } from './support/database.mjs';
import { catchMail } from './support/demo-mail.mjs';
import { openHome, readJson } from './support/home.mjs';
import { startObjectStore } from './support/object-store.mjs';
import { ensureDebianPackages, ensureNodePackages } from './support/packages.mjs';
import { freePort } from './support/ports.mjs';

/**
 * All the tests, on a database cluster and ports of their own that are thrown away afterwards.
 * A part alone: node scripts/test.mjs --only database tests/http   (parts with commas; then filters for the test runner)
 */
const PARTS = { lint, types, unused, pure, database, build: ensureBuild, e2e };
/** The throw-away database need not survive a power cut. */
const FAST = ['fsync=off', 'synchronous_commit=off', 'full_page_writes=off'];

const { names, filters } = readArguments(process.argv.slice(2));
const folder = mkdtempSync(join(tmpdir(), 'putlog-test-'));
const home = openHome(folder);
const count = { passed: 0, failed: 0 };
const env = { ...process.env, NO_COLOR: '1', FORCE_COLOR: undefined };
const ends = [];
let cluster;

async function main() {
  await ensureNodePackages();
  const needs = { database: ['postgresql'], e2e: ['postgresql', 'chromium'] };
  await ensureDebianPackages([...new Set(names.flatMap((name) => needs[name] ?? []))]);
  const failed = [];
  for (const name of names) if ((await PARTS[name]()) === false) failed.push(name);
  return failed;
}

async function lint() {
  const biome = await tool('biome', 'node_modules/@biomejs/biome/bin/biome', ['check', '.']);
  const eslint = await tool('eslint', 'node_modules/eslint/bin/eslint.js', ['.']);
  return biome && eslint;
}

function types() {
  return tool('astro check', 'node_modules/astro/astro.js', ['check']);
}

function unused() {
  return tool('knip', 'node_modules/knip/bin/knip.js', []);
}

function pure() {
  return vitest('pure', {});
}

async function database() {
  const { owner, app } = await newDatabase('putlog_test', { demo: false });
  const store = await startObjectStore(home.objects);
  ends.push(store.stop);
  return vitest('database', { ...store.env, DATABASE_URL: app, OWNER_DATABASE_URL: owner });
}

/** The journeys through the screens, on a server of their own with the demo practice. */
async function e2e() {
  if (!existsSync(join(ROOT, 'playwright.config.ts'))) return true;
  const { owner, app } = await newDatabase('putlog_e2e', { demo: true });
  await ensureBuild();
  const port = await freePort();
  const origin = `http://localhost:${port}`;
  const mail = await catchMail();
  ends.push(mail.stop);
  const store = await startObjectStore(home.objects);
  ends.push(store.stop);
  const settings = {
    ...mail.env,
    ...store.env,
    DATABASE_URL: app,
    PORT: String(port),
    ORIGIN: origin,
    DEMO: 'true',
    NODE_ENV: 'production',
  };
  const children = startAll(settings, port);
  ends.push(children.stop);
  if (!(await children.ready)) throw new Stop('The server under test does not become ready.');

  const report = join(folder, 'e2e.json');
  const passed = await tool(
    'playwright',
    'node_modules/@playwright/test/cli.js',
    ['test', '--reporter=list,json', ...filters],
    { BASE_URL: origin, DATABASE_URL: app, OWNER_DATABASE_URL: owner, PLAYWRIGHT_JSON_OUTPUT_FILE: report },
  );
  const { expected = 0, flaky = 0, unexpected = 0 } = readJson(report)?.stats ?? {};
  count.passed += expected + flaky;
  count.failed += unexpected;
  return passed;
}

async function newDatabase(name, options) {
  cluster ??= await step('Starting a PostgreSQL for the tests', () =>
    startCluster({ data: home.data, password: home.ownerPassword, settings: FAST }),
  );
  await createDatabase(cluster.url, name);
  const both = urls(cluster.urlOf(name), home);
  await prepareDatabase(both, options);
  return both;
}

async function vitest(project, settings) {
  const report = join(folder, `${project}.json`);
  const passed = await tool(
    `vitest ${project}`,
    'node_modules/vitest/vitest.mjs',
    [
      'run',
      '--project',
      project,
      '--passWithNoTests',
      '--reporter=default',
      '--reporter=json',
      `--outputFile.json=${report}`,
      ...filters,
    ],
    settings,
  );
  const { numPassedTests = 0, numFailedTests = 0 } = readJson(report) ?? {};
  count.passed += numPassedTests;
  count.failed += numFailedTests;
  return passed;
}

/** Runs one of the packages' programs with its output going straight to the terminal. */
function tool(title, program, args, settings = {}) {
  console.log(`\n== ${title}`);
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, [program, ...args], {
      cwd: ROOT,
      stdio: 'inherit',
      env: { ...env, ...settings },
    });
    child.on('error', reject);
    child.on('close', (code) => resolve(code === 0));
  });
}

function readArguments([option, list, ...rest]) {
  if (option === undefined) return { names: Object.keys(PARTS), filters: [] };
  const chosen = (list ?? '').split(',');
  if (option === '--only' && chosen.every((name) => Object.hasOwn(PARTS, name)))
    return { names: chosen, filters: rest };
  console.error(`Use: node scripts/test.mjs [--only ${Object.keys(PARTS).join('|')}[,…] [filters]]`);
  process.exit(2);
}

async function cleanUp() {
  for (const end of ends.splice(0).reverse()) await end();
  await stopCluster(home.data);
  rmSync(folder, { recursive: true, force: true });
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'])
  process.on(signal, async () => {
    await cleanUp();
    process.exit(130);
  });

let failed;
try {
  failed = await main();
} catch (error) {
  console.error(error instanceof Stop ? `\n${error.message}` : error);
  failed = ['preparation'];
}
await cleanUp();
if (failed.length > 0) console.log(`\nNot passed: ${failed.join(', ')}`);
console.log(`\n${count.passed} passed, ${count.failed} failed`);
process.exit(failed.length === 0 && count.failed === 0 ? 0 : 1);
