import { describe, expect, test } from 'vitest';
import { readParameters } from '@/engine/template';
import { shippedTemplate, writtenTemplates } from '../../../tests/support/templates';
import { OWN_STIFFNESS, readStiffness, readValues, writeValues } from './address';
import { entryText, toParameters, toRaw } from './raw';

const canopy = shippedTemplate('propped-cantilever-overhang-uniform');
const points = shippedTemplate('simple-span-points-uniform');
const metric = { system: 'metric' } as const;

describe('the fields of a template', () => {
  test('say its defaults where nothing is given, for every template in both unit systems', () => {
    for (const slug of writtenTemplates.keys())
      for (const system of ['metric', 'us'] as const) {
        const template = shippedTemplate(slug);
        const said = toParameters(template, toRaw(template, {}, { system }));
        const [asked, own] = [said, {}].map((given) => readParameters(template, given));
        expect(asked, slug).toEqual(own);
      }
  });

  test('part a number from its unit, and keep another form as it was typed', () => {
    const raw = toRaw(canopy, { L: '7.2 m', a: `5'-6"`, w: 12_500 }, metric);
    expect(raw).toMatchObject({
      L: { entry: { text: '7.2', unit: 'm' } },
      a: { entry: { text: `5'-6"`, unit: 'm' } },
      w: { entry: { text: '12.5', unit: 'kN/m' } },
    });
    expect(toParameters(canopy, raw)).toEqual({ L: '7.2 m', a: `5'-6"`, w: '12.5 kN/m' });
  });

  test('hold a load by its groups where a member asks for that, or it was given so', () => {
    const w = { G: '5.52 kN/m', S: '3.6 kN/m' };
    expect(toParameters(canopy, toRaw(canopy, { w }, metric))).toMatchObject({ w });
    const raw = toRaw(canopy, {}, { ...metric, byGroup: true });
    expect(raw['w']).toEqual({
      kind: 'load',
      parts: [{ group: 'G', entry: { text: '10', unit: 'kN/m' } }],
    });
  });

  test('hold rows', () => {
    const loads = [{ x: '1.5 m', P: '20 kN', group: 'Q' }];
    expect(toParameters(points, toRaw(points, { loads }, metric))).toMatchObject({ loads });
  });
});

describe('a text with the unit beside it', () => {
  test.each([
    ['7.2', 'm', '7.2 m'],
    ['7200 mm', 'm', '7200 mm'],
    ['20', 'ft-in', '20 ft'],
    ['7,2,3', 'm', '7,2,3'],
    ['', 'm', ''],
  ])('%j beside %s is %j', (text, unit, said) => {
    expect(entryText({ text, unit }, 'length')).toBe(said);
  });
});

describe('the address', () => {
  test('says what differs from the defaults, and reads back', () => {
    const given = { L: '7.2 m', w: '12.5 kN/m' };
    const query = writeValues(
      canopy,
      toRaw(canopy, given, metric),
      { ...OWN_STIFFNESS, ei: '2e7 Nm2' },
      metric,
    );
    expect(query.toString()).toBe('L=7.2+m&w=12.5+kN%2Fm&ei=2e7+Nm2');
    expect(readValues(canopy, query)).toEqual(given);
    expect(readStiffness(query).ei).toBe('2e7 Nm2');
  });

  test('is empty at the defaults', () => {
    expect(writeValues(canopy, toRaw(canopy, {}, metric), OWN_STIFFNESS, metric).toString()).toBe('');
  });

  test('carries rows', () => {
    const loads = [{ x: '1 m', P: '2 kN', group: 'S' }];
    const query = writeValues(points, toRaw(points, { loads }, metric), OWN_STIFFNESS, metric);
    expect(readValues(points, query)).toEqual({ loads });
  });

  test('that is no JSON where rows belong is left to be refused', () => {
    expect(readValues(points, new URLSearchParams({ loads: '[{' }))).toEqual({ loads: '[{' });
  });
});
