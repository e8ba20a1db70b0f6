import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam';
import { type BeamDocument, readBeam } from '@/engine/model';
import { peaksOf } from './peaks';

function diagramsOf(document: BeamDocument) {
  const reading = readBeam({ horizontal: 'ignore', ...document });
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  return solveBeam(reading.value);
}

describe('peaksOf names a value that holds over a stretch once', () => {
  test('along the whole of a cantilever under a tip couple', () => {
    const { diagrams, extremes } = diagramsOf({
      length: 2,
      ei: 1e6,
      supports: [{ at: 0, kind: 'fixed' }],
      loads: [{ kind: 'couple', at: 2, m: -1500 }],
    });
    expect(peaksOf(diagrams.moment, extremes.moment)).toEqual([
      { kind: 'extreme', x: 0, to: 2, value: -1500, rank: 0 },
    ]);
  });

  test('in the shear beside a couple, which does not change it', () => {
    const { diagrams, extremes } = diagramsOf({
      length: 6,
      ei: 1e6,
      supports: [0, 6].map((at) => ({ at, kind: 'roller' as const })),
      loads: [{ kind: 'couple', at: 2, m: 15e3 }],
    });
    expect(peaksOf(diagrams.shear, extremes.shear)).toEqual([
      { kind: 'extreme', x: 0, to: 6, value: expect.closeTo(2500, 9), rank: 0 },
    ]);
  });

  test('and two equal peaks with a trough between them twice', () => {
    const { diagrams, extremes } = diagramsOf({
      length: 6,
      ei: 1e6,
      supports: [0, 6].map((at) => ({ at, kind: 'fixed' as const })),
      loads: [{ kind: 'line', from: 0, to: 6, w0: 10e3, w1: 10e3 }],
    });
    const [governing, mirrored, other] = peaksOf(diagrams.moment, extremes.moment);
    expect([governing?.to, mirrored?.to]).toEqual([undefined, undefined]);
    expect(governing?.value).toBeCloseTo(-30e3, 6); // wL²/12
    expect(other?.value).toBeCloseTo(15e3, 6); // wL²/24
  });
});
