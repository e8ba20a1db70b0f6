import { expect, test } from 'vitest';
import { jsonText, lineAt, linesOf, namedFirst, parseJson } from './json';

const document = {
  name: 'A "b" {',
  beam: { supports: [{ at: '0' }, { at: 'L' }], loads: [], none: {} },
  tags: ['x'],
  n: 1,
};

test('each pointer has the line on which the text shows it', () => {
  const text = jsonText(document).split('\n');
  const lines = linesOf(document);
  const shown = (at: string) => text[lineAt(lines, at) - 1]?.trim();
  expect(shown('')).toBe('{');
  expect(shown('/beam/supports/1/at')).toBe('"at": "L"');
  expect(shown('/beam/loads')).toBe('"loads": [],');
  expect(shown('/beam/none')).toBe('"none": {}');
  expect(shown('/tags/0')).toBe('"x"');
  expect(shown('/n')).toBe('"n": 1');
});

test('what is not there is shown at the part around it', () => {
  const lines = linesOf(document);
  expect(lineAt(lines, '/beam/supports/1/kind')).toBe(lineAt(lines, '/beam/supports/1'));
  expect(lineAt(lines, '/missing')).toBe(1);
});

test.each([
  ['[]', /object/],
  ['null', /object/],
  ['{"a":', /./],
  ['{"a": {"__proto__": 1}}', /__proto__/],
  ['{"a": "\\u0000"}', /NUL/],
  ['{"a": "\\ud800"}', /half of a pair/],
  [`{"a": ${'['.repeat(80)}${']'.repeat(80)}}`, /levels/],
])('%s is refused in words', (text, message) => {
  const reading = parseJson(text);
  expect(reading.ok).toBe(false);
  expect(reading.ok ? '' : reading.message).toMatch(message);
});

test('what a document is called stands first, and nothing is lost', () => {
  const ordered = namedFirst({ use: [], name: 'A', beam: {}, reference: 'B' });
  expect(Object.keys(ordered)).toEqual(['reference', 'name', 'use', 'beam']);
});
