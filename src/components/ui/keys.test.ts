import { expect, test } from 'vitest';
import { createKeyReader, takesTyping } from './keys';

const press = (
  key: string,
  held: Partial<Record<'ctrlKey' | 'metaKey' | 'altKey' | 'isComposing', boolean>> = {},
) => ({
  key,
  ctrlKey: false,
  metaKey: false,
  altKey: false,
  isComposing: false,
  ...held,
});

test('a single letter is read without its case', () => {
  const read = createKeyReader();
  expect(read(press('N'), false, 0)).toEqual({ kind: 'key', key: 'n' });
  expect(read(press('?'), false, 0)).toEqual({ kind: 'key', key: '?' });
});

test('single letters are off inside a field and with a modifier held', () => {
  const read = createKeyReader();
  expect(read(press('n'), true, 0)).toBeUndefined();
  expect(read(press('n', { ctrlKey: true }), false, 0)).toBeUndefined();
  expect(read(press('n', { isComposing: true }), false, 0)).toBeUndefined();
});

test('G then a letter goes to that zone, even when the letter has a meaning of its own', () => {
  const read = createKeyReader();
  expect(read(press('g'), false, 0)).toBeUndefined();
  expect(read(press('n'), false, 400)).toEqual({ kind: 'zone', letter: 'N' });
  expect(read(press('n'), false, 500)).toEqual({ kind: 'key', key: 'n' });
});

test('G followed by nothing for a while is forgotten', () => {
  const read = createKeyReader();
  read(press('g'), false, 0);
  expect(read(press('c'), false, 2000)).toEqual({ kind: 'key', key: 'c' });
});

test('text fields, lists and editable text take typing; boxes and buttons do not', () => {
  expect(takesTyping({ tagName: 'INPUT', type: 'text' })).toBe(true);
  expect(takesTyping({ tagName: 'select' })).toBe(true);
  expect(takesTyping({ tagName: 'DIV', isContentEditable: true })).toBe(true);
  expect(takesTyping({ tagName: 'INPUT', type: 'checkbox' })).toBe(false);
  expect(takesTyping({ tagName: 'BUTTON' })).toBe(false);
});
