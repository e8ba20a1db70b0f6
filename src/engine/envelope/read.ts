import { type Combination, type Region, regionsOf } from '../combination/index';
import {
  type Beam,
  type BeamDocument,
  checkRedundants,
  type Fault,
  type Load,
  type Reading,
  type Redundant,
  readBeam,
  type Support,
  type SupportDocument,
} from '../model/index';
import { type Source, sourcesOf } from './sources';

/** A beam with the combinations of its load groups. Every load has a group. */
export type EnvelopeDocument = Omit<BeamDocument, 'supports' | 'loads'> & {
  supports: (SupportDocument & { lift_off?: boolean | undefined })[];
  loads?: (Load & { group: string })[] | undefined;
  combinations: readonly Combination[];
  /** Groups whose loads act only where adverse. */
  patterns?: readonly string[] | undefined;
};

/** What an envelope is made of. */
export type EnvelopeTask = {
  /** With the loads of patterned groups cut where pattern spans meet. */
  readonly beam: Beam;
  readonly redundants: readonly Redundant[] | undefined;
  readonly spans: readonly Region[];
  readonly sources: readonly Source[];
  readonly combinations: readonly Combination[];
  /** Indices of the supports that cannot pull. */
  readonly liftOff: readonly number[];
};

/** The task of a document, or every fault at its path in it. */
export function readEnvelope(document: EnvelopeDocument): Reading<EnvelopeTask> {
  const reading = readBeam(document);
  const faults = [...(reading.ok ? [] : reading.faults), ...combinationFaults(document.combinations)];
  if (!reading.ok) return { ok: false, faults };
  const beam = reading.value;
  faults.push(...liftOffFaults(beam.supports, document.supports));
  if (document.redundants) faults.push(...checkRedundants(beam, document.redundants));
  if (faults.length > 0) return { ok: false, faults };
  const liftOff = document.supports.flatMap(({ lift_off }, i) => (lift_off ? [i] : []));
  return { ok: true, value: envelopeTask(beam, { ...document, liftOff }) };
}

/** The task of a beam that has been read. */
export function envelopeTask(
  beam: Beam,
  given: {
    readonly combinations: readonly Combination[];
    readonly patterns?: readonly string[] | undefined;
    readonly redundants?: readonly Redundant[] | undefined;
    readonly liftOff?: readonly number[] | undefined;
  },
): EnvelopeTask {
  const spans = regionsOf(beam);
  const sources = sourcesOf(beam, spans, given.patterns ?? []);
  return {
    beam: { ...beam, loads: sources.flatMap(({ loads }) => loads) },
    redundants: given.redundants,
    spans,
    sources,
    combinations: given.combinations,
    liftOff: given.liftOff ?? [],
  };
}

/** Results name their combination, so that no two may have one name. */
function combinationFaults(combinations: readonly Combination[]): Fault[] {
  if (combinations.length === 0) {
    const message = 'There is no combination. Give one with the factors of its load groups.';
    return [{ path: ['combinations'], code: 'required', message }];
  }
  return combinations.flatMap(({ name, factors }, i): Fault[] => {
    const path = ['combinations', i];
    const named = combinations.findIndex((other) => other.name === name);
    const message = `Combination ${named} has this name already. Results are told apart by it: give another.`;
    return [
      ...(named < i ? [{ path: [...path, 'name'], code: 'duplicate' as const, message }] : []),
      ...Object.entries(factors).flatMap(([group, factor]): Fault[] =>
        Number.isFinite(factor)
          ? []
          : [
              {
                path: [...path, 'factors', group],
                code: 'not_finite',
                message: 'This is not a finite number. Give one.',
              },
            ],
      ),
    ];
  });
}

/** Only what holds the beam up and nothing else can let it go: a support that holds rotation holds it down as well. */
function liftOffFaults(
  supports: readonly Support[],
  documents: readonly { lift_off?: boolean | undefined }[],
): Fault[] {
  return documents.flatMap(({ lift_off }, i): Fault[] => {
    if (!lift_off) return [];
    const { kind, vertical, rotation } = supports[i]!;
    const path = ['supports', i, 'lift_off'];
    if (vertical.kind === 'free') {
      const message = `A ${kind} support without kv does not hold the beam up, so it cannot lift off. Remove lift_off, or add kv.`;
      return [{ path, code: 'unrestrained', message }];
    }
    if (rotation.kind === 'free') return [];
    const message =
      'A support that holds rotation cannot let the beam lift off. Remove lift_off, or let it rotate freely.';
    return [{ path, code: 'conflict', message }];
  });
}
