import { describe, expect, test } from 'vitest';
import { derive } from '@/engine/derivation';
import type { UnitSystemName } from '@/engine/quantity';
import { materialFor } from '@/engine/section';
import { buildFaultSheet, buildSheet, type SheetBlock, type SheetInput } from '@/engine/sheet';
import { shippedCriteria } from '../../../tests/support/criteria';
import { shippedTemplate } from '../../../tests/support/templates';
import { evaluateMember } from '../member/evaluate';
import { drawnSolution, toStoredResult } from '../member/result';
import { newerTexts, pinTexts, readPaper, shortCode, watermarkOf } from './sheet';

const SLUG = 'propped-cantilever-overhang-uniform';
const CRITERIA = shippedCriteria('steel-elastic-en');
const S355 = materialFor('s355');
/** IPE 270 of EN 10365, its dimensions; moments from the shipped table. */
const IPE_270 = {
  designation: 'IPE 270',
  dimensions: { shape: 'i' as const, h: 0.27, b: 0.135, tw: 0.0066, tf: 0.0102, r: 0.015 },
  massKgM: 36.1,
  iMajorCm4: 5789.8,
  wElCm3: 428.87,
};

interface Asked {
  readonly slug?: string;
  readonly parameters: Readonly<Record<string, unknown>>;
  readonly system?: UnitSystemName;
  readonly isChecked?: boolean;
  readonly patterns?: boolean;
}

/** The sheet of a member as it would be stored: through JSON, as the database gives it back. */
function sheetOf({ slug = SLUG, parameters, system = 'metric', isChecked = false, patterns = true }: Asked) {
  const template = shippedTemplate(slug);
  const material = S355;
  if (!material) throw new Error('S355 is shipped');
  const reading = evaluateMember({
    template,
    parameters,
    system,
    section: isChecked ? { values: IPE_270, material } : null,
    criteria: isChecked ? CRITERIA : null,
    ownWeight: isChecked,
    patterns,
  });
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  const { beam, total, instance } = reading.evaluation;
  const derivation = derive({
    beam,
    redundants: total.forceMethod.redundants,
    names: { lengths: instance.dimensions, loads: instance.loadNames },
    system,
  });
  const stored = toStoredResult(reading.evaluation);
  if (stored.kind === 'fault') throw new Error(stored.message);
  const result: typeof stored = JSON.parse(JSON.stringify({ ...stored, derivation }));
  const input: SheetInput = {
    system,
    purpose: 'Carries the roof.',
    basis: '',
    template: { reference: 'Prop 5', name: template.name, revision: 2, parameters: template.parameters },
    parameters,
    ownWeight: { acts: isChecked, reason: 'Compared with the closed form' },
    section: isChecked
      ? {
          designation: 'IPE 270',
          table: 'European I sections',
          edition: 1,
          material: { name: material.name, e: material.e, source: material.source.standard },
          computed: ['i_major_cm4'],
          cautions: [],
        }
      : null,
    patterns: { act: patterns, reason: 'Stored goods stand on both spans' },
    criteria: isChecked
      ? {
          name: CRITERIA.name,
          revision: 1,
          basis: CRITERIA.strength.basis,
          combinations: CRITERIA.strength.combinations,
          letters: {},
          patterns: CRITERIA.patterns ?? [],
        }
      : null,
    result: { ...result, total: drawnSolution(result.total) },
    cautions: [{ title: 'Stop and ask', text: 'Stop and ask.', version: 3 }],
  };
  return buildSheet(input);
}

type Of<K extends SheetBlock['kind']> = Extract<SheetBlock, { kind: K }>;
const all = <K extends SheetBlock['kind']>(blocks: readonly SheetBlock[], kind: K): Of<K>[] =>
  blocks.filter((block): block is Of<K> => block.kind === kind);
