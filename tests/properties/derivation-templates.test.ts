import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam/index';
import { derive } from '@/engine/derivation/index';
import { admissibleSets, type Beam, type Redundant, readBeam } from '@/engine/model/index';
import { readQuantity } from '@/engine/quantity';
import type { Instance } from '@/engine/template';
import { type Checked, checkDerivation, nothingChecked } from '../support/derivation-check';
import { instanceAt, shippedTemplate, writtenTemplates } from '../support/templates';

const SYSTEMS = ['metric', 'us'] as const;
/** More redundants than this are worked with matrices, and their sets are too many to go through. */
const MOST = 3;

const DEFAULTS = 'defaults';

type Case = { name: string; beam: Beam; instance: Instance };

const optionsOf = (ei: string | undefined) => {
  const reading = ei === undefined ? null : readQuantity(ei, 'bending_stiffness');
  return reading?.ok ? { ei: reading.value } : {};
};

/** A template at its defaults and at the parameters of its proof cases. */
function casesOf(slug: string): Case[] {
  const template = shippedTemplate(slug);
  const given = [
    { name: DEFAULTS, parameters: {}, options: {} },
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

/** f_ij and f_ji, each by its own form. */
function checkReciprocity(steps: ReturnType<typeof derive>, where: string): void {
  const values = new Map(steps.map(({ id, value }) => [id, value]));
  for (const { id, value } of steps) {
    const [, unit, at] = /^reciprocal-((?:turn-)?\w+)-((?:turn-)?\w+)$/.exec(id) ?? [];
    if (unit) expect(value, `${where} ${id}`).toBe(values.get(`flexibility-${at}-${unit}`));
  }
}

/** Both the reaction and the moment of one support are released: a hinge is left within a span. */
const leavesHinge = (beam: Beam, redundants: readonly Redundant[]): boolean =>
  redundants.some(
    (one) =>
      one.component === 'moment' &&
      redundants.some(
        (other) => other.component === 'vertical' && beam.supports[other.support]!.at === one.at,
      ),
  );

const inputOf = ({ beam, instance }: Case, redundants: readonly Redundant[] | undefined) => ({
  beam,
  redundants: redundants && redundants.length > 0 ? redundants : undefined,
  names: { lengths: instance.dimensions, loads: instance.loadNames },
});

const setsOf = ({ beam, instance }: Case) =>
  beam.degree <= MOST ? [...admissibleSets(beam)] : [instance.beam.redundants];

/** Of more sets than this, proof cases take so many from all through the list: the defaults have taken each. */
const SAMPLE = 12;

function triedSets(one: Case): ReturnType<typeof setsOf> {
  const sets = setsOf(one);
  if (one.name === DEFAULTS || sets.length <= SAMPLE) return sets;
  return Array.from({ length: SAMPLE }, (_, k) => sets[Math.floor((k * sets.length) / SAMPLE)]);
}

describe.each([...writtenTemplates.keys()])('%s', (slug) => {
  test('every admissible set at the defaults, and sets at every proof case, recalculate in both unit systems', {
    timeout: 300_000,
  }, () => {
    const counts: Checked = nothingChecked();
    for (const one of casesOf(slug)) {
      for (const redundants of triedSets(one)) {
        for (const system of SYSTEMS) {
          const where = `${slug}, ${one.name}, ${JSON.stringify(redundants)}, ${system}`;
          const steps = derive({ ...inputOf(one, redundants), system });
          checkDerivation(steps, where, counts);
          checkReactions(one.beam, steps, where);
          checkReciprocity(steps, where);
          if (one.beam.degree > 0)
            expect(
              steps.some(({ key }) => key),
              where,
            ).toBe(true);
        }
      }
    }
    expect(counts.recalculated).toBeGreaterThan(0);
  });

  test('every released beam of spans and cantilevers is worked by charts', { timeout: 300_000 }, () => {
    for (const one of casesOf(slug).slice(0, 1)) {
      for (const redundants of setsOf(one)) {
        if (redundants && leavesHinge(one.beam, redundants)) continue;
        const steps = derive(inputOf(one, redundants));
        const integrated = steps.filter(({ symbols }) => symbols.includes('\\int'));
        expect(integrated, `${slug}, ${JSON.stringify(redundants)}`).toEqual([]);
      }
    }
  });

  test('with a section’s weight and shear it recalculates too', { timeout: 300_000 }, () => {
    const template = shippedTemplate(slug);
    const instance = instanceAt(template, {}, { ga: 6e7, selfWeight: 361.5 });
    const reading = readBeam(instance.beam);
    if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
    const one = { name: 'with a section', instance, beam: reading.value };
    for (const redundants of setsOf(one)) {
      const where = `${slug}, ${one.name}, ${JSON.stringify(redundants)}`;
      const steps = derive(inputOf(one, redundants));
      checkDerivation(steps, where);
      checkReactions(one.beam, steps, where);
      checkReciprocity(steps, where);
    }
  });
});
