import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam/index';
import { derive } from '@/engine/derivation/index';
import { admissibleSets, type Beam, readBeam } from '@/engine/model/index';
import { readQuantity } from '@/engine/quantity';
import type { Instance } from '@/engine/template';
import { type Checked, checkDerivation, nothingChecked } from '../support/derivation-check';
import { instanceAt, shippedTemplate, writtenTemplates } from '../support/templates';

const SYSTEMS = ['metric', 'us'] as const;
/** More redundants than this are worked with matrices, and their sets are too many to go through. */
const MOST = 3;

type Case = { name: string; beam: Beam; instance: Instance };

const optionsOf = (ei: string | undefined) => {
  const reading = ei === undefined ? null : readQuantity(ei, 'bending_stiffness');
  return reading?.ok ? { ei: reading.value } : {};
};

/** A template at its defaults and at the parameters of its proof cases. */
function casesOf(slug: string): Case[] {
  const template = shippedTemplate(slug);
  const given = [
    { name: 'defaults', parameters: {}, options: {} },
    ...template.proof_cases.map(({ name, parameters, ei }) => ({ name, parameters, options: optionsOf(ei) })),
  ];
  return given.map(({ name, parameters, options }) => {
    const instance = instanceAt(template, parameters, options);
    const reading = readBeam(instance.beam);
    if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
    return { name, instance, beam: reading.value };
  });
}

/** The vertical reactions that a derivation finds, by its step ids and its redundants. */
function checkReactions(beam: Beam, steps: ReturnType<typeof derive>, where: string): void {
  const { reactions } = solveBeam(beam);
  const largest = Math.max(...reactions.map(({ vertical }) => Math.abs(vertical)), 1e-9);
  const order = beam.supports.map((s, index) => ({ x: s.at, index })).sort((a, b) => a.x - b.x);
  for (const { id, value } of steps) {
    const letter = /^equilibrium-R([A-Z])$/.exec(id)?.[1];
    if (!letter) continue;
    const { vertical } = reactions[order[letter.charCodeAt(0) - 65]!.index]!;
    expect(Math.abs(value! - vertical), `${where} ${id}`).toBeLessThanOrEqual(1e-9 * largest);
  }
}

describe.each([...writtenTemplates.keys()])('%s', (slug) => {
  test('every admissible set, at the defaults and at every proof case, recalculates in both unit systems', {
    timeout: 300_000,
  }, () => {
    const counts: Checked = nothingChecked();
    for (const { name, beam, instance } of casesOf(slug)) {
      const sets = beam.degree <= MOST ? [...admissibleSets(beam)] : [instance.beam.redundants];
      for (const redundants of sets) {
        for (const system of SYSTEMS) {
          const where = `${slug}, ${name}, ${JSON.stringify(redundants)}, ${system}`;
          const steps = derive({
            beam,
            redundants: redundants && redundants.length > 0 ? redundants : undefined,
            names: { lengths: instance.dimensions, loads: instance.loadNames },
            system,
          });
          checkDerivation(steps, where, counts);
          checkReactions(beam, steps, where);
          if (beam.degree > 0)
            expect(
              steps.some(({ key }) => key),
              where,
            ).toBe(true);
        }
      }
    }
    expect(counts.recalculated).toBeGreaterThan(0);
  });
});
