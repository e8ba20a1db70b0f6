import { type DerivationStep, derive, SI_UNITS } from '@/engine/derivation';
import type { Redundant } from '@/engine/model';
import type { UnitSystemName } from '@/engine/quantity';
import { toSolveAnswer } from '@/features/beam/solve';
import type { TemplateEvaluation } from './evaluate';
import type { EvaluateAnswer } from './request';

/** The worked derivation of an evaluation, with the template's letters; with its own redundants unless others are given. */
export const derivationOf = (
  { beam, instance }: TemplateEvaluation,
  redundants: readonly Redundant[] | undefined = instance.beam.redundants,
  system?: UnitSystemName,
): DerivationStep[] =>
  derive({
    beam,
    redundants,
    names: { lengths: instance.dimensions, loads: instance.loadNames },
    system,
  });

/** The answer of POST /api/v1/templates/{slug}/evaluate. A rule that nothing is known for yet is left out. */
export const toEvaluateAnswer = (evaluation: TemplateEvaluation, revision: number): EvaluateAnswer => ({
  template: evaluation.template.slug,
  revision,
  beam: evaluation.instance.beam,
  result: toSolveAnswer(evaluation),
  derivation: derivationOf(evaluation).map(({ title, symbols, numbers, value, unit }) => ({
    title,
    symbols,
    numbers,
    value,
    unit: SI_UNITS[unit],
  })),
  rules: evaluation.rules.flatMap(({ id, severity, state, message }) =>
    state === 'unknown' ? [] : [{ rule: id, ok: state === 'holds', severity, message }],
  ),
});