const table = (blocks: readonly SheetBlock[], name: string) => {
  const found = all(blocks, 'table').find((one) => one.name === name);
  if (!found) throw new Error(`The sheet has no table “${name}”`);
  return found;
};
const textsOf = (blocks: readonly SheetBlock[], name: string) =>
  table(blocks, name).rows.map(({ cells }) =>
    cells.map((cell) => (typeof cell === 'string' ? cell : cell.tex)),
  );

/** Spans in m, overhangs in m. */
const PAIRS = [
  [3, 0.6],
  [4, 1],
  [4.5, 1.35],
  [5, 2.5],
  [5.4, 1.8],
  [6, 1.8],
  [6.25, 2.2],
  [7.2, 2.16],
  [8, 3.2],
  [10, 4],
] as const;
const W = 8.4;

describe('the propped cantilever with overhang', () => {
  // R_B = 3wL/8 + wa + 3wa²/4L: by superposition of the two published cases of the cantilever (deflections of a uniform
  // load, and of the force and couple that the overhang puts on B), equal to the prop's R_B L³/3EI.
  test.each(PAIRS)('of L = %d m and a = %d m shows the closed form’s prop reaction', (L, a) => {
    const blocks = sheetOf({ parameters: { L: `${L} m`, a: `${a} m`, w: `${W} kN/m` } });
    const prop = (3 * W * L) / 8 + W * a + (3 * W * a ** 2) / (4 * L);
    const reactions = textsOf(blocks, 'Reactions by group, unfactored');
    expect(reactions.find(([letter]) => letter === 'R_{B}')?.at(-1)).toBe(prop.toFixed(1));
    const derived = all(blocks, 'formula')
      .flatMap(({ results }) => results ?? [])
      .filter(({ letter }) => letter === 'R_{B}');
    expect(derived.length).toBeGreaterThan(0);
    for (const { value, unit } of derived) expect([value, unit]).toEqual([prop.toPrecision(4), 'kN']);
  });
});

