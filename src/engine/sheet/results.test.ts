import { describe, expect, test } from 'vitest';
import { blocksOf, memberOf, rowsIn, sheetOf, tableIn, textsIn } from '../../../tests/support/sheet';
import { solveBeam } from '../beam/index';
import type { CheckRow, Pattern } from '../check/index';
import type { Combination } from '../combination/index';
import { derive } from '../derivation/index';
import { readBeam } from '../model/index';
import type { SheetInput } from './index';

const uniform = (w: number, group: string, from = 0, to = 6) => ({
  kind: 'line' as const,
  from,
  to,
  w0: w,
  w1: w,
  group,
});
const source = { publication: 'EN 1991-1-1', clause: '6.2.1', from_memory: false };
const adverse = (group: Pattern['group']): Pattern => ({ group, where_adverse: true, basis: 'Free', source });
const CRITERIA: NonNullable<SheetInput['criteria']> = {
  name: 'Elastic',
  revision: 3,
  basis: 'of the practice',
  combinations: [],
  letters: {},
  patterns: [],
};
/** Two spans of 6 m. */
const TWO_SPANS = {
  length: 12,
  supports: [
    { at: 0, kind: 'pin' as const },
    { at: 6, kind: 'roller' as const },
    { at: 12, kind: 'roller' as const },
  ],
};
const SECTION: NonNullable<SheetInput['section']> = {
  designation: '200 × 100',
  table: 'Rectangles',
  edition: 2,
  material: { name: 'C24', e: 11e9, source: 'EN 338' },
  computed: [],
  cautions: [],
};

describe('combinations and patterns', () => {
  const combinations: Combination[] = [
    { name: '1.35 G', factors: { G: 1.35 } },
    { name: '1.35 G + 1.5 Q', factors: { G: 1.35, Q: 1.5, W: 0.9 } },
    { name: '1.35 G + 1.5 Q again', factors: { G: 1.35, Q: 1.5 } },
    { name: '1.5 W', factors: { W: 1.5 } },
  ];
  const loads = [uniform(5e3, 'G', 0, 12), uniform(3e3, 'Q', 0, 12), uniform(2e3, 'S', 0, 12)];
  const sheet = (patterned: Pattern['group'][], patterns: Pattern[]) =>
    sheetOf({
      beam: { ...TWO_SPANS, loads },
      patterned,
      combinations: combinations.slice(0, 2),
      input: { criteria: { ...CRITERIA, combinations, patterns } },
    });

  test('say why a combination of the criteria was not run', () => {
    expect(rowsIn(sheet([], []), 'Combinations not run')).toEqual([
      ['1.35 G + 1.5 Q again', 'The same as 1.35 G + 1.5 Q here'],
      ['1.5 W', 'None of its groups is on the member'],
    ]);
    const all = sheetOf({ input: { criteria: CRITERIA } });
    expect(tableIn(all, 'Combinations not run')).toBeUndefined();
  });

  test('give every combination its arrangements: 2² of what is patterned over two spans', () => {
    expect(rowsIn(sheet(['Q'], [adverse('Q')]), 'Combinations run')).toEqual([
      ['Strength', '1.35 G', '1'],
      ['Strength', '1.35 G + 1.5 Q', '4'],
    ]);
  });

  test('say how each group acts and on whose word', () => {
    const rows = rowsIn(sheet(['Q'], [adverse('Q'), { ...adverse('G'), where_adverse: false }]), 'Groups');
    expect(rows).toEqual([
      ['G, permanent', 'On its whole length', 'Free (EN 1991-1-1, 6.2.1)'],
      ['Q, imposed', 'On each span and overhang where adverse', 'Free (EN 1991-1-1, 6.2.1)'],
      ['S, snow', 'On its whole length', 'The criteria say nothing of it'],
    ]);
  });

  test('say which groups load the same spans together, if any act only where adverse', () => {
    const said = (patterned: Pattern['group'][]) =>
      textsIn(sheet(patterned, patterned.map(adverse))).join(' ');
    expect(said(['Q', 'S'])).toContain('and no others; Q and S load the same spans together. Spans run');
    expect(said(['Q'])).toContain('the adverse spans are loaded and no others. Spans run');
    expect(said([])).toContain('Every group stands on its whole length in every combination.');
  });

  test('are none without criteria', () => {
    expect(textsIn(sheetOf({}))).toContain('None: no criteria are chosen.');
  });
});

