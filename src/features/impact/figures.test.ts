import { describe, expect, test } from 'vitest';
import type { CheckRow } from '@/engine/check';
import { type Compared, changesBetween, isSame } from './figures';
import { shareText, turnText } from './words';

const extreme = (value: number) => ({ value, at: [0] });
const range = (max: number, min: number) => ({ max: extreme(max), min: extreme(min) });

const check = (id: string, title: string, ratio: number): CheckRow => ({
  id,
  kind: id.startsWith('deflection') ? 'deflection' : 'bending',
  title,
  place: 'span A–B',
  clause: '',
  demand: ratio,
  capacity: 1,
  dimension: 'ratio',
  ratio,
  combination: '',
  at: 0,
  symbols: '',
  numbers: '',
});

const result = (change: Partial<Compared> = {}, moment = 40_000): Compared => ({
  total: {
    reactions: [
      { at: 6, vertical: 20_000, moment: 0 },
      { at: 0, vertical: 30_000, moment: -moment },
    ],
    extremes: {
      shear: range(30_000, -20_000),
      moment: range(22_500, -moment),
      slope: range(0, 0),
      deflection: range(0, -0.004),
    },
  },
  checks: { rows: [check('bending', 'Bending stress', 0.8)], findings: [] },
  ...change,
});

const rows = (...all: CheckRow[]): Partial<Compared> => ({ checks: { rows: all, findings: [] } });

describe('what changes of a member', () => {
  test('is nothing between a result and itself, whatever rounding leaves', () => {
    expect(isSame(changesBetween(result(), result()))).toBe(true);
    expect(isSame(changesBetween(result(), result({}, 40_000 * (1 + 1e-12))))).toBe(true);
  });

  test('is a share of what it was, of either sign, with supports lettered from the left', () => {
    const { figures, largest } = changesBetween(result(), result({}, 44_000));
    expect(figures.map(({ name, share }) => [name, share])).toEqual([
      ['Moment reaction at A', expect.closeTo(0.1, 12)],
      ['Largest hogging moment', expect.closeTo(0.1, 12)],
    ]);
    expect(largest).toBeCloseTo(0.1, 12);
  });

  test('of next to nothing is measured against the largest of its kind', () => {
    const small = result();
    const grown = {
      ...small,
      total: { ...small.total, extremes: { ...small.total.extremes, deflection: range(1e-5, -0.004) } },
    };
    // 0.01 mm up out of nothing, where 4 mm is the largest: 0.01/(4/1000), and not without end.
    expect(changesBetween(small, grown).figures).toMatchObject([
      { name: 'Largest deflection up', share: expect.closeTo(2.5, 9) },
    ]);
  });

  test('flips a check that passes with the one and fails with the other, and a finding that comes', () => {
    const after = result({
      checks: {
        rows: [check('bending', 'Bending stress', 1.01)],
        findings: [{ id: 'uplift-A', title: 'Uplift at A', detail: '', at: 0 }],
      },
    });
    const { checks, flips, findings } = changesBetween(result(), after);
    expect(checks).toMatchObject([{ from: 0.8, to: 1.01, flips: true }]);
    expect([flips, findings.come, findings.go]).toEqual([2, ['Uplift at A'], []]);
  });

  test('knows a deflection limit by its name, wherever it stands and whatever it allows', () => {
    const before = result(rows(check('deflection-0-A-B', 'Deflection, total load, L/250', 0.5)));
    const after = result(
      rows(
        check('deflection-0-A-B', 'Deflection, snow, L/360', 0.4),
        check('deflection-1-A-B', 'Deflection, total load, L/200', 0.4),
      ),
    );
    expect(changesBetween(before, after).checks).toMatchObject([
      { title: 'Deflection, total load, L/200', from: 0.5, to: 0.4, flips: false },
      { title: 'Deflection, snow, L/360', from: null, to: 0.4, flips: true },
    ]);
  });

  test('loses every check where there is none any more', () => {
    const { checks, flips, largest } = changesBetween(result(), result({ checks: null }));
    expect([checks.length, flips, largest]).toEqual([1, 1, 1]);
  });
});

test('changes are said with their sign, and turns in words', () => {
  expect([shareText(0.0123), shareText(-0.5), shareText(null)]).toEqual(['+1.2 %', '\u221250 %', '–']);
  expect(turnText(0.9, 1.2)).toBe('passes, then fails');
  expect(turnText(null, 0.4)).toBe('is not made, then passes');
});
