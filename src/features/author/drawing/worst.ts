/** The worst geometry of a draft's parameter box, looked for a few points at a time. */
import type { Template } from '@/engine/template';
import { type BoxPoint, boxOf } from '@/engine/template/proof-box';
import { compareForms, type PointReading, solvePoint } from '@/engine/template/proof-solve';
import type { StatedValues } from '../edit';
import { atEnds } from './box-values';

/** Points drawn over the box, besides its corners; the proof draws more, at issue. */
const DRAWN = 80;
const MOST_CORNERS = 16;
const SEED = 1;

interface Found {
  readonly values: StatedValues;
  /** Of what two methods, or a closed form, may differ by; Infinity where there is no result. */
  readonly share: number;
  /** Why there is no result. */
  readonly message: string | null;
}

export interface Search {
  readonly done: number;
  readonly total: number;
  /** Points that block rules let in. */
  readonly points: number;
  readonly worst: Found | null;
}

/** The corners of the box of lengths, loads and choices at their defaults. */
function cornersOf(template: Template): StatedValues[] {
  const lengths = template.parameters.filter((one) => one.kind === 'quantity' && one.group === undefined);
  const count = Math.min(MOST_CORNERS, 2 ** lengths.length);
  return Array.from({ length: count }, (_, corner) =>
    Object.assign(
      {},
      ...lengths.map((one, axis) => atEnds({ parameters: [one] }, (corner >> axis) & 1 ? 'max' : 'min')),
    ),
  );
}

export const beginSearch = (template: Template): Search => ({
  done: 0,
  total: DRAWN + cornersOf(template).length,
  points: 0,
  worst: null,
});

/** Looks at so many points more. A point that a block rule keeps out counts for nothing. */
export function searchFurther(template: Template, search: Search, count: number): Search {
  const corners = cornersOf(template);
  const box = boxOf(template, SEED);
  const ei = template.stiffness.default_ei;
  let { done, points, worst } = search;
  for (; done < Math.min(search.total, search.done + count); done++) {
    const values: StatedValues = corners[done] ?? box(done - corners.length).parameters;
    const point: BoxPoint = { parameters: writable(values), ei };
    const found = judged(template, values, solvePoint(template, point));
    if (!found) continue;
    points++;
    if (!worst || found.share > worst.share) worst = found;
  }
  return { done, total: search.total, points, worst };
}

const writable = (values: StatedValues): BoxPoint['parameters'] =>
  Object.fromEntries(
    Object.entries(values).map(([symbol, value]) => [
      symbol,
      typeof value === 'string' ? value : value.map((row) => ({ ...row })),
    ]),
  );

function judged(template: Template, values: StatedValues, reading: PointReading): Found | null {
  if (reading.state === 'refused') return null;
  if (reading.state === 'failed')
    return { values, share: Number.POSITIVE_INFINITY, message: reading.message };
  const { proof, limit } = reading.solved;
  const forms = compareForms(template, reading.solved).map(({ share }) => share);
  const largest = Math.max(proof.equilibrium, proof.compatibility, proof.agreement, ...forms);
  return { values, share: largest / limit, message: null };
}