describe('the derivation', () => {
  const derivation = (system: 'metric' | 'us') => {
    const reading = readBeam({
      length: 6,
      ei: 20e6,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 6, kind: 'roller' },
      ],
      loads: [uniform(5e3, 'G')],
      horizontal: 'ignore',
    });
    if (!reading.ok) throw new Error(reading.faults[0]?.message);
    const { redundants } = solveBeam(reading.value).forceMethod;
    const lengths = [{ from: 0, to: 6, tex: 'L' }];
    return derive({ beam: reading.value, redundants, names: { lengths, loads: [{ tex: 'w' }] }, system });
  };
  const sheet = (stored: 'metric' | 'us', system: 'metric' | 'us') =>
    sheetOf({ input: { system }, result: { derivation: derivation(stored) } });

  test('says in which units it was worked, and that results are in the job’s too', () => {
    const said = (stored: 'metric' | 'us', system: 'metric' | 'us') =>
      textsIn(sheet(stored, system)).find((text) => text.includes('Worked in'));
    const begin = 'Under all loads together, unfactored. Worked in';
    expect(said('metric', 'metric')).toBe(`${begin} kN, m and mm.`);
    expect(said('metric', 'us')).toBe(`${begin} kN, m and mm; results also in US units.`);
    expect(said('us', 'us')).toBe(`${begin} kip, ft and in.`);
  });

  // 3wL/8 = 11.25 kN = 2.529 kip (1 kip = 4.4482216 kN).
  test('gives the prop’s reaction by its letter, in a US job also in kip', () => {
    const results = blocksOf(sheet('metric', 'us'), 'formula').flatMap(({ results: found = [] }) => found);
    const at = results.findIndex(({ letter, unit }) => letter === 'R_{B}' && unit === 'kN');
    expect(results.slice(at, at + 2)).toEqual([
      { letter: 'R_{B}', value: '11.25', unit: 'kN' },
      { value: '2.53', unit: 'kip' },
    ]);
  });

  test('names the published forms that a step uses, once each', () => {
    const origins = blocksOf(sheet('metric', 'metric'), 'formula').flatMap(({ origin = [] }) => origin);
    expect(origins.length).toBeGreaterThan(0);
    for (const origin of origins) {
      const forms = origin.split('; ');
      expect(new Set(forms).size).toBe(forms.length);
    }
  });

  test('of a member from before there were any is to be made by saving again', () => {
    expect(textsIn(sheetOf({})).join(' ')).toContain('Save it again to print one.');
  });
});

