/** Whether a revision gives the results of the one that is issued: by evaluating both. */
import type { Template } from './document';
import type { BoxPoint } from './proof-box';
import { ownScales, sampleDifference, sampleOf } from './proof-laws';
import { solvePoint } from './proof-solve';

/** Both at one point that the issued revision lets in; null where it does not. */
export type Sameness =
  | { readonly state: 'compared'; readonly share: number; readonly limit: number }
  /** The revision refuses the point, or has no result there. */
  | { readonly state: 'lost'; readonly message: string }
  | null;

/** Compares results at a point of the issued revision's box: what members that pin it could have been evaluated at. */
export function compareResults(template: Template, issued: Template, point: BoxPoint): Sameness {
  const before = solvePoint(issued, point);
  if (before.state !== 'solved') return null;
  const after = solvePoint(template, point);
  if (after.state === 'failed') return { state: 'lost', message: after.message };
  if (after.state === 'refused') {
    const rule = template.rules.find(({ id }) => id === after.rule);
    return { state: 'lost', message: `Refused by a rule: ${rule?.title ?? after.rule}` };
  }
  const { beam, solution, limit } = before.solved;
  const other = after.solved;
  const share = Math.max(
    sampleDifference(
      ownScales(beam, solution),
      sampleOf(solution, beam.length),
      sampleOf(other.solution, other.beam.length),
    ),
    Math.abs(other.beam.length - beam.length) / beam.length,
  );
  return { state: 'compared', share, limit: Math.max(limit, other.limit) };
}
