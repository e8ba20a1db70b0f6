import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam/index';
import { type BeamDocument, readBeam } from '@/engine/model/index';
import { drawableBeam } from './drawable';
import { ElevationStrip, type ElevationStripProps } from './ElevationStrip';
import { DRAWING_FORMATS } from './quantity-format';
import { StationTable } from './StationTable';

const PROPPED: BeamDocument = {
  length: 8,
  ei: 2e7,
  supports: [
    { at: 0, kind: 'fixed' },
    { at: 8, kind: 'roller' },
  ],
  loads: [{ kind: 'line', from: 0, to: 8, w0: 10_000, w1: 10_000 }],
};

function solved(document: BeamDocument) {
  const reading = readBeam(document);
  if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
  return { beam: reading.value, solution: solveBeam(reading.value), format: DRAWING_FORMATS.metric };
}

const draw = (document: BeamDocument, more: Partial<ElevationStripProps> = {}) =>
  renderToStaticMarkup(<ElevationStrip {...solved(document)} {...more} />);

/** The texts of a drawing, its runs of lowered and raised letters joined. */
const textsOf = (drawn: string): string[] =>
  [...drawn.matchAll(/<text[^>]*>(.*?)<\/text>/g)].map(([, inside = '']) => inside.replace(/<[^>]*>/g, ''));

const has = (drawn: string, part: string | RegExp): boolean =>
  typeof part === 'string' ? drawn.includes(part) : part.test(drawn);

