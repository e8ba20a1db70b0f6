import { readFileSync } from 'node:fs';
import { dirname, resolve } from 'node:path';
import { expect, test } from 'vitest';

/** Every module that a file loads, and what those load; type-only imports load nothing. */
function loaded(file: string, into = new Set<string>()): Set<string> {
  const text = readFileSync(file, 'utf8');
  for (const [, names = '', from = ''] of text.matchAll(/^(?:import|export) ([^;]*?)from '([^']+)';/gm)) {
    if (names.startsWith('type ')) continue;
    const next = from.startsWith('.') ? resolve(dirname(file), `${from}.ts`) : from;
    if (into.has(next)) continue;
    into.add(next);
    if (from.startsWith('.')) loaded(next, into);
  }
  return into;
}

test('the browser’s entry loads neither the maths library nor the schemas', () => {
  const modules = [...loaded('src/engine/template/index.ts')];
  expect(modules.length).toBeGreaterThan(20);
  expect(modules.filter((name) => /^(mathjs|zod)/.test(name))).toEqual([]);
});
