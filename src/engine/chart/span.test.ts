import { describe, expect, test } from 'vitest';
import { chartTerms, type Expression, formula, type NamedLoad } from './index';

/** Which of the printed cases a load on a simple span is put together from, where the section is. */
const VALUES: Record<string, number> = { L: 6, a: 1, b: 4, x: 2, end: 6, w: 3, u: 5, k: 0.1, P: 2 };
const SETTING = { value: (name: string) => VALUES[name] ?? Number.NaN, ei: formula('EI'), length: 6 };
const SPAN = { kind: 'simple', left: [], right: formula('L') } as const;

const cases = (load: NamedLoad, place: Expression) =>
  chartTerms(SPAN, load, place, 'deflection', SETTING)!.map(({ chart }) => chart.id.replace('simple-', ''));
const line = (from: string, to: string, w0: string, w1: string): NamedLoad => ({
  kind: 'line',
  from: formula(from),
  to: formula(to),
  w0: formula(w0),
  w1: formula(w1),
});
const curvature = (from: string, to: string): NamedLoad => ({
  kind: 'curvature',
  from: formula(from),
  to: formula(to),
  kappa: formula('k'),
});

describe('a simple span has the case of the chart for', () => {
  test.each([
    ['a load over all of it', line('0', 'L', 'w', 'w'), ['uniform']],
    ['a load rising over all of it', line('0', 'L', '0', 'w'), ['rising']],
    ['a load falling over all of it, seen from the right', line('0', 'L', 'w', '0'), ['rising']],
    ['a trapezoid over all of it', line('0', 'L', 'w', 'u'), ['uniform', 'rising']],
    ['a load from the left support', line('0', 'b', 'w', 'w'), ['part-uniform']],
    ['a load to the right support', line('b', 'L', 'w', 'w'), ['part-uniform']],
    ['a load rising from the left support', line('0', 'b', '0', 'w'), ['part-rising']],
    ['a load falling from the left support', line('0', 'b', 'w', '0'), ['part-falling']],
    ['a load rising to the right support', line('b', 'L', '0', 'w'), ['part-falling']],
    ['a curvature from the left support', curvature('0', 'b'), ['curvature']],
    ['a curvature to the right support', curvature('b', 'L'), ['curvature']],
  ])('%s', (_, load, wanted) => {
    expect(cases(load, formula('x'))).toEqual(wanted);
  });

  test('a load that reaches no support: from the side where the section is, or what is left of the whole', () => {
    const load = line('a', 'b', 'w', 'w');
    const [two, three] = [
      ['part-uniform', 'part-uniform'],
      ['uniform', 'part-uniform', 'part-uniform'],
    ];
    expect(cases(load, formula('a/2'))).toEqual(two);
    expect(cases(load, formula('a'))).toEqual(two);
    expect(cases(load, formula('x'))).toEqual(three);
    expect(cases(load, formula('b'))).toEqual(two);
    expect(cases(load, formula('b+a'))).toEqual(two);
  });

  test('no force that stands on a support, whatever its place is called', () => {
    const force = (at: string): NamedLoad => ({ kind: 'point', at: formula(at), p: formula('P') });
    for (const at of ['0', 'L', 'end', 'x-2*a']) expect(cases(force(at), formula('x'))).toEqual([]);
    expect(cases(force('b'), formula('x'))).toEqual(['point']);
  });
});
