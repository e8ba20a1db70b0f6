import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam/index';
import { influenceLine, readInfluenceQuantity } from '@/engine/influence/index';
import { type BeamDocument, readBeam } from '@/engine/model/index';
import { bucklingLengthOf, judgeAxial } from './axial-entry';
import { askedFor, choicesFor, hasSection, hasSides } from './choices';
import { datumLines, shearText, signChangeTexts, tipTables } from './deflection-lines';
import { FurtherResults } from './FurtherResults';
import { layInfluence } from './influence-layout';
import { groupsOf, isPermanent, massesFrom } from './mass-entry';
import { placeEntry } from './place-entry';
import { scriptFor, stationText, titleOf, unitLoad } from './script';
import { firstTrain, newWheel, readTrain } from './train-entry';

function solved(document: BeamDocument) {
  const reading = readBeam({ horizontal: 'ignore', ...document });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  return { beam: reading.value, solution: solveBeam(reading.value) };
}

/** Built in at A, a prop at 6 m that sinks by 4 mm, and an arm of 2 m. */
const propped = solved({
  length: 8,
  ei: 1e7,
  ga: 5e6,
  supports: [
    { at: 0, kind: 'fixed' },
    { at: 6, kind: 'roller', rise: -0.004 },
  ],
  loads: [
    { kind: 'line', from: 0, to: 8, w0: 9806.65, w1: 9806.65, group: 'G' },
    { kind: 'point', at: 8, p: 5000, group: 'Q' },
    { kind: 'couple', at: 3, m: 1000 },
  ],
});
const simple = solved({
  length: 6,
  ei: 1e7,
  supports: [
    { at: 0, kind: 'pin' },
    { at: 6, kind: 'roller' },
  ],
  loads: [{ kind: 'line', from: 0, to: 6, w0: 1e4, w1: 1e4 }],
});

const lineOf = (choice: string, at = 3) => {
  const reading = readInfluenceQuantity(propped.beam, askedFor(choice, at, 'left'));
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  return influenceLine(propped.beam, reading.value);
};

describe('what a line may be of', () => {
  test('is an effect at a section, or a reaction that a support has', () => {
    expect(choicesFor(propped.beam).map(({ label }) => label)).toEqual([
      'Moment at a section',
      'Shear at a section',
      'Deflection at a section',
      'Reaction at A',
      'Moment reaction at A',
      'Reaction at B',
    ]);
    expect(askedFor('rotation 0', 3, 'left')).toEqual({
      kind: 'reaction',
      component: 'rotation',
      support: 0,
    });
    expect(askedFor('vertical 1', 3, 'left')).toEqual({
      kind: 'reaction',
      component: 'vertical',
      support: 1,
    });
    expect(askedFor('deflection', 3, 'left')).toEqual({ kind: 'deflection', at: 3 });
    expect(hasSection('vertical 1')).toBe(false);
  });

  test('has two sides where a support takes something out of the beam', () => {
    expect(hasSides(propped.beam, 'shear', 6)).toBe(true);
    expect(hasSides(propped.beam, 'moment', 6)).toBe(false);
    expect(hasSides(propped.beam, 'shear', 0)).toBe(false);
    expect(hasSides(propped.beam, 'deflection', 6)).toBe(false);
  });

  test('is named by its place', () => {
    const title = (choice: string, at?: number) =>
      titleOf(propped.beam, lineOf(choice, at).quantity, 'metric');
    expect(title('moment')).toBe('Moment at 3.000 m');
    expect(title('shear', 6)).toBe('Shear just left of B');
    expect(title('deflection', 8)).toBe('Deflection at 8.000 m');
    expect(title('vertical 1')).toBe('Reaction at B');
    expect(title('rotation 0')).toBe('Moment reaction at A');
    expect(stationText(propped.beam, 3.048, 'us')).toBe(`10'-0"`);
  });
});

