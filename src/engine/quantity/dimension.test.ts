import { describe, expect, test } from 'vitest';
import {
  DIMENSIONS,
  divideDimensions,
  equalDimensions,
  isDimensionless,
  multiplyDimensions,
  nameDimension,
  raiseDimension,
} from './index';

describe('dimensions', () => {
  test('w L² is a moment, and w L⁴/(E I) a length', () => {
    const wL2 = multiplyDimensions(DIMENSIONS.line_load, raiseDimension(DIMENSIONS.length, 2));
    expect(equalDimensions(wL2, DIMENSIONS.moment)).toBe(true);
    const wL4 = multiplyDimensions(DIMENSIONS.line_load, raiseDimension(DIMENSIONS.length, 4));
    const EI = multiplyDimensions(DIMENSIONS.modulus, DIMENSIONS.second_moment);
    expect(equalDimensions(EI, DIMENSIONS.bending_stiffness)).toBe(true);
    expect(equalDimensions(divideDimensions(wL4, EI), DIMENSIONS.length)).toBe(true);
  });

  test('α ΔT is a ratio, and the cube root of a volume a length', () => {
    expect(isDimensionless(multiplyDimensions(DIMENSIONS.expansion, DIMENSIONS.temperature))).toBe(true);
    expect(equalDimensions(raiseDimension(DIMENSIONS.section_modulus, 1 / 3), DIMENSIONS.length)).toBe(true);
  });

  test('a dimension is named in words, an unusual one by its base units', () => {
    expect(nameDimension(DIMENSIONS.line_load)).toBe('a force per length');
    expect(nameDimension(DIMENSIONS.stress)).toBe('a force per area');
    expect(nameDimension(multiplyDimensions(DIMENSIONS.moment, DIMENSIONS.moment))).toBe('kg^2·m^4·s^-4');
    const massTimesLength = multiplyDimensions(
      DIMENSIONS.mass_per_length,
      raiseDimension(DIMENSIONS.length, 2),
    );
    expect(nameDimension(massTimesLength)).toBe('kg·m');
  });
});
