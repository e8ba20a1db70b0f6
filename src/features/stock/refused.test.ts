import { expect, test } from 'vitest';
import { saidAt, saidElsewhere } from './refused';

const fault = (pointer: string, message: string) => ({ pointer, code: 'any', message });
const FIELDS = ['/note', '/lengths_m'];

test('a fault is said at its field, the others together elsewhere', () => {
  const faults = [fault('/lengths_m/0', 'Too short.'), fault('/table', 'Which?'), fault('/id', 'Gone.')];
  const refused = { message: '3 things are wrong.', faults };
  expect([saidAt(refused, '/lengths_m'), saidAt(refused, '/note')]).toEqual(['Too short.', undefined]);
  expect(saidElsewhere(refused, FIELDS)).toBe('Which? Gone.');
  expect(saidElsewhere({ ...refused, faults: faults.slice(0, 1) }, FIELDS)).toBeNull();
});

test('a refusal of no field is said in its own words', () => {
  expect(saidElsewhere({ message: 'The server does not answer.', faults: [] }, FIELDS)).toBe(
    'The server does not answer.',
  );
  expect([saidElsewhere(null, FIELDS), saidAt(null, '/note')]).toEqual([null, undefined]);
});