describe('an ordinate and its effect', () => {
  test('have the units of the person, and the sign of the sheet', () => {
    const of = (choice: string, system: 'metric' | 'us') => scriptFor(lineOf(choice).quantity, system);
    expect(of('shear', 'metric')).toMatchObject({ unit: '', sign: 'left end up: +', up: 1 });
    expect(of('moment', 'metric')).toMatchObject({ unit: 'm', sign: 'sagging: +', up: -1 });
    expect(of('rotation 0', 'us')).toMatchObject({ unit: 'ft', sign: 'anticlockwise: +', up: 1 });
    expect(of('vertical 1', 'us')).toMatchObject({ unit: '', sign: 'upward: +', quantity: 'shear' });
    expect(of('moment', 'us').ordinate(0.3048)).toBe('1.000');
    const down = of('deflection', 'metric');
    expect(down.unit).toBe('mm/kN');
    expect(down.ordinate(-2e-6)).toBe('2.00'); // 0.002 mm/N
    expect(down.effect(-0.0123)).toBe('12.3 mm');
    expect(unitLoad('us').text).toBe('1 kip/ft');
  });
});

describe('layInfluence', () => {
  test('puts the wheels on the member and on the line, the section between them', () => {
    const influence = lineOf('moment', 3);
    const script = scriptFor(influence.quantity, 'metric');
    const train = { forces: [10, 20, 30], wheels: [5, 3, null] };
    const layout = layInfluence(propped.beam, influence, script, train, 888);
    expect(layout.wheels.map(({ x }) => x)).toEqual([544, 344]); // 44 + 100 a metre
    expect(layout.section).toBe(344);
    expect(layout.wheels[1]!.y).toBeGreaterThan(layout.base); // sagging is drawn below
    expect(layout.labels.map(({ text }) => text)).toContain(
      `${script.ordinate(influence.extremes.max.value)} m`,
    );
    const bare = layInfluence(
      propped.beam,
      lineOf('vertical 1'),
      scriptFor(lineOf('vertical 1').quantity, 'metric'),
      null,
      320,
    );
    expect([bare.section, bare.wheels]).toEqual([null, []]);
  });

  test('of a line that is zero throughout is its axis alone', () => {
    const influence = lineOf('deflection', 6);
    const layout = layInfluence(
      propped.beam,
      influence,
      scriptFor(influence.quantity, 'metric'),
      { forces: [1], wheels: [2] },
      600,
    );
    expect([layout.labels, layout.wheels, layout.hatch]).toEqual([[], [], '']);
  });
});

describe('the wheels in the rows', () => {
  test('stand behind one another, the first at the front', () => {
    const [front, ...others] = [...firstTrain('metric'), newWheel('metric', false)];
    const spaced = others.map((row) => ({ ...row, spacing: { text: '1500 mm', unit: 'm' } }));
    expect(readTrain([{ ...front!, spacing: { text: 'nothing', unit: 'm' } }, ...spaced])).toEqual({
      ok: true,
      wheels: [0, 1.5, 3].map((offset) => ({ offset, force: 50e3 })),
    });
    expect(readTrain(firstTrain('us'))).toMatchObject({
      ok: true,
      wheels: [{ offset: 0 }, { offset: 1.8288 }],
    });
  });

  test('are told what is wrong, row by row', () => {
    const row = (spacing: string, force: string) => ({
      spacing: { text: spacing, unit: 'm' },
      force: { text: force, unit: 'kN' },
    });
    const reading = readTrain([row('0', '50'), row('-1', '0'), row('far', 'much')]);
    expect(reading.ok ? [] : reading.faults).toEqual([
      { spacing: undefined, force: undefined },
      {
        spacing: expect.stringContaining('less than zero'),
        force: expect.stringContaining('more than zero'),
      },
      { spacing: expect.any(String), force: expect.any(String) },
    ]);
  });
});

describe('deflections', () => {
  test('are stated from each datum, with where they are', () => {
    const lines = datumLines(propped.beam, propped.solution, 'metric');
    expect(lines.map(({ datum }) => datum)).toEqual([
      'Where the beam was',
      'Chord between the supports',
      'Support A',
      'Support B',
    ]);
    expect(lines[3]).toMatchObject({ up: '4.0 mm at A' }); // B has sunk by 4 mm
    // 5wL⁴/(384EI) = 16.9 mm: AISC Manual, Table 3-23, case 1 (from memory)
    expect(datumLines(simple.beam, simple.solution, 'metric')[0]).toEqual({
      datum: 'Where the beam was',
      down: '16.9 mm at 3.000 m',
      up: null,
    });
  });

  test('of a tip are split, and the parts are signed', () => {
    const [tip, ...others] = tipTables(propped.beam, propped.solution, 'metric');
    expect(others).toEqual([]);
    expect(tip!.title).toBe('Tip at 8.000 m, beyond B');
    expect(tip!.lines[0]).toEqual({ name: 'Movement of B itself', text: '4.0 mm' });
    expect(tip!.lines.map(({ name }) => name)).toContain('Own shear');
    const millimetres = (text: string) => Number(text.replace('−', '-').replace(' mm', ''));
    const sum = tip!.lines.reduce((total, { text }) => total + millimetres(text), 0);
    expect(Math.abs(sum - millimetres(tip!.total))).toBeLessThan(0.21);
    expect(tipTables(simple.beam, simple.solution, 'metric')).toEqual([]);
  });

  test('say how much shear makes, where the beam shears', () => {
    expect(shearText(propped.beam, propped.solution, 'metric')).toMatch(
      /shear deformation makes −?[\d.]+ mm/,
    );
    expect(shearText(simple.beam, simple.solution, 'metric')).toBeNull();
  });

  test('stand beside the changes of sign', () => {
    expect(signChangeTexts(simple.beam, simple.solution, 'metric')).toEqual({
      shear: '3.000 m',
      moment: null,
    });
  });
});

