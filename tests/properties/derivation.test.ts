import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam/index';
import { derive } from '@/engine/derivation/index';
import { admissibleSets, type Beam, type BeamDocument, readBeam } from '@/engine/model/index';
import { checkDerivation, nothingChecked } from '../support/derivation-check';
import { randomBeam } from '../support/random-beam';

const BEAMS = 160;

/** Every other one plain. */
function* beams(count: number): Generator<{ seed: number; beam: Beam }> {
  for (let seed = 20_001, found = 0; found < count; seed++) {
    const reading = readBeam(seed % 2 === 0 ? randomBeam(seed) : plain(randomBeam(seed)));
    if (!reading.ok) continue;
    found++;
    yield { seed, beam: reading.value };
  }
}

/** The same beam of one EI, that does not shear, without hinges, on rigid supports, under uniform loads: for the charts. */
function plain({ segments: _, supports, ...rest }: BeamDocument): BeamDocument {
  const rigid = supports
    .filter(({ kind, kv }) => kind !== 'guided' || kv === undefined)
    .map(({ kv: _kv, kr: _kr, ...support }) =>
      support.kind === 'free' ? { ...support, kind: 'roller' as const } : support,
    )
    .map(({ at, kind, rise }) => ({ at, kind, ...(rise !== undefined && kind !== 'guided' && { rise }) }));
  const loads = rest.loads?.map((load) => (load.kind === 'line' ? { ...load, w1: load.w0 } : load));
  return { ...rest, ei: 2e7, supports: rigid, hinges: [], loads };
}

/** The support whose vertical reaction a step finds; null where it finds something else. */
function supportOf(beam: Beam, id: string): number | null {
  const letter = /^equilibrium-R([A-Z])$/.exec(id)?.[1];
  if (!letter) return null;
  const order = beam.supports.map((s, index) => ({ x: s.at, index })).sort((a, b) => a.x - b.x);
  return order[letter.charCodeAt(0) - 'A'.charCodeAt(0)]!.index;
}

describe(`derivations of ${BEAMS} random beams`, () => {
  test('every TeX string parses in strict mode, and every number recalculates', { timeout: 300_000 }, () => {
    const counts = nothingChecked();
    const ids = new Map<string, number>();
    let charted = 0;
    for (const { seed, beam } of beams(BEAMS)) {
      const system = seed % 3 === 0 ? 'us' : 'metric';
      const steps = derive({ beam, system });
      checkDerivation(steps, `seed ${seed}`, counts);
      for (const { id, charts } of steps) {
        charted += charts ? 1 : 0;
        const kind = id.split('-')[0]!;
        ids.set(kind, (ids.get(kind) ?? 0) + 1);
      }
      if (beam.degree > 0) expect(steps.some(({ key }) => key)).toBe(true);
    }
    console.info(JSON.stringify({ ...counts, charted, ...Object.fromEntries(ids) }));
    expect(charted).toBeGreaterThan(200);
    for (const count of Object.values(counts)) expect(count).toBeGreaterThan(0);
  });

  test('the reactions that a derivation finds are the solver’s', { timeout: 300_000 }, () => {
    for (const { seed, beam } of beams(100)) {
      const { reactions } = solveBeam(beam);
      const largest = Math.max(...reactions.map(({ vertical }) => Math.abs(vertical)));
      for (const step of derive({ beam })) {
        const support = supportOf(beam, step.id);
        if (support === null) continue;
        const off = Math.abs(step.value! - reactions[support]!.vertical);
        expect(off, `seed ${seed}, ${step.id}`).toBeLessThanOrEqual(1e-9 * largest);
      }
    }
  });

  test('every admissible choice of redundants has a derivation that recalculates to the same reactions', {
    timeout: 300_000,
  }, () => {
    let choices = 0;
    for (const { seed, beam } of beams(90)) {
      if (beam.degree === 0 || beam.degree > 3) continue;
      const { reactions } = solveBeam(beam);
      const largest = Math.max(...reactions.map(({ vertical }) => Math.abs(vertical)));
      for (const redundants of admissibleSets(beam)) {
        choices++;
        const where = `seed ${seed}, ${JSON.stringify(redundants)}`;
        const steps = derive({ beam, redundants });
        checkDerivation(steps, where);
        for (const step of steps) {
          const support = supportOf(beam, step.id);
          if (support === null) continue;
          const off = Math.abs(step.value! - reactions[support]!.vertical);
          expect(off, `${where} ${step.id}`).toBeLessThanOrEqual(1e-9 * largest);
        }
      }
    }
    console.info(`${choices} choices of redundants`);
    expect(choices).toBeGreaterThan(60);
  });
});
