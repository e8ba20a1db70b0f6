import { describe, expect, test } from 'vitest';
import { type Acting, type Key, Traces } from '@/engine/why';
import { MOVEMENTS } from '@/features/member/solve';
import { stripViews } from '@/features/member/views';
import { demoPage, MEMBERS } from '../../../tests/support/member-page';
import { figureKey, stationKey } from './keys';
import { actingGroup, governingActing, loadingOf } from './member-loading';

const member = MEMBERS.find(({ mark }) => mark === 'LF4');
if (!member) throw new Error('the demo has its canopy');
const { evaluation, subject } = demoPage(member);
const traces = new Traces(subject);
const answerTo = (key: Key | null) => (key ? Math.abs(traces.why(key).value) : Number.NaN);

describe('what acts in each view of a member', () => {
  test.each(stripViews(evaluation).map((view) => [view.name, view] as const))(
    '%s: its reactions and peaks are those that it draws',
    { timeout: 30_000 },
    (_, view) => {
      const loading = loadingOf(evaluation, view);
      const { solution, envelopes, reactions = solution.reactions } = view.draw();
      reactions.forEach(({ vertical }, support) => {
        const figure = { kind: 'reaction', support, component: 'vertical' } as const;
        expect(answerTo(figureKey(figure, solution, loading))).toBeCloseTo(Math.abs(vertical), 3);
      });
      for (const quantity of ['shear', 'moment', 'deflection'] as const) {
        const { max, min } = solution.extremes[quantity];
        const drawn =
          envelopes?.[quantity]?.peaks ?? [max, min].map(({ at, value }) => ({ x: at[0] ?? 0, value }));
        for (const { x, value } of drawn) {
          const key = figureKey({ kind: 'peak', quantity, x, value, isZero: false }, solution, loading);
          expect(answerTo(key), `${quantity} at ${x}`).toBeCloseTo(
            Math.abs(value),
            quantity === 'deflection' ? 9 : 2,
          );
        }
      }
    },
  );

  test('a cell of the envelope is what governs there', () => {
    const view = stripViews(evaluation).find(({ id }) => id === 'envelope');
    if (!view) throw new Error('there is an envelope');
    const { solution } = view.draw();
    const loading = loadingOf(evaluation, view);
    const cell = { quantity: 'moment', x: 2.5, side: 'left', bound: 'upper' } as const;
    const combinations = evaluation.strength.map(({ combination }) => combination);
    const [station] = evaluation.superposed.envelope(combinations, [2.5]).stations;
    expect(answerTo(stationKey(cell, solution, loading))).toBeCloseTo(station?.moment.max.value ?? 0, 3);
    expect(loading.at('moment', 2.5, null)).toBeNull();
  });

  test('groups, the supports’ own movements, and a combination that is not there', () => {
    expect(actingGroup('G')).toEqual({ kind: 'group', group: 'G' } satisfies Acting);
    expect(actingGroup(MOVEMENTS)).toEqual({ kind: 'group', group: null } satisfies Acting);
    expect(governingActing(evaluation, { combination: 'none', pattern: [] })).toBeNull();
  });
});