describe('masses', () => {
  test('are the beam’s own and the weights of the groups that are chosen', () => {
    expect(groupsOf(propped.beam)).toEqual(['G', 'Q', '']);
    expect(groupsOf(propped.beam).filter(isPermanent)).toEqual(['G']);
    const { masses, leftOut } = massesFrom(propped.beam, 20, new Set(['G', '']));
    expect(leftOut).toBe(1);
    expect(masses.distributed).toEqual([
      { from: 0, to: 8, start: 20, end: 20 },
      { from: 0, to: 8, start: expect.closeTo(1000, 9), end: expect.closeTo(1000, 9) },
    ]);
  });
});

describe('an axial force', () => {
  test('buckles the longest span, or twice the longest overhang', () => {
    expect(bucklingLengthOf(propped.beam)).toBe(6);
    expect(bucklingLengthOf(solved({ length: 3, ei: 1, supports: [{ at: 0, kind: 'fixed' }] }).beam)).toBe(6);
  });

  test('is in scope up to a tenth of the buckling force, π²EI/L²', () => {
    const critical = (Math.PI ** 2 * 1e7) / 36;
    expect(judgeAxial(simple.beam, 0, 6)).toEqual({ state: 'none', ratio: '0.00', message: null });
    expect(judgeAxial(simple.beam, 0.08 * critical, 6)).toEqual({
      state: 'within',
      ratio: '0.08',
      message: null,
    });
    expect(judgeAxial(simple.beam, 0.2 * critical, 6)).toMatchObject({
      state: 'beyond',
      message: expect.stringMatching(/0\.20 of the buckling force.*out of scope.*about 25 % larger/),
    });
    expect(judgeAxial(simple.beam, 0.1004 * critical, 6).ratio).toBe('0.1004');
    expect(judgeAxial(simple.beam, 1.5 * critical, 6).message).toContain('buckles');
  });
});

test('placeEntry rounds a place that was computed, but not a support’s', () => {
  expect(placeEntry(propped.beam, 2.0967391, 'metric')).toEqual({ text: '2.097', unit: 'm' });
  expect(placeEntry(propped.beam, 6, 'metric').text).toBe('6');
  expect(placeEntry(propped.beam, 3.0481, 'us')).toEqual({ text: `10'-0"`, unit: 'ft-in' });
});

describe('the zone, opened', () => {
  const draw = (system: 'metric' | 'us', ownMass: number | null = null) =>
    renderToStaticMarkup(
      <FurtherResults solved={propped} system={system} ownMass={ownMass} note="At the last good values" />,
    );

  test('shows every result, and says what is drawn', () => {
    const drawn = draw('metric', 32);
    for (const words of [
      'At the last good values',
      'Deflection by datum',
      'Tip at 8.000 m, beyond B',
      'Influence line: Moment at 3.000 m.',
      'Worst positions, of which one is drawn',
      'Absolute largest moments, at any section',
      'exact for this mass and these supports',
      'Of the section chosen.',
      'Loads without a group',
    ]) {
      expect(drawn).toContain(words);
    }
    expect(drawn.match(/class="load-point"/g)).toHaveLength(2);
  });

  test('is in feet and kips for whoever has those', () => {
    const drawn = draw('us');
    expect(drawn).toContain('10.00 kip');
    expect(drawn).toContain('lb along the beam');
    expect(drawn).not.toContain(' kN');
  });
});
