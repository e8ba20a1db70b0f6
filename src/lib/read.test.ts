import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { pointer } from './pointer';
import { read } from './read';

const Load = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('point'), p: z.number() }),
  z.strictObject({ kind: z.literal('couple'), m: z.number() }),
]);
const Stations = z.union([z.int().min(2), z.array(z.number()).min(1)]);

const faultsOf = (schema: z.ZodType, value: unknown) => {
  const reading = read(schema, value);
  return reading.ok
    ? []
    : reading.faults.map(({ pointer, code, message }) => `${pointer} ${code}: ${message}`);
};

describe('read', () => {
  test('gives the value as the schema puts it out', () => {
    expect(read(z.strictObject({ name: z.string().trim() }), { name: ' Hall ' })).toEqual({
      ok: true,
      value: { name: 'Hall' },
    });
  });

  test('names every unknown field at its own place', () => {
    expect(faultsOf(z.strictObject({ at: z.number() }), { at: 1, 'a/b': 2, kappa: 3 })).toEqual([
      '/a~1b unknown_field: “a/b” is not a field here. Remove it, or correct its name.',
      '/kappa unknown_field: “kappa” is not a field here. Remove it, or correct its name.',
    ]);
  });

  test('tells missing from mistyped', () => {
    const schema = z.strictObject({ length: z.number(), name: z.string(), on: z.boolean() });
    expect(faultsOf(schema, { length: '9', name: null })).toEqual([
      '/length wrong_type: This is text. Give a number.',
      '/name wrong_type: This is null. Give text.',
      '/on missing: Missing. Give true or false.',
    ]);
  });

  test.each([
    [z.number().positive(), 0, 'out_of_range: Give more than 0.'],
    [z.number().max(200), 201, 'out_of_range: Give at most 200.'],
    [z.number(), Number.POSITIVE_INFINITY, 'wrong_type: This is not a finite number. Give a number.'],
    [z.int(), 1.5, 'wrong_type: This is a number with decimals. Give a whole number.'],
    [z.string().min(1), '', 'out_of_range: Empty. Give some text.'],
    [z.string().min(12), 'short', 'out_of_range: Give at least 12 characters.'],
    [z.array(z.number()).min(1), [], 'out_of_range: Give at least 1 entry.'],
    [z.email(), 'somebody', 'wrong_format: Give an e-mail address.'],
    [z.enum(['pin', 'fixed']), 'glued', 'not_allowed: Give one of “pin”, “fixed”.'],
    [z.enum(['pin', 'fixed']), undefined, 'missing: Missing. Give one of “pin”, “fixed”.'],
    [z.strictObject({}), [], 'wrong_type: This is a list. Give an object.'],
  ])('says plainly what is wrong (%#)', (schema, value, said) => {
    expect(faultsOf(schema, value)).toEqual([` ${said}`]);
  });

  test('follows the alternative that was meant', () => {
    expect(faultsOf(Load, { kind: 'point', p: '3' })).toEqual([
      '/p wrong_type: This is text. Give a number.',
    ]);
    expect(faultsOf(Load, { kind: 'wind' })).toEqual(['/kind wrong_type: Give one of “point”, “couple”.']);
    expect(faultsOf(Stations, [0, 'x'])).toEqual(['/1 wrong_type: This is text. Give a number.']);
    expect(faultsOf(Stations, 1)).toEqual([' out_of_range: Give at least 2.']);
    expect(faultsOf(Stations, true)).toEqual([' wrong_type: True or false does not fit here.']);
  });

  test("keeps a schema's own words and code", () => {
    const schema = z
      .string()
      .refine(() => false, { error: 'Give a unit.', params: { code: 'unit_missing' } });
    expect(faultsOf(schema, '12.5')).toEqual([' unit_missing: Give a unit.']);
  });

  test('refuses a prototype key like any unknown field', () => {
    const value: unknown = JSON.parse('{"at": 1, "__proto__": {"admin": true}}');
    expect(faultsOf(z.strictObject({ at: z.number() }), value)).toEqual([
      '/__proto__ unknown_field: “__proto__” is not a field here. Remove it, or correct its name.',
    ]);
  });
});

test('pointer(path) escapes ~ and / and is empty for the whole document', () => {
  expect(pointer(['loads', 2, 'a/b~c'])).toBe('/loads/2/a~1b~0c');
  expect(pointer([])).toBe('');
});
