import { expect, test } from 'vitest';
import { readStockFile } from './file';
import { isTouched, type Loaded, mend, withCheck } from './loaded';
import type { StockCheck } from './stock';

const reading = readStockFile(new TextEncoder().encode('designation,lengths\nA,x\nB,y\nC,6'));
if (!reading.ok) throw new Error(reading.refusal.message);
const { file } = reading;
const check: StockCheck = {
  ...{ rows: 3, good: 1, fault_count: 0, faults: [] },
  read_as: { delimiter: ',', decimal_mark: '.', encoding: 'utf-8', length_unit: 'm', columns: [] },
};
const loaded: Loaded = { name: 'a', file, rows: file.rows, leftOut: 0, check, checked: file.rows };
const lengths = ({ rows }: Loaded) => rows.map(({ texts }) => texts.lengths);

test('what is typed during a check stays, and is to be checked', () => {
  const pressed = mend(loaded, 2, { lengths: '6' });
  const typed = mend(pressed, 3, { lengths: '7' });
  const after = withCheck(typed, pressed.rows, { ...check, good: 2 });
  expect([lengths(after), after.check.good, isTouched(after)]).toEqual([['6', '7', '6'], 2, true]);
  expect(isTouched(withCheck(pressed, pressed.rows, check))).toBe(false);
});

test('lines that were not sent are left out, and others keep what is typed meanwhile', () => {
  const sent = loaded.rows.filter(({ line }) => line !== 2);
  const after = withCheck(loaded, sent, check);
  expect([lengths(after), after.leftOut, isTouched(after)]).toEqual([['y', '6'], 1, false]);
  const typed = withCheck(mend(loaded, 3, { lengths: '7' }), sent, check);
  expect([lengths(typed), isTouched(typed)]).toEqual([['7', '6'], true]);
});
