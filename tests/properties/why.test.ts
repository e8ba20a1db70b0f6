import { describe, expect, test } from 'vitest';
import { admissibleSets } from '@/engine/model';
import { authored, writtenTemplates } from '../support/templates';
import { askedOf, subjectOf, wrongIn } from '../support/traced';

/** Sets of redundants, the last ones, beside the template's own that are asked about. */
const MOST_SETS = 1;

describe.each([...writtenTemplates])('%s', (_, written) => {
  const template = authored(written);

  test('every number of its page comes from its parts, down to what was given', () => {
    const subject = subjectOf(template);
    expect(wrongIn(subject, askedOf(subject))).toEqual([]);
  });

  test('and so it does with other redundants', () => {
    const { beam } = subjectOf(template);
    for (const redundants of [...admissibleSets(beam)].slice(-MOST_SETS)) {
      const subject = subjectOf(template, {}, { redundants }, { system: 'us' });
      expect(wrongIn(subject, askedOf(subject))).toEqual([]);
    }
  });
});