describe('a sheet', () => {
  const blocks = sheetOf({
    parameters: { L: '6 m', a: '1.8 m', w: { G: '5.2 kN/m', S: '3.6 kN/m' } },
    isChecked: true,
  });

  test('goes through its ten sections in order', () => {
    expect(all(blocks, 'heading').map(({ number, title }) => `${number} ${title}`)).toEqual([
      '1 What this sheet covers',
      '2 Givens',
      '3 Combinations and patterns',
      '4 Elevation and diagrams: all loads together, unfactored',
      '5 Derivation',
      '6 Results',
      '7 Section properties used',
      '8 Checks, governing first',
      '9 Reactions to hand on',
      '10 Cautions',
    ]);
  });

  test('shows givens exactly as given, loads by their groups and with their sum', () => {
    expect(textsOf(blocks, 'Givens').slice(0, 5)).toEqual([
      ['Span', 'L', '6', 'm', '6 m'],
      ['Overhang', 'a', '1.8', 'm', '1.8 m'],
      ['Uniform load: G, permanent', 'w', '5.2', 'kN/m', '5.2 kN/m'],
      ['Uniform load: S, snow', 'w', '3.6', 'kN/m', '3.6 kN/m'],
      ['Uniform load: all groups', 'w', '8.8', 'kN/m', 'sum'],
    ]);
  });

  test('gives reactions by group, which add up to those of all together within their rounding', () => {
    for (const [, , ...values] of textsOf(blocks, 'Reactions by group, unfactored')) {
      const [g = Number.NaN, s = Number.NaN, together = Number.NaN] = values.map(Number);
      expect(Math.abs(g + s - together)).toBeLessThan(0.11);
    }
  });

  // Uniform load on the span: wL·3/8 to the prop; on the overhang: wa(1 + 3a/4L), all of it upward.
  test('gives the most and the least of snow, which acts only where adverse', () => {
    const rows = textsOf(blocks, 'Reactions of groups that act where adverse, unfactored');
    const prop = rows.find(([letter]) => letter === 'R_{B}');
    const most = (3 * 3.6 * 6) / 8 + 3.6 * 1.8 * (1 + (3 * 1.8) / (4 * 6));
    expect(prop?.slice(2)).toEqual([most.toFixed(1), '0.0']);
    const fixed = rows.find(([letter]) => letter === 'R_{A}');
    expect(fixed?.[3]).toMatch(/^−\d\.\d\u00a0uplift$/);
  });

  test('lists how the groups act, the combinations run with their arrangements, and those not run', () => {
    const groups = textsOf(blocks, 'Groups');
    expect(groups.map(([group, acts]) => [group, acts])).toEqual([
      ['G, permanent', 'On its whole length'],
      ['S, snow', 'On each span and overhang where adverse'],
    ]);
    expect(groups[1]?.[2]).toMatch(/fixed action \(EN 1991-1-3, section 2, from memory\)$/);
    const run = textsOf(blocks, 'Combinations run');
    expect(run).toContainEqual(['Strength', '1.35 G', '1']);
    expect(run).toContainEqual(['Strength', '1.35 G + 1.5 S', '4']);
    expect(run).toContainEqual(['Total load', 'G + 0.5 S', '4']);
    const idle = textsOf(blocks, 'Combinations not run');
    expect(idle).toContainEqual(['1.35 G + 1.5 Q + 0.75 S', 'The same as 1.35 G + 0.75 S here']);
    const strength = run.filter(([purpose]) => purpose === 'Strength');
    expect(strength.length + idle.length).toBe(CRITERIA.strength.combinations.length);
  });

  // M_A = −wL²/8 + wa²/4 of what acts everywhere and −wL²/8 of what stands on the span alone, by the three-moment equation.
  test('names the loads that govern: snow on the span alone hogs most at the fixed end', () => {
    const g = 5.2 + (36.1 * 9.80665) / 1000;
    const moment = 1.35 * ((g * 6 ** 2) / 8 - (g * 1.8 ** 2) / 4) + (1.5 * 3.6 * 6 ** 2) / 8;
    const hogging = textsOf(blocks, 'Governing loads').find(([title]) => title === 'Hogging');
    expect(hogging).toEqual([
      'Hogging',
      `−${moment.toFixed(1)}`,
      'kNm',
      '0.000',
      '1.35 G + 1.5 S, span A–B loaded',
    ]);
    const [bending] = all(blocks, 'checks')[0]?.rows.filter(({ title }) => title === 'Bending stress') ?? [];
    expect(bending?.place).toBe('at A, 1.35 G + 1.5 S, span A–B loaded');
  });

  test('prints why patterns are switched off, and that they are not checked', () => {
    const off = sheetOf({
      parameters: { L: '6 m', a: '1.8 m', w: { G: '5.2 kN/m', S: '3.6 kN/m' } },
      isChecked: true,
      patterns: false,
    });
    expect(textsOf(off, 'Groups')[1]).toEqual([
      'S, snow',
      'On its whole length',
      'Patterns are switched off: Stored goods stand on both spans',
    ]);
    expect(textsOf(off, 'Combinations run')).toContainEqual(['Strength', '1.35 G + 1.5 S', '1']);
    expect(all(off, 'list')[0]?.items[0]).toMatch(/^Adverse patterns of loads: switched off/);
    expect(JSON.stringify(off)).not.toContain('span A–B loaded');
  });

  test('puts the governing check first, and says what was not checked', () => {
    const ratios = all(blocks, 'checks')[0]?.rows.map(({ ratio }) => ratio) ?? [];
    expect(ratios.length).toBeGreaterThan(2);
    expect(ratios).toEqual([...ratios].sort((a, b) => b - a));
    expect(all(blocks, 'list')[0]?.items).toEqual(CRITERIA.not_checked);
  });

  test('marks what was computed of the section', () => {
    const from = textsOf(blocks, 'Section properties used').map((cells) => [cells[1], cells[4]]);
    expect(from).toContainEqual(['I', 'computed from the dimensions']);
    expect(from).toContainEqual(['W_{el}', 'table, edition 1']);
  });

  test('names both methods, the residuals and the wording of each caution', () => {
    const texts = all(blocks, 'text').map(({ text }) => text);
    expect(texts.some((text) => /force method and direct stiffness, agree within/.test(text))).toBe(true);
    expect(all(blocks, 'caution')).toEqual([{ kind: 'caution', text: 'Stop and ask.', version: 3 }]);
  });

  test('says when nothing is checked', () => {
    const unchecked = sheetOf({ parameters: { L: '6 m', a: '1.8 m', w: '8 kN/m' } });
    expect(all(unchecked, 'text').map(({ text }) => text)).toContain(
      'Nothing is checked: no section and no criteria are chosen.',
    );
    expect(textsOf(unchecked, 'Basis')).toContainEqual([
      'Own weight',
      'Left out: Compared with the closed form',
    ]);
  });

  test('names uplift with its minus', () => {
    const up = sheetOf({ slug: 'propped-cantilever-overhang-tip-point', parameters: {} });
    expect(JSON.stringify(up)).toMatch(/−[\d.]+\u00a0uplift/);
  });

  test('gives a derivation’s results in US units too', () => {
    const us = sheetOf({ parameters: { L: `20'-0"`, a: '6 ft', w: '0.5 kip/ft' }, system: 'us' });
    const units = all(us, 'formula').flatMap(({ results }) => (results ?? []).map(({ unit }) => unit));
    expect(units).toContain('kip');
    expect(textsOf(us, 'Givens')[0]).toEqual(['Span', 'L', `20'-0"`, '', `20'-0"`]);
  });
});

