import './support/node-version.mjs';
import { rmSync, writeFileSync } from 'node:fs';
import { setTimeout as sleep } from 'node:timers/promises';
import { ensureBuild } from './support/build.mjs';
import { PROGRAMS, startAll } from './support/children.mjs';
import { startCluster, stopCluster } from './support/cluster.mjs';
import { Stop, step } from './support/command.mjs';
import { openDatabase, prepareDatabase } from './support/database.mjs';
import { catchMail } from './support/demo-mail.mjs';
import { openHome, readJson, writeJson } from './support/home.mjs';
import { startObjectStore } from './support/object-store.mjs';
import { ensureNodePackages } from './support/packages.mjs';
import { isReady, portIsFree } from './support/ports.mjs';
import { endProcess, identify, isSame, waitUntil } from './support/processes.mjs';

const port = Number(process.env.PORT || 4321);
const origin = process.env.ORIGIN || `http://localhost:${port}`;
const demo = process.env.DEMO ?? 'true';

/** How to stop what was started; the last is stopped first. */
const ends = [];
let stopping = false;

async function main() {
  if (!Number.isInteger(port) || port < 1 || port > 65_535)
    throw new Stop('PORT must be a number from 1 to 65535. Without it the port is 4321.');
  const home = openHome();
  const record = { start: identify(process.pid), port, origin, children: {} };
  if (!(await claim(home, record))) return;
  ends.push(() => rmSync(home.running, { force: true }));

  await ensureNodePackages();
  if (!(await portIsFree(port)))
    throw new Stop(`Port ${port} is taken by another program. Give another: PORT=${port + 1} npm start`);
  if (!process.env.DATABASE_URL) ends.push(() => stopCluster(home.data));
  const database = await openDatabase(home);
  record.database = database.app;
  const signIns = await prepareDatabase(database, { demo: true });
  await ensureBuild();
  await step('Starting web and worker', () => startChildren(home, record, database));
  if (database.cluster) ends.push(watchCluster(home, database.cluster));

  console.log(`\nPutlog is at ${origin}\n`);
  if (demo === 'true') console.log(signIns);
  console.log('Ctrl-C stops it.');
}

/** One start at a time: false when another one is under way or done, which is then said. */
async function claim(home, record) {
  for (;;) {
    try {
      writeFileSync(home.running, JSON.stringify(record), { flag: 'wx', mode: 0o600 });
      return true;
    } catch (error) {
      if (error.code !== 'EEXIST') throw error;
    }
    const other = readJson(home.running) ?? (await sleep(500, null)) ?? readJson(home.running);
    if (other && isSame(other.start, 'start.mjs')) {
      await sayRunning(other);
      return false;
    }
    await tidyUp(other);
    rmSync(home.running, { force: true });
  }
}

async function sayRunning({ port: at, origin: address }) {
  const ready = await waitUntil(() => isReady(at), 90, 1000);
  console.log(
    ready ? `Putlog is running at ${address}` : `Putlog is starting at ${address}, and not ready yet.`,
  );
}

/** A start that was killed leaves its web and worker for a moment: they end when they notice. */
async function tidyUp(record) {
  for (const [name, child] of Object.entries(record?.children ?? {}))
    if (isSame(child, PROGRAMS[name].at(-1))) await endProcess(child.pid, 10);
}

async function startChildren(home, record, database) {
  const mail = demo === 'true' && !process.env.PUTLOG_SMTP_URL ? await catchMail() : null;
  if (mail) ends.push(mail.stop);
  const store =
    demo === 'true' && !process.env.PUTLOG_S3_BUCKET ? await startObjectStore(home.objects) : null;
  if (store) ends.push(store.stop);
  // For the development server, which shares what is running.
  record.store = store?.env;
  const env = {
    ...mail?.env,
    ...store?.env,
    DATABASE_URL: database.app,
    PORT: String(port),
    ORIGIN: origin,
    DEMO: demo,
    NODE_ENV: 'production',
  };
  const children = startAll(env, port, (name, identity) => {
    record.children[name] = identity;
    writeJson(home.running, record);
  });
  ends.push(children.stop);
  if (!(await children.ready) && !stopping)
    throw new Stop('Web and worker do not become ready. What they printed stands above.');
}

/** Starts PostgreSQL again when it has died, where it was; web and worker find it by themselves. */
function watchCluster(home, cluster) {
  let busy = false;
  const timer = setInterval(async () => {
    if (busy || stopping || cluster.isUp()) return;
    busy = true;
    console.log('PostgreSQL ended. Starting it again.');
    await startCluster({ data: home.data, password: home.ownerPassword }).catch((error) =>
      console.log(error.message),
    );
    busy = false;
  }, 1000);
  return () => clearInterval(timer);
}

async function stop(code) {
  if (stopping) return;
  stopping = true;
  if (code === 0) console.log('\nStopping.');
  for (const end of ends.reverse()) await end();
  process.exit(code);
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => stop(0));

main().catch(async (error) => {
  if (stopping) return;
  console.error(error instanceof Stop ? `\n${error.message}` : error);
  await stop(1);
});
