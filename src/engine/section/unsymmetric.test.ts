import { describe, expect, test } from 'vitest';
import { freeBending, sectionCautions } from './unsymmetric';

describe('freeBending(d)', () => {
  test('of an equal angle with thin legs is that of its mid-lines', () => {
    // Legs a of thickness t → 0: I_y = 5/24 a³t, I_yz = −1/8 a³t (by hand). D = 1/36 a⁶t²; I = 2/15 a³t, W = 2/9 a²t at a tip.
    const t = 1e-6;
    const free = freeBending({ shape: 'angle', h: 1, b: 1, t, r: 0, toe: 0 });
    expect(Math.abs((free?.iMajor ?? 0) / ((2 / 15) * t) - 1)).toBeLessThan(1e-5);
    expect(Math.abs((free?.wElMajor ?? 0) / ((2 / 9) * t) - 1)).toBeLessThan(1e-5);
  });

  test('of a rectangle that stands askew is that of its principal axes', () => {
    // b × h turned by 30°: 1/I = cos²/I₁ + sin²/I₂; σ = M cos·(h/2)/I₁ + M sin·(b/2)/I₂ at a corner (by hand)
    const [b, h] = [0.06, 0.2];
    const [cos, sin] = [Math.cos(Math.PI / 6), Math.sin(Math.PI / 6)];
    const corner = (z: number, y: number) => ({ z: z * cos - y * sin, y: z * sin + y * cos, r: 0 });
    const ring = [corner(-b / 2, -h / 2), corner(b / 2, -h / 2), corner(b / 2, h / 2), corner(-b / 2, h / 2)];
    const [first, second] = [(b * h ** 3) / 12, (h * b ** 3) / 12];
    const free = freeBending({ shape: 'outline', rings: [ring], t: b, j: 0, iw: 0 });
    expect(free?.iMajor).toBeCloseTo(1 / (cos ** 2 / first + sin ** 2 / second), 12);
    expect(free?.wElMajor).toBeCloseTo(1 / ((cos * h) / 2 / first + (sin * b) / 2 / second), 12);
  });

  test('of a channel and a tee is null: they have an axis of symmetry', () => {
    const flanged = { h: 0.2, b: 0.08, tw: 0.006, tf: 0.011, r: 0.013 };
    expect(freeBending({ shape: 'channel', ...flanged })).toBeNull();
    expect(freeBending({ shape: 'tee', ...flanged })).toBeNull();
  });
});

describe('sectionCautions(d)', () => {
  const flanged = { h: 0.2, b: 0.08, tw: 0.006, tf: 0.011, r: 0.013 };
  test('an I, a tee and a tube need none', () => {
    expect(sectionCautions({ shape: 'i', ...flanged }, 'metric')).toEqual([]);
    expect(sectionCautions({ shape: 'tee', ...flanged }, 'metric')).toEqual([]);
    expect(sectionCautions({ shape: 'chs', d: 0.1, t: 0.005 }, 'metric')).toEqual([]);
  });

  test('a channel twists, with the place of its shear centre', () => {
    expect(sectionCautions({ shape: 'channel', ...flanged }, 'metric')).toEqual([
      expect.stringMatching(/^Its shear centre lies \d\d(\.\d)?\smm outside the back of its web: /),
    ]);
  });

  test('an angle bends sideways and twists, in the units of the reader', () => {
    const angle = { shape: 'angle', h: 0.1, b: 0.1, t: 0.01, r: 0.012, toe: 0.006 } as const;
    expect(sectionCautions(angle, 'metric')).toHaveLength(2);
    expect(sectionCautions(angle, 'us')[0]).toContain('in⁴');
  });
});
