import { describe, expect, it } from 'vitest';
import { saidAndAdvice, toDrawingFault } from './faults';

describe('what a fault says', () => {
  it('comes apart after its first sentence, not at a decimal point', () => {
    expect(saidAndAdvice('Span is 0.1 m. Give 0.3 m to 30 m.')).toEqual([
      'Span is 0.1 m',
      'Give 0.3 m to 30 m.',
    ]);
    expect(saidAndAdvice('The values do not meet.')).toEqual(['The values do not meet.', '']);
  });
});

describe('the cloud on the drawing', () => {
  const base = { kind: 'quantity', default: {}, min: {}, max: {} };
  const template = {
    parameters: [
      { ...base, symbol: 'w', tex: 'w', name: 'Uniform load', dimension: 'line_load' },
      { ...base, symbol: 'a', tex: 'a', name: 'Overhang', dimension: 'length' },
    ],
  } as unknown as Parameters<typeof toDrawingFault>[0];
  const load = { symbol: 'w', title: 'Uniform load', message: 'Uniform load is 900 kN/m. Give less.' };
  const length = { symbol: 'a', title: 'Overhang', message: 'Overhang is 40 m. Give 0 m to 15 m.' };

  it('is over the first length that is wrong', () => {
    expect(toDrawingFault(template, [load, length])).toEqual({
      text: 'Overhang is 40 m',
      advice: 'Give 0 m to 15 m.',
      place: 'a',
    });
  });

  it('is left out where no length is wrong', () => {
    expect(toDrawingFault(template, [load])).toBeUndefined();
  });
});
