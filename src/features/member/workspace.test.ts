import { describe, expect, test } from 'vitest';
import { MATERIALS, materialFor } from '@/engine/section';
import { shippedCriteria } from '../../../tests/support/criteria';
import { shippedTemplate } from '../../../tests/support/templates';
import { draftSection, sectionQuery, utilisationWith } from './candidates';
import { evaluateMember, type MemberInputs } from './evaluate';
import type { SaveMember } from './member';
import { drawnSolution, sameFigures, toStoredResult } from './result';
import { stripViews } from './views';
import { changesOf, differencesOf, settle } from './workspace';

// Dimensions and properties of IPE 300 as in EN 10365: h 300, b 150, t_w 7.1, t_f 10.7, r 15; I 8356 cm⁴, W 557 cm³.
const IPE_300 = {
  designation: 'IPE 300',
  dimensions: { shape: 'i' as const, h: 0.3, b: 0.15, tw: 0.0071, tf: 0.0107, r: 0.015 },
  massKgM: 42.2,
  iMajorCm4: 8356,
  wElCm3: 557,
};
const S355 = materialFor('s355');
const MATERIAL_CHOICES = MATERIALS.map((material) => ({ key: material.id, material, set: null }));
if (!S355) throw new Error('S355 is shipped');

const inputs = (change: Partial<MemberInputs> = {}): MemberInputs => ({
  template: shippedTemplate('propped-cantilever-overhang-uniform'),
  parameters: { L: '6 m', a: '1.8 m', w: { G: '5.52 kN/m', S: '3.6 kN/m' } },
  system: 'metric',
  section: { values: IPE_300, material: S355 },
  criteria: shippedCriteria('steel-elastic-en'),
  ownWeight: true,
  patterns: true,
  ...change,
});

function evaluated(change: Partial<MemberInputs> = {}) {
  const reading = evaluateMember(inputs(change));
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  return reading.evaluation;
}

describe('a stored result', () => {
  test('gives the drawing the same diagrams after a trip through JSON', () => {
    const evaluation = evaluated();
    const stored = JSON.parse(JSON.stringify(toStoredResult(evaluation)));
    expect(drawnSolution(stored.total).diagrams).toEqual(evaluation.total.diagrams);
  });

  test('is the same for any redundant, and not for another load', () => {
    const stored = toStoredResult(evaluated());
    const other = evaluated({ redundants: [{ support: 0, component: 'rotation' }] });
    expect(sameFigures(stored, toStoredResult(other))).toBe(true);
    const heavier = evaluated({ parameters: { L: '6 m', a: '1.8 m', w: { G: '5.53 kN/m', S: '3.6 kN/m' } } });
    expect(sameFigures(stored, toStoredResult(heavier))).toBe(false);
  });

  test('that is not proven is a fault and nothing else', () => {
    const evaluation = evaluated();
    const stored = toStoredResult({ ...evaluation, proof: { ...evaluation.proof, proven: false } });
    expect(Object.keys(stored)).toEqual(['kind', 'message', 'proof']);
  });
});

describe('what is wrong has its path in the member’s inputs', () => {
  const faults = (change: Partial<MemberInputs>) => {
    const reading = evaluateMember(inputs(change));
    return reading.ok ? [] : reading.faults.map(({ path, code }) => `${path.join('/')} ${code}`);
  };
  test('a parameter, a broken rule, redundants', () => {
    expect(faults({ parameters: { L: '0 m', w: '12.5' } })).toEqual([
      'parameters/L out_of_range',
      'parameters/w unit_missing',
    ]);
    expect(faults({ parameters: { L: '4 m', a: '3.8 m' } })[0]).toMatch(/^parameters\/a rule_broken$/);
    expect(faults({ redundants: [] })[0]).toMatch(/^redundants /);
  });
});

describe('the drawing shows', () => {
  test('all loads, each group and each combination, with that combination’s loads', () => {
    const views = stripViews(evaluated());
    expect(views.slice(0, 3).map(({ name, beam }) => [name, beam.loads.length])).toEqual([
      ['All loads, unfactored', 3],
      ['G, permanent', 2],
      ['S, snow', 1],
    ]);
    const factored = views.find(({ name }) => name === 'Strength: 1.35 G + 1.5 S, all spans loaded');
    expect(factored?.beam.loads.map((load) => load.kind === 'line' && load.w0)).toEqual([
      1.35 * 5520,
      1.5 * 3600,
      expect.closeTo(1.35 * 42.2 * 9.80665, 9),
    ]);
  });
});

describe('of a member whose snow acts only where adverse, the drawing shows', () => {
  const evaluation = evaluated();
  const views = stripViews(evaluation);
  const named = (name: string) => {
    const view = views.find((one) => one.name === name);
    if (!view) throw new Error(`There is no view “${name}”`);
    return view;
  };

  test('the loads that govern a check, with the snow on the span alone', () => {
    const { beam, draw } = named('Bending stress: 1.35 G + 1.5 S, span A–B loaded');
    const snow = beam.loads.filter(({ group }) => group === 'S');
    expect(snow).toMatchObject([{ from: 0, to: 6, w0: 1.5 * 3600 }]);
    const bending = evaluation.checks?.rows.find(({ kind }) => kind === 'bending');
    const { moment } = draw().solution.extremes;
    expect(Math.max(moment.max.value, -moment.min.value) / 557e-6).toBeCloseTo(bending?.demand ?? 0, 0);
  });

  test('the envelope, with the loads that give each peak and the range of the reactions', () => {
    const { envelopes, reactions } = named('Envelope of all combinations').draw();
    const hogging = envelopes?.moment?.peaks.find(({ x }) => x === 0);
    expect(hogging?.of).toBe('1.35 G + 1.5 S, span A–B loaded');
    const worst = Math.min(...evaluation.strength.map(({ extremes }) => extremes.moment.min.value));
    expect(hogging?.value).toBeCloseTo(worst, 6);
    expect(envelopes?.deflection?.note).toBe('service');
    const { vertical, least } = reactions?.[1] ?? { vertical: 0, least: { vertical: 0 } };
    expect(vertical).toBeGreaterThan(least.vertical);
  });
});