describe('results and reactions', () => {
  // The span turns about A as a straight line: B settles by 10 mm, nothing is bent.
  test('show what supports do by themselves as loads of their own', () => {
    const supports = [
      { at: 0, kind: 'pin' as const },
      { at: 6, kind: 'roller' as const, rise: -0.01 },
    ];
    const sheet = sheetOf({ beam: { supports, loads: [uniform(5e3, 'T')] } });
    const deflection = rowsIn(sheet, 'Deflection');
    expect(deflection.map(([name]) => name)).toEqual([
      'T',
      'Movements of supports',
      'All together, unfactored',
    ]);
    expect(deflection[1]).toEqual(['Movements of supports', '10.0', '6.000', '–', '']);
    const moments = rowsIn(sheet, 'Shear and moment');
    expect(moments[1]).toEqual(['Movements of supports', '0.0', '–', '', '–', '']);
    const reactions = tableIn(sheet, 'Reactions by group, unfactored');
    expect(reactions?.columns.map(({ title }) => title)).toEqual([
      'Reaction',
      'Unit',
      'T',
      'Movements',
      'All together',
    ]);
    expect(rowsIn(sheet, 'Reactions by group, unfactored')).toEqual([
      ['R_{A}', 'kN', '15.0', '0.0', '15.0'],
      ['R_{B}', 'kN', '15.0', '0.0', '15.0'],
    ]);
  });

  // wL²/8 = 45 kNm hogging at midspan, wL/2 = 30 kN, 5wL⁴/384EI = 8.4 mm up.
  test('name the governing loads of the senses that there are: of a load that lifts, no sagging', () => {
    const lift: Combination = { name: 'W', factors: { W: 1 } };
    const given = { beam: { loads: [uniform(-10e3, 'W')] }, combinations: [lift] };
    const [envelope] = memberOf(given).result.strength;
    const service = [{ ...envelope!, limit: { name: 'Wind' } }];
    expect(rowsIn(sheetOf({ ...given, result: { service } }), 'Governing loads')).toEqual([
      ['Shear, most', '30.0', 'kN', '6.000', 'W'],
      ['Shear, least', '−30.0', 'kN', '0.000', 'W'],
      ['Hogging', '−45.0', 'kNm', '3.000', 'W'],
      ['Deflection up', '−8.4', 'mm', '3.000', 'W'],
    ]);
    expect(tableIn(sheetOf({}), 'Governing loads')).toBeUndefined();
  });

  // wL/2 and wL²/12 of a beam built in at both ends; a guide holds its end's rotation and no force.
  test('have a force and a couple only where the support holds one', () => {
    const reactions = (left: 'fixed' | 'pin', right: 'fixed' | 'guided') =>
      rowsIn(
        sheetOf({
          beam: {
            supports: [
              { at: 0, kind: left },
              { at: 6, kind: right },
            ],
            loads: [uniform(10e3, 'G')],
          },
        }),
        'Reactions by group, unfactored',
      ).map(([letter, , value]) => [letter, value]);
    expect(reactions('fixed', 'fixed')).toEqual([
      ['R_{A}', '30.0'],
      ['M_{A}', '30.0'],
      ['R_{B}', '30.0'],
      ['M_{B}', '−30.0'],
    ]);
    // All 60 kN go to A; ∑M about A: 10·6²/2 = 180 kNm.
    expect(reactions('pin', 'guided')).toEqual([
      ['R_{A}', '60.0'],
      ['M_{B}', '180.0'],
    ]);
  });

  // On two spans under w: 3wL/8, 5wL/4; far from one loaded span −wL/16, of wL·7/16 at its own end and 5wL/8 between.
  test('range over the combinations, each extreme with the loads that give it', () => {
    const combinations: Combination[] = [
      { name: 'G', factors: { G: 1 } },
      { name: 'G + 2 Q', factors: { G: 1, Q: 2 } },
    ];
    const loads = [uniform(8e3, 'G', 0, 12), uniform(4e3, 'Q', 0, 12)];
    const sheet = sheetOf({ beam: { ...TWO_SPANS, loads }, combinations, patterned: ['Q'] });
    const name = 'Factored reactions, strength combinations and patterns';
    const end = { most: (3 / 8) * 48 + (7 / 16) * 48, least: (3 / 8) * 48 - 48 / 16 };
    expect(rowsIn(sheet, name)).toEqual([
      [
        'R_{A}',
        'kN',
        end.most.toFixed(1),
        'G + 2 Q, span A–B loaded',
        end.least.toFixed(1),
        'G + 2 Q, span B–C loaded',
      ],
      ['R_{B}', 'kN', '120.0', 'G + 2 Q, all spans loaded', '60.0', 'G'],
      [
        'R_{C}',
        'kN',
        end.most.toFixed(1),
        'G + 2 Q, span B–C loaded',
        end.least.toFixed(1),
        'G + 2 Q, span A–B loaded',
      ],
    ]);
    const alone = rowsIn(sheet, 'Reactions of groups that act where adverse, unfactored');
    expect(alone.map(([letter, , most, least]) => [letter, most, least])).toEqual([
      ['R_{A}', '10.5', '−1.5 uplift'],
      ['R_{B}', '30.0', '0.0'],
      ['R_{C}', '10.5', '−1.5 uplift'],
    ]);
  });
});

