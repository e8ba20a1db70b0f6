import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { writtenTemplates } from '../../../tests/support/templates';
import type { Written } from './draft';
import { asWritten } from './written';
import { readerOf } from './written.server';

const SLUG = 'propped-cantilever-overhang-uniform';
const canopy = writtenTemplates.get(SLUG) as Written;

function readTemplate(document: Written) {
  const reader = readerOf('template');
  if (!reader) throw new Error('templates are read');
  return reader(document);
}

const faultsOf = (document: Written): string[] => {
  const reading = readTemplate(document);
  return reading.ok ? [] : reading.faults.map(({ pointer, code }) => `${pointer} ${code}`);
};

describe('a template as written', () => {
  test.each([...writtenTemplates])('%s comes back as it was written', (_, written) => {
    const reading = readTemplate(written as Written);
    expect(reading.ok && asWritten(reading.body)).toEqual(written);
  });

  test('that is empty names every part that is missing, in words', () => {
    const reading = readTemplate({});
    if (reading.ok) throw new Error('nothing is no template');
    expect(reading.faults).toContainEqual({
      pointer: '/name',
      code: 'missing',
      message: 'Missing. Give text.',
    });
    expect(reading.faults.map(({ pointer }) => pointer)).toContain('/beam');
  });

  test('is checked for meaning where its form is right, though other parts are missing', () => {
    const { proof_cases: _, sources: __, method: ___, ...rest } = canopy;
    expect(faultsOf(rest)).toEqual(['/method missing', '/sources missing', '/proof_cases missing']);
    const beam = { ...Object(canopy['beam']), length: 'L + w' };
    expect(faultsOf({ ...rest, beam })).toContain('/beam/length unsound');
  });

  test('that would be a mechanism is told so before it is whole', () => {
    const { proof_cases: _, ...rest } = canopy;
    const beam = { ...Object(canopy['beam']), supports: [{ at: 'L', kind: 'roller' }], redundants: [] };
    expect(faultsOf({ ...rest, beam, results: [], rules: [] })).toContain('/beam/supports unstable');
  });

  test.each([
    ['/method', { method: 'See <script>alert(1)</script> the table.' }],
    ['/method', { method: 'See [the table](javascript:alert(1)).' }],
    ['/method', { method: 'See <img src=x onerror=alert(1)>.' }],
    [
      '/sources/0/derivation',
      { sources: [{ id: 'aisc', publication: 'P', from_memory: true, derivation: '<!-- x -->' }] },
    ],
  ])('with HTML or a script in %s is refused there', (at, change) => {
    expect(faultsOf({ ...canopy, ...change })).toContain(`${at} html`);
  });

  test('may compare in its notes', () => {
    expect(faultsOf({ ...canopy, method: 'Where a < L and L > 2a the tip moves up.' })).toEqual([]);
  });
});

test('criteria are read by their schema', () => {
  const written = JSON.parse(readFileSync('data/criteria/timber-elastic-en.json', 'utf8'));
  const reader = readerOf('criteria');
  expect(reader?.(written)).toEqual({ ok: true, body: written });
  expect(reader?.({ ...written, deflection: [] })).toMatchObject({
    faults: [{ pointer: '/deflection', code: 'out_of_range' }],
  });
});