describe('candidate sections', () => {
  const item = {
    table: 'european-i',
    edition: 1,
    designation: 'IPE 300',
    printed: 'IPE 300',
    shape: 'i' as const,
    depth_mm: 300,
    width_mm: 150,
    mass_kg_m: 42.2,
    area_cm2: 53.8,
    i_major_cm4: 8356,
    i_minor_cm4: 604,
    w_el_cm3: 557,
    w_pl_cm3: null,
    j_cm4: null,
    iw_cm6: null,
    computed: [],
    dimensions_mm: { h: 300, b: 150, tw: 7.1, tf: 10.7, r: 15 },
  };

  test('are judged as the member would be with them', () => {
    const found = utilisationWith(
      inputs({ section: null }),
      draftSection(item, null, MATERIAL_CHOICES),
      MATERIAL_CHOICES,
    );
    const rows = evaluated().checks?.rows ?? [];
    const bending = rows.find(({ kind }) => kind === 'bending')?.ratio ?? Number.NaN;
    expect(found).toMatchObject({ bending: expect.closeTo(bending, 9) });
  });

  test('are made of what such sections are usually made of, or of what is in use', () => {
    const european = draftSection(item, null, MATERIAL_CHOICES);
    const american = { ...item, table: 'american-wide-flange' };
    const inch = {
      ...item,
      table: 'dimension-lumber',
      dimensions_mm: { h: 241, b: 38 },
      shape: 'rectangle' as const,
    };
    expect(european.material).toBe('s355');
    expect(draftSection(item, { ...european, material: 's275' }, MATERIAL_CHOICES).material).toBe('s275');
    expect(draftSection(american, european, MATERIAL_CHOICES).material).toBe('a992');
    expect(draftSection(inch, european, MATERIAL_CHOICES).material).toBe('dfl-no2');
  });

  test('begin near the section in use, and are looked for everywhere once something is said', () => {
    const current = draftSection(item, null, MATERIAL_CHOICES);
    const all = { q: '', depthMax: null, massMax: null, stock: '' };
    expect(sectionQuery(all, null)).toBeNull();
    expect(sectionQuery(all, current)).toMatchObject({ table: 'european-i', mass_min: String(42.2 * 0.75) });
    expect(sectionQuery({ ...all, q: 'w12x26' }, current)).toEqual({
      limit: '10',
      sort: 'mass',
      q: 'w12x26',
    });
    expect(sectionQuery({ ...all, depthMax: 310 }, current)).toMatchObject({
      table: 'european-i',
      depth_max: '310',
    });
    expect(sectionQuery({ ...all, stock: '*' }, null)).toEqual({ limit: '10', sort: 'mass', stock: '1' });
    expect(sectionQuery({ ...all, stock: 'a-works' }, current)).toMatchObject({
      table: 'european-i',
      supplier: 'a-works',
    });
  });
});

describe('two versions of a member', () => {
  const body: SaveMember = {
    title: 'Canopy',
    purpose: '',
    status: 'draft',
    reason: '',
    parameters: { L: '6 m', w: { G: '5 kN/m' } },
    section: null,
    criteria: null,
    combinations: null,
    categories: {},
    self_weight: true,
    self_weight_reason: '',
    patterns: true,
    patterns_reason: '',
    redundants: null,
  };
  const theirs = { ...body, title: 'Hall canopy', parameters: { ...body.parameters, L: '7 m' } };

  test('differ field by field, a parameter each', () => {
    expect(differencesOf(theirs, { ...body, self_weight: false })).toEqual([
      { field: 'parameters/L', name: 'L', theirs: '7 m', yours: '6 m' },
      { field: 'title', name: 'Title', theirs: 'Hall canopy', yours: 'Canopy' },
      { field: 'self_weight', name: 'Own weight', theirs: 'yes', yours: 'no' },
    ]);
  });

  test('are settled by taking some fields of theirs', () => {
    const settled = settle(theirs, { ...body, purpose: 'Mine' }, new Set(['parameters/L']));
    expect([settled.title, settled.purpose, settled.parameters]).toEqual([
      'Canopy',
      'Mine',
      { L: '7 m', w: { G: '5 kN/m' } },
    ]);
  });

  test('are told in the record by what changed', () => {
    expect(
      changesOf('member.save', { before: { ...body, version: 1 }, after: { ...theirs, version: 2 } }),
    ).toEqual({
      version: '2',
      change: 'L: 6 m → 7 m; Title: Canopy → Hall canopy',
    });
    expect(changesOf('member.create', { before: null, after: { version: 1 } }).change).toBe('First placed.');
  });
});
