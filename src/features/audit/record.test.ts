import { readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { actionWords } from './record';

/** What the use cases write into the record, read from their source. */
function recordedActions(): string[] {
  const files = readdirSync('src/features', { recursive: true, encoding: 'utf8' });
  const written = files
    .filter((file) => file.endsWith('.server.ts'))
    .flatMap((file) => {
      const source = readFileSync(`src/features/${file}`, 'utf8');
      const whole = [...source.matchAll(/action: '([a-z.-]+)',\s+subjectKind/g)].map(
        ([, action = '']) => action,
      );
      const ofImports = [...source.matchAll(/record\(tx, actor, row, '([a-z]+)'/g)].map(
        ([, step = '']) => `import.${step}`,
      );
      return [...whole, ...ofImports];
    });
  return [...new Set(written)];
}

test('every action that is recorded has words', () => {
  const actions = recordedActions();
  expect(actions.length).toBeGreaterThan(20);
  expect(actions.filter((action) => actionWords(action) === action)).toEqual([]);
});
