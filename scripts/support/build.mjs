import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ROOT, run, step } from './command.mjs';

const SOURCES = ['src', 'public', 'data', 'astro.config.mjs', 'tsconfig.json', 'package-lock.json'];
const STAMP = join(ROOT, 'dist/.sources');

/** Builds when a source has changed since the last whole build. */
export async function ensureBuild() {
  const sources = hashSources();
  if (existsSync(STAMP) && readFileSync(STAMP, 'utf8') === sources) return;
  rmSync(STAMP, { force: true });
  await step('Building the pages', () => run(process.execPath, ['node_modules/astro/astro.js', 'build']));
  writeFileSync(STAMP, sources);
}

function hashSources() {
  const hash = createHash('sha256').update(process.versions.node);
  for (const path of SOURCES.flatMap(filesUnder)) hash.update(path).update(readFileSync(join(ROOT, path)));
  return hash.digest('hex');
}

const isTest = (path) => /\.test\.tsx?$/.test(path);

function filesUnder(path) {
  const full = join(ROOT, path);
  if (!existsSync(full)) return [];
  if (!statSync(full).isDirectory()) return [path];
  return readdirSync(full)
    .sort()
    .flatMap((name) => filesUnder(join(path, name)))
    .filter((file) => !isTest(file));
}
