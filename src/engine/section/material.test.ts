import { describe, expect, test } from 'vitest';
import { elasticStrength, MATERIALS, type Material, materialFor, materialIn, yieldStrength } from './index';

function material(id: string): Material {
  const found = materialFor(id);
  if (!found) throw new Error(id);
  return found;
}

describe('the shipped materials', () => {
  test('have one id each, positive values and a source', () => {
    expect(new Set(MATERIALS.map(({ id }) => id)).size).toBe(MATERIALS.length);
    for (const { e, g, density, expansion, source } of MATERIALS) {
      expect(Math.min(e, g, density, expansion)).toBeGreaterThan(0);
      expect(g).toBeLessThan(e / 2);
      expect(source.standard && source.edition && source.clause).toBeTruthy();
    }
  });

  // EN 10025-2:2004 Table 7, from memory.
  test.each([
    ['s355', 10, '355'],
    ['s355', 16, '355'],
    ['s355', 16.1, '345'],
    ['s355', 40, '345'],
    ['s355', 63, '335'],
    ['s275', 20, '265'],
    ['s235', 80, '215'],
  ])('%s, %d mm thick, yields at %s N/mm²', (id, thickness, printed) => {
    expect(yieldStrength(material(id), thickness / 1000)).toBe(Number(printed) * 1e6);
  });

  test('a thickness beyond the last band has no strength, and timber does not yield', () => {
    expect(yieldStrength(material('s355'), 0.081)).toBeNull();
    expect(elasticStrength(material('s355'), 0.081)).toBeNull();
    expect(yieldStrength(material('c24'), 0.047)).toBeNull();
  });

  test('US steel is read in ksi, and has no bands', () => {
    const fy = yieldStrength(material('A992'), 0.1);
    expect(fy === null ? 0 : fy / 6.894757e6).toBeCloseTo(50, 4); // NIST SP 811: 1 ksi is 6.894757 MPa
    expect(material('a992').e / 6.894757e6).toBeCloseTo(29000, 2);
  });

  test('timber gives its characteristic strengths', () => {
    expect(elasticStrength(material('c24'), 0.047)).toEqual({ bending: 24e6, shear: 4e6 });
    const glulam = material('24f-v4');
    expect(glulam.kind === 'timber_nds' && glulam.fbReversed < glulam.fb).toBe(true);
  });

  test('an unknown id is undefined', () => {
    expect(materialFor('unobtainium')).toBeUndefined();
    expect(materialIn([], 's355')).toBeUndefined();
  });
});

test('NDS timber gives its reference design values', () => {
  const timber = material('24f-v4');
  if (timber.kind !== 'timber_nds') throw new Error(timber.kind);
  expect(elasticStrength(timber, 0.1)).toEqual({ bending: timber.fb, shear: timber.fv });
});
