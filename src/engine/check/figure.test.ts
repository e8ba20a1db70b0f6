import { expect, test } from 'vitest';
import { texQuotient } from './figure';

const numbersOf = (tex: string): number[] =>
  [...tex.replaceAll('\\,', ' ').matchAll(/(\d[\d ]*(?:\.\d+)?)\s*\\mathrm/g)].map(([, number = '']) =>
    Number(number.replaceAll(' ', '')),
  );

test('a quotient as it is written comes to the stress as it is shown', () => {
  for (let k = 1; k <= 400; k++) {
    const moment = 1234.5 * k ** 1.31;
    const modulus = 1.0371e-5 * k ** 0.93;
    const tex = texQuotient(
      { value: moment, purpose: 'moment' },
      { value: modulus, purpose: 'section_modulus' },
      'stress',
      'metric',
    );
    const [kNm = 0, cm3 = 1, shown = 0] = numbersOf(tex);
    // kNm over cm³ is 1000 N/mm².
    const found = (1000 * kNm) / cm3;
    const digits = 10 ** Math.max(0, 2 - Math.floor(Math.log10(shown)));
    expect(Math.round(found * digits) / digits, tex).toBeCloseTo(shown, 8);
  }
});
