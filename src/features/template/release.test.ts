import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam';
import { readBeam } from '@/engine/model';
import { instanceAt, shippedTemplate, writtenTemplates } from '../../../tests/support/templates';
import { fieldFaults, stopTitle, toCauses } from './faults';
import { drawnName } from './names';
import { readReleases, releaseChoices, releaseKey, toRedundant, toRelease } from './release';
import { stepLines } from './set-step';

function beamOf(slug: string, parameters = {}) {
  const reading = readBeam(instanceAt(shippedTemplate(slug), parameters).beam);
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  return reading.value;
}

describe('the choice of redundant', () => {
  test('offers only sets that solve the beam, for every template', () => {
    for (const slug of writtenTemplates.keys()) {
      const beam = beamOf(slug);
      const { open, barred } = releaseChoices(beam);
      expect(open.length > 0).toBe(beam.degree > 0);
      for (const { redundants } of open) expect(solveBeam(beam, redundants).degree).toBe(beam.degree);
      for (const { reason } of barred) expect(reason).not.toBe('');
    }
  });

  test('says why the moment over the prop is none', () => {
    const { barred } = releaseChoices(beamOf('propped-cantilever-overhang-uniform'));
    expect(barred.map(({ key }) => key)).toEqual(['1m']);
    expect(barred[0]?.reason).toMatch(/Equilibrium alone determines/);
    expect(barred[0]?.motion).toBeDefined();
  });

  test('of a beam fixed at both ends bars both reactions at once', () => {
    const { barred } = releaseChoices(beamOf('fixed-ends-uniform-centre-point'));
    expect(barred.map(({ key }) => key)).toContain('0v+1v');
  });

  test('of more sets than a page holds has the beam’s own and the one in use first', () => {
    const beam = beamOf('four-equal-spans-patterns');
    const keys = releaseChoices(beam, '2v+3v+4v').open.map(({ key }) => key);
    expect(keys.slice(0, 2)).toEqual(['1m+2m+3m', '2v+3v+4v']);
    expect(new Set(keys).size).toBe(24);
  });

  test('stays the same moment when the span changes', () => {
    const [choice] = releaseChoices(beamOf('two-equal-spans-uniform')).open;
    const releases = readReleases(releaseKey(choice?.releases ?? []));
    const wider = beamOf('two-equal-spans-uniform', { L: '9 m' });
    const [redundant] = releases.map((release) => toRedundant(wider, release));
    expect(redundant && toRelease(wider, redundant)).toEqual(releases[0]);
  });
});

describe('what is wrong', () => {
  const template = shippedTemplate('propped-cantilever-overhang-uniform');
  const faults = [
    { pointer: '/parameters/L', code: 'out_of_range', message: 'Span is 0 m. Give 0.3 m to 30 m.' },
    { pointer: '/ei', code: 'not_positive', message: 'EI is not more than zero.' },
  ];

  test('is found at its field', () => {
    expect([...fieldFaults(faults).keys()]).toEqual(['L', 'ei']);
  });

  test('is listed by name', () => {
    const causes = toCauses(template, faults);
    expect(causes.map(({ symbol, title }) => [symbol, title])).toEqual([
      ['L', 'Span'],
      [null, 'Bending stiffness'],
    ]);
    expect(stopTitle(causes)).toBe('Two inputs stop the drawing');
    expect(stopTitle(causes.slice(0, 1))).toBe('One input stops the drawing');
  });
});

test('letters are drawn with their index lowered', () => {
  expect(['a_1', 'w_{\\text{self}}', '\\delta_B'].map(drawnName)).toEqual(['a_{1}', 'w_{self}', 'δ_{B}']);
});

test('a step whose numbers are long has them on a line of their own', () => {
  expect(stepLines({ symbols: 'R_B', numbers: '' })).toEqual(['R_B']);
  expect(stepLines({ symbols: 'R_B', numbers: '3' })).toEqual(['R_B=3']);
  const long = '1+'.repeat(40);
  expect(stepLines({ symbols: 'R_B', numbers: long })).toEqual(['R_B', `{}=${long}`]);
});

test('equations with numbers are equations of their own', () => {
  const numbers = '\\begin{aligned}2R_{A}&=4\\end{aligned}';
  expect(stepLines({ symbols: 'f', numbers })).toEqual(['f', numbers]);
});