describe('section and checks', () => {
  const resolved = {
    selfWeight: 84,
    depth: 0.2,
    elastic: { elasticModulus: 667e-6, shearAreaAtAxis: 0.0133, bendingStrength: 24e6, shearStrength: 4e6 },
  };
  const row: CheckRow = {
    id: 'bending',
    kind: 'bending',
    title: 'Bending stress',
    place: 'at 3.000 m, G',
    clause: 'EN 1995-1-1, 6.1.6',
    demand: 26.4e6,
    capacity: 24e6,
    dimension: 'stress',
    ratio: 1.1,
    combination: 'G',
    at: 3,
    symbols: '\\sigma = \\frac{M}{W}',
    numbers: '\\frac{1}{2}',
  };

  test('say what is missing where nothing is checked', () => {
    const said = (input: Partial<SheetInput>) =>
      textsIn(sheetOf({ input })).find((text) => /^Nothing is/.test(text));
    expect(said({})).toBe('Nothing is checked: no section and no criteria are chosen.');
    expect(said({ section: SECTION })).toBe('Nothing is checked: no criteria are chosen.');
    expect(said({ criteria: CRITERIA })).toBe('Nothing is checked: no section is chosen.');
  });

  test('name the section’s table for what it supplies, with the weight only where it acts', () => {
    const sheet = (acts: boolean) =>
      sheetOf({
        input: { section: SECTION, ownWeight: { acts, reason: '' } },
        result: { section: resolved },
      });
    const letters = (acts: boolean) =>
      rowsIn(sheet(acts), 'Section properties used').map(([, letter, , , from]) => [letter, from]);
    expect(letters(true)).toContainEqual(['w_{\\text{self}}', 'table, edition 2']);
    expect(letters(false).map(([letter]) => letter)).toEqual(['h', 'I', 'W_{el}', 'It/Q', 'E', 'f', 'f_v']);
    const weights = (acts: boolean) =>
      rowsIn(sheet(acts), 'Givens').filter(([name]) => name === 'Own weight: G, permanent');
    expect(weights(true)).toEqual([
      ['Own weight: G, permanent', 'w_{\\text{self}}', '0.084', 'kN/m', '200 × 100, C24'],
    ]);
    expect(weights(false)).toEqual([]);
    expect(rowsIn(sheet(true), 'Basis')).toContainEqual(['Own weight', 'Included, 0.084 kN/m in group G']);
  });

  test('say what the checks take for granted of the section', () => {
    const section = { ...SECTION, cautions: ['Hold it sideways.'] };
    const sheet = sheetOf({ input: { section }, result: { section: resolved } });
    expect(blocksOf(sheet, 'text')).toContainEqual({
      kind: 'text',
      tone: 'warning',
      text: 'Hold it sideways.',
    });
  });

  test('print what fails with its working, what was found, and what is not checked', () => {
    const deflection: CheckRow = {
      ...row,
      id: 'deflection-0-span-A-B',
      kind: 'deflection',
      title: 'Deflection, L/300',
      dimension: 'length',
      demand: 0.018,
      capacity: 0.02,
      ratio: 0.9,
    };
    const findings = [{ id: 'uplift-A', title: 'Uplift at A', detail: 'Hold it down.', at: 0 }];
    const checks = { rows: [row, deflection], findings, not_checked: ['Fire'] };
    const sheet = sheetOf({ input: { section: SECTION, criteria: CRITERIA }, result: { checks } });
    const [block] = blocksOf(sheet, 'checks');
    expect(block).toMatchObject({ source: 'criteria rev 3', results: [{ value: '1.10', unit: '' }] });
    expect(block?.rows.map(({ demand }) => demand)).toEqual(['26.4', '18.0']);
    expect(blocksOf(sheet, 'formula')).toEqual([
      {
        kind: 'formula',
        title: 'Bending stress: at 3.000 m, G',
        origin: row.clause,
        symbols: '\\sigma = \\dfrac{M}{W}',
        numbers: '\\dfrac{1}{2}',
        results: [{ value: '1.10', unit: 'fails' }],
      },
    ]);
    expect(textsIn(sheet)).toContain('Uplift at A: Hold it down.');
    expect(blocksOf(sheet, 'list')).toEqual([{ kind: 'list', items: ['Fire'] }]);
  });
});
