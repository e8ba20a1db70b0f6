import { describe, expect, test } from 'vitest';
import { answerSolve, LIMITS, solveAnswer } from './beam';

const body = {
  length: 9,
  segments: [{ from: 0, to: 9, ei: 2e7, ga: null }],
  supports: [
    { at: 0, kind: 'fixed' },
    { at: 7, kind: 'roller', rise: 0 },
  ],
  hinges: [],
  loads: [
    { kind: 'point', at: 3, p: 12000 },
    { kind: 'line', from: 0, to: 9, w0: 8000, w1: 8000 },
    { kind: 'couple', at: 5, m: -4000 },
    { kind: 'curvature', from: 0, to: 9, kappa: 1e-4 },
  ],
  redundants: [{ support: 1, component: 'vertical' }],
  stations: 11,
};

function errors(changes: object): string[] {
  const outcome = answerSolve({ ...body, ...changes });
  return outcome.ok ? [] : outcome.errors.map(({ pointer, code }) => `${pointer} ${code}`);
}

function answer(given: unknown) {
  const outcome = answerSolve(given);
  if (!outcome.ok) throw new Error(outcome.errors.map(({ message }) => message).join(' '));
  return outcome.answer;
}

describe('answerSolve', () => {
  test('answers with exactly the fields of the contract', () => {
    const solved = answer(body);
    expect(solveAnswer.parse(solved)).toEqual(solved);
    expect(solved.degree).toBe(1);
    expect(solved.stations).toHaveLength(11);
    expect(solved.force_method).toMatchObject({
      redundants: [{ support: 1, component: 'vertical' }],
      eligible: [
        { support: 0, component: 'vertical' },
        { support: 0, component: 'rotation' },
        { support: 1, component: 'vertical' },
      ],
    });
    expect(solved.proof.method).toBe('direct stiffness');
    expect(
      Math.max(solved.proof.equilibrium, solved.proof.compatibility, solved.proof.agreement),
    ).toBeLessThan(1e-12);
  });

  test('leaves the force method empty where the beam is determinate', () => {
    const solved = answer({ length: 5, ei: 1e6, supports: [{ at: 0, kind: 'fixed' }] });
    expect(solved.force_method).toEqual({
      redundants: [],
      eligible: [],
      flexibility: [],
      gaps: [],
      values: [],
    });
  });

  test('takes text with its unit wherever a quantity stands', () => {
    const typed = {
      length: '12 ft 6 in',
      ei: '29000 kNm²',
      ga: '200 MN',
      supports: [
        { at: '0 m', kind: 'pin', kr: '2000 kNm/rad', rotation: '2 mrad' },
        { at: '12\'-6"', kind: 'free', kv: '5000 kN/m', rise: '-10 mm' },
      ],
      loads: [
        { kind: 'line', from: '0 m', to: '12 ft', w0: '2 kip/ft', w1: '3,8 kN/m' },
        { kind: 'point', at: '1 m', p: '30 kN' },
        { kind: 'couple', at: '2 m', m: '40 kNm' },
        { kind: 'curvature', from: 0, to: '1 m', kappa: '0.0002 1/m' },
      ],
      stations: ['0 m', 1, '12 ft 6 in'],
    };
    const solved = answer(typed);
    expect(solved.stations.map(({ x }) => x)).toEqual([0, 1, 3.81]);
    expect(solved.reactions[1]!.at).toBe(3.81);
  });

  test.each<[string, object, string[]]>([
    ['an unknown field', { lenght: 9 }, ['/lenght unknown_field']],
    [
      'an unknown field of a load',
      { loads: [{ kind: 'point', at: 1, p: 1, w: 2 }] },
      ['/loads/0/w unknown_field'],
    ],
    ['a missing length', { length: undefined }, ['/length missing']],
    ['a number without unit', { length: '12.5' }, ['/length unit_missing']],
    ['an ambiguous number', { length: '1,234 m' }, ['/length ambiguous_number']],
    ['text that is no number', { length: '7,2,3 m' }, ['/length not_a_number']],
    ['a unit of another dimension', { length: '5 kN' }, ['/length unit_wrong_dimension']],
    ['null for a quantity', { length: null }, ['/length wrong_type']],
    ['a number too large for JSON', { length: Number.POSITIVE_INFINITY }, ['/length wrong_type']],
    [
      'an unknown kind of support',
      { supports: [{ at: 0, kind: 'glued' }] },
      ['/supports/0/kind not_allowed'],
    ],
    ['an unknown kind of load', { loads: [{ kind: 'wind' }] }, ['/loads/0/kind wrong_type']],
    ['a load off the beam', { loads: [{ kind: 'point', at: 10, p: 1 }] }, ['/loads/0/at out_of_range']],
    ['a span of zero', { length: 0 }, ['/length not_positive']],
    ['a negative EI', { segments: [{ from: 0, to: 9, ei: -1 }] }, ['/segments/0/ei not_positive']],
    ['an unstable beam', { supports: [{ at: 3, kind: 'pin' }] }, ['/supports unstable']],
    [
      'an ineligible redundant',
      { redundants: [{ at: 7, component: 'moment' }] },
      ['/redundants/0 ineligible_redundant'],
    ],
    ['a wrong count of redundants', { redundants: [] }, ['/redundants wrong_count']],
    [
      'a redundant of no kind',
      { redundants: [{ support: 0, component: 'horizontal' }] },
      ['/redundants/0/component wrong_type'],
    ],
    ['one station', { stations: 1 }, ['/stations out_of_range']],
    ['too many stations', { stations: LIMITS.stations + 1 }, ['/stations out_of_range']],
    [
      'too many loads',
      { loads: Array(LIMITS.loads + 1).fill({ kind: 'point', at: 1, p: 1 }) },
      ['/loads out_of_range'],
    ],
    [
      'too many supports',
      { supports: Array.from({ length: LIMITS.supports + 1 }, (_, i) => ({ at: i / 50, kind: 'pin' })) },
      ['/supports out_of_range'],
    ],
    ['anything but "ignore" for horizontal', { horizontal: true }, ['/horizontal not_allowed']],
  ])('refuses %s', (_, changes, expected) => {
    expect(errors(changes)).toEqual(expected);
  });

  test.each([[null], ['beam'], [[]], [42], [undefined]])('refuses a body that is no object: %j', (given) => {
    const outcome = answerSolve(given);
    expect(outcome).toMatchObject({ ok: false, errors: [{ pointer: '' }] });
  });

  test('says how an unstable beam moves', () => {
    const outcome = answerSolve({ ...body, supports: [{ at: 3, kind: 'pin' }], redundants: undefined });
    expect(outcome).toMatchObject({
      errors: [{ message: expect.stringContaining('It turns about the pin at 3.000 m.') }],
    });
  });
});