describe('the elevation strip of a propped cantilever', () => {
  const drawn = draw(PROPPED);

  test('is drawn on the server, without a window', () => {
    expect(has(drawn, 'class="curve-moment"')).toBe(true);
    expect(drawn.match(/class="hatch-/g)).toHaveLength(4);
  });

  // M = −wL²/8 at the wall, 9wL²/128 at 5L/8; R = 5wL/8 and 3wL/8; contraflexure at L/4: handbook case, from memory.
  test('labels the extremes with value, unit and place', () => {
    expect(textsOf(drawn)).toContain('−80.0 kNm at A');
    expect(textsOf(drawn)).toContain('45.0 kNm at 5.000 m');
    expect(textsOf(drawn)).toContain('50.0 kN at A');
    expect(textsOf(drawn)).toContain('−30.0 kN at B');
    expect(textsOf(drawn)).toContain('contraflexure at 2.000 m');
  });

  test('shows a deflection downward as positive, with its part of the span', () => {
    // δ = wL⁴/(185 EI) = 11.1 mm = L/722 at 0.5785 L: handbook case, rounded there, from memory.
    const label = textsOf(drawn).find((text) => text.includes('mm at'));
    expect(label).toMatch(/^11\.1 mm at 4\.62[78] m, span \/ 72[12]$/);
  });

  test('says all of it in one sentence', () => {
    expect(
      has(
        drawn,
        'aria-label="Beam 8.000 m long, fixed at A, 0.000 m; on a roller at B, 8.000 m; one load; largest shear 50.0 kN at A, largest moment −80.0 kNm at A,',
      ),
    ).toBe(true);
  });

  test('says what an envelope comes to where one is drawn, and from what', () => {
    const { moment } = solved(PROPPED).solution.diagrams;
    const peaks = [
      { x: 5, value: 60_000, of: '1.2 D + 1.6 L' },
      { x: 0, value: -112_000, of: '1.4 D' },
    ];
    const enveloped = draw(PROPPED, { envelopes: { moment: { upper: moment, lower: moment, peaks } } });
    expect(
      has(
        enveloped,
        'largest shear 50.0 kN at A, largest moment of the envelope −112.0 kNm at A, from 1.4 D,',
      ),
    ).toBe(true);
  });

  test('has a plumb line that is a slider with a spoken station', () => {
    expect(has(drawn, 'role="slider"')).toBe(true);
    expect(has(drawn, 'aria-valuetext="3.200 m from A"')).toBe(true);
  });

  test('keeps ids out, so that any number of strips stand on one page', () => {
    expect(has(drawn, / id="/)).toBe(false);
  });
});

describe('what the strip shows', () => {
  test('only the quantities asked for', () => {
    const drawn = draw(PROPPED, { quantities: ['shear', 'moment'] });
    expect(has(drawn, 'curve-shear')).toBe(true);
    expect(has(drawn, 'curve-deflection')).toBe(false);
  });

  test('names for lengths and loads, as buttons where they open an input', () => {
    const symbols = {
      lengths: [{ symbol: 'L', from: 0, to: 8, editable: true }],
      loads: [{ symbol: 'w', edits: 'w' }],
    };
    const drawn = draw(PROPPED, { symbols, onEditFigure: () => undefined });
    expect(has(drawn, 'aria-label="Change L = 8.000"')).toBe(true);
    expect(has(drawn, 'aria-label="Change w = 10.0 kN/m"')).toBe(true);
    expect(has(draw(PROPPED, { symbols }), 'role="button"')).toBe(false);
  });

  test.each(['screen', 'phone', 'print'] as const)('figures of short lengths at leaders, on %s', (mode) => {
    const loads = [0.1, 0.2].map((at) => ({ kind: 'point' as const, at, p: 20_000 }));
    const lengths = [
      { symbol: 'a', from: 0, to: 0.1 },
      { symbol: 'b', from: 0.1, to: 0.2 },
    ];
    const drawn = draw({ ...PROPPED, loads }, { mode, symbols: { lengths } });
    expect(textsOf(drawn)).toEqual(expect.arrayContaining(['a = 0.100', 'b = 0.100']));
    const [, leaders = ''] = /class="leader" d="([^"]*)"/.exec(drawn) ?? [];
    expect(leaders.match(/M/g)).toHaveLength(2);
  });

  test('feet and inches for a practice that uses them', () => {
    const drawn = draw(PROPPED, { format: DRAWING_FORMATS.us });
    expect(textsOf(drawn)).toContain('26&#x27;-2 15/16&quot;');
    expect(textsOf(drawn)).toContain('Station from A, ft');
  });

  test('no plumb line and no buttons in print', () => {
    const drawn = draw(PROPPED, { mode: 'print' });
    expect(has(drawn, 'role="slider"')).toBe(false);
    expect(has(drawn, 'curve-moment')).toBe(true);
  });

  test('no readings on the last good drawing', () => {
    const drawn = draw(PROPPED, { dashed: true });
    expect(has(drawn, 'last-good')).toBe(true);
    expect(has(drawn, 'role="slider"')).toBe(false);
  });

  test('the sheet at its height where nothing is drawn: the member has the room of the strips', () => {
    const boxOf = (drawn: string) => /viewBox="([^"]*)"/.exec(drawn)?.[1];
    const fault = { text: 'Span is 0 m', advice: 'Give 1 m to 30 m.', place: 'L' };
    const failing = draw(PROPPED, { solution: null, dashed: true, fault, mode: 'screen' });
    expect(boxOf(failing)).toBe(boxOf(draw(PROPPED, { mode: 'screen' })));
    expect(textsOf(failing)).toContain('Give 1 m to 30 m.');
  });

  test('baselines and a reason, and no diagram, of a beam that moves', () => {
    const document: BeamDocument = { ...PROPPED, supports: [{ at: 2, kind: 'roller' }] };
    const reading = readBeam(document);
    const motion = reading.ok ? undefined : reading.faults.find((fault) => fault.motion)?.motion;
    const beam = drawableBeam(document);
    if (!beam || !motion) throw new Error('expected a mechanism');
    const drawn = renderToStaticMarkup(
      <ElevationStrip
        beam={beam}
        solution={null}
        format={DRAWING_FORMATS.metric}
        motion={motion}
        notDrawn="Not drawn: it turns."
      />,
    );
    expect(textsOf(drawn)).toContain('Not drawn: it turns.');
    expect(drawn.match(/no support/g)).toHaveLength(2);
    expect(has(drawn, 'class="curve-')).toBe(false);
  });
});

describe('the table behind "Show as table"', () => {
  const table = renderToStaticMarkup(
    <StationTable {...solved({ ...PROPPED, loads: [{ kind: 'point', at: 3, p: 20_000 }] })} />,
  );

  test('has heads with scope, and a unit in each', () => {
    expect(has(table, '<th scope="col" class="figure">Moment M<small>kNm</small></th>')).toBe(true);
    expect(has(table, '<th scope="row">8.000, B</th>')).toBe(true);
  });

  test('gives both sides of a jump', () => {
    expect(has(table, '<th scope="row">3.000, left</th>')).toBe(true);
    expect(has(table, '<th scope="row">3.000, right</th>')).toBe(true);
  });
});

test('a beam of no length cannot be drawn', () => {
  expect(drawableBeam({ ...PROPPED, length: 0 })).toBeNull();
});
