import { resolveCriteria } from '@/engine/check';
import { type DerivationStep, derive } from '@/engine/derivation';
import type { UnitSystemName } from '@/engine/quantity';
import { ENGINE_VERSION } from '@/engine/version';
import { invalid } from '@/lib/app-error';
import { contentHash } from '@/lib/fingerprint';
import { pointer } from '@/lib/pointer';
import { evaluateMember, type MemberEvaluation } from './evaluate';
import type { SaveMember, TriedView } from './member';
import type { Pins } from './pins.server';
import { type StoredResult, toStoredResult } from './result';

export type Given = Pick<SaveMember, 'parameters' | 'self_weight' | 'patterns' | 'categories' | 'redundants'>;

export interface Assessment extends TriedView {
  readonly result: StoredResult;
  readonly fingerprint: string;
  readonly engine_version: string;
}

/** As the database gives it back: without undefined, typed arrays as lists. */
const plain = <T>(value: T): T => JSON.parse(JSON.stringify(value));

/** With the redundants that the stored solution was found by, and the template's letters; in the job's units. */
const derivationOf = (
  { beam, total, instance }: MemberEvaluation,
  system: UnitSystemName,
): DerivationStep[] =>
  derive({
    beam,
    redundants: total.forceMethod.redundants,
    names: { lengths: instance.dimensions, loads: instance.loadNames },
    system,
  });

/**
 * What the server finds for a member, with the fingerprint over everything that it follows from: inputs, the content of
 * what is pinned, the engine's version and the result itself. 422 at the inputs for what cannot be evaluated.
 */
export function assessMember(pins: Pins, given: Given, system: UnitSystemName): Assessment {
  const { template, criteria, combinations, section } = pins;
  const reading = evaluateMember({
    template: template.document,
    parameters: given.parameters,
    system,
    section: section && { values: section.row.values, material: section.material },
    criteria:
      criteria && resolveCriteria(criteria.document, combinations?.document ?? null, given.categories),
    ownWeight: given.self_weight,
    patterns: given.patterns,
    redundants: given.redundants ?? undefined,
  });
  if (!reading.ok)
    throw invalid(
      reading.faults.map(({ path, code, message }) => ({ pointer: pointer(path), code, message })),
    );
  const found = toStoredResult(reading.evaluation);
  const result = plain(
    found.kind === 'result' ? { ...found, derivation: derivationOf(reading.evaluation, system) } : found,
  );
  const content = {
    inputs: { ...given, system, material: section?.material.id ?? null },
    pins: {
      template: template.sha256,
      criteria: criteria?.sha256 ?? null,
      ...(combinations && { combinations: combinations.sha256 }),
      section: section && { edition: section.row.sha256, values: section.row.values },
      ...(section?.set && { materials: section.set.sha256 }),
    },
    engine: ENGINE_VERSION,
    result,
  };
  return { result, fingerprint: contentHash(plain(content)), engine_version: ENGINE_VERSION };
}
