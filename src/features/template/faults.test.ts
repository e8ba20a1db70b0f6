import { describe, expect, test } from 'vitest';
import { readParameters } from '@/engine/template';
import { shippedTemplate } from '../../../tests/support/templates';
import { saidAndAdvice, toCauses, toDrawingFault } from './faults';

const canopy = shippedTemplate('propped-cantilever-overhang-uniform');
const causesOf = (given: Record<string, string>) => {
  const read = readParameters(canopy, given);
  if (read.ok) return [];
  const faults = read.faults.map(({ path, ...fault }) => ({
    ...fault,
    pointer: ['/parameters', ...path].join('/'),
  }));
  return toCauses(canopy, faults);
};

describe('what a fault says', () => {
  test('comes apart after its first sentence, not at a decimal point', () => {
    expect(saidAndAdvice('Span is 0.1 m. Give 0.3 m to 30 m.')).toEqual([
      'Span is 0.1 m',
      'Give 0.3 m to 30 m.',
    ]);
    expect(saidAndAdvice('The values do not meet.')).toEqual(['The values do not meet.', '']);
  });
});

describe('the cloud on the drawing', () => {
  test('is over the first length that is wrong', () => {
    expect(toDrawingFault(canopy, causesOf({ w: '900 kN/m', a: '40 m' }))).toEqual({
      text: 'Overhang is 40\u00a0m',
      advice: 'Give 0\u00a0m to 15\u00a0m.',
      place: 'a',
    });
  });

  test('is left out where no length is wrong', () => {
    expect(causesOf({ w: '900 kN/m' })).toHaveLength(1);
    expect(toDrawingFault(canopy, causesOf({ w: '900 kN/m' }))).toBeUndefined();
  });
});