test('a sheet without a result shows no figure', () => {
  const template = { reference: 'Prop 5', name: 'Prop', revision: 1, parameters: [] };
  const blocks = buildFaultSheet({ purpose: '', basis: '', template, cautions: [] }, 'Not proven.');
  expect(all(blocks, 'text').at(-1)).toEqual({ kind: 'text', tone: 'warning', text: 'Not proven.' });
  expect(all(blocks, 'table')).toEqual([]);
});

test('codes, papers and watermarks', () => {
  expect(shortCode('d0dc74058519aaaa')).toBe('d0dc-7405-8519');
  expect([readPaper('letter'), readPaper('LETTER'), readPaper('a3'), readPaper(null)]).toEqual([
    'Letter',
    'Letter',
    'A4',
    'A4',
  ]);
  expect([watermarkOf('draft'), watermarkOf('ready')]).toEqual(['Draft, not checked', 'Draft, not checked']);
});

describe('what a sheet says of the library since', () => {
  const pin = {
    slug: 's',
    reference: 'R 1',
    name: 'Name',
    revision: 1,
    state: 'issued' as const,
    newer: null,
    newer_note: null,
    withdrawal_reason: null,
    recall: null,
    review: 'none' as const,
    review_by: null,
    withdrawn_ancestor: null,
    confirmed: false,
  };
  const member = {
    template: pin,
    section: null,
    criteria: pin,
    combinations: pin,
    materials: pin,
    engine_version: '1.1.0',
    fingerprint: null,
  };
  const withdrawn = { state: 'withdrawn' as const, withdrawal_reason: 'f_y was misread.' };

  test('is nothing where everything stands', () => {
    expect(newerTexts(member)).toEqual([]);
  });

  test.each([
    ['template', 'The template was withdrawn: f_y was misread.'],
    ['criteria', 'The criteria were withdrawn: f_y was misread.'],
    ['combinations', 'The combination set was withdrawn: f_y was misread.'],
    ['materials', 'The material set was withdrawn: f_y was misread.'],
  ])('names %s that were withdrawn, or are newer', (part, words) => {
    expect(newerTexts({ ...member, [part]: { ...pin, ...withdrawn } })).toEqual([words]);
    expect(newerTexts({ ...member, [part]: { ...pin, newer: 2 } })[0]).toMatch(/^Revision 2 of the /);
  });

  test('names the revisions of the sets that were used', () => {
    expect(pinTexts(member, 'metric')).toEqual(
      expect.arrayContaining(['Materials Name, revision 1', 'Combinations Name, revision 1']),
    );
  });
});
