/** What a proof found, in the words of a passport. Pure. */
import { formatNumber } from '@/engine/quantity';
import type { Template } from '@/engine/template';
import type { BoxPoint, Limit, ProofReport, SweepTally } from '@/engine/template/proof-run';

export interface ProofRow {
  readonly name: string;
  readonly text: string;
}

/** "6.5×10⁻¹⁵"; exactly nothing is "0". */
export const shareOf = (share: number): string => formatNumber(share, { significant: 2 });

const counted = (count: number, one: string): string => `${count} ${count === 1 ? one : `${one}s`}`;

/** Row by row: sweep, methods, closed forms, ends, vanishing lengths, laws, sameness, worst point. */
export function proofRows(
  template: Template,
  { sweep, limits, seed, same, sameResults }: ProofReport,
): ProofRow[] {
  return [
    { name: 'Sweep', text: sweepText(template, sweep, seed) },
    { name: 'Two methods', text: methodsText(sweep) },
    ...formsRow(sweep),
    { name: 'Ends', text: endsText(limits) },
    ...limits.flatMap(vanishingRow),
    ...lawRows(sweep),
    { name: 'As issued before', text: sameText(same, sameResults) },
    ...(sweep.worst
      ? [
          {
            name: 'Worst point',
            text: `${pointText(template, sweep.worst.at)}: ${shareOf(100 * sweep.worst.share)} % of what it may be off by`,
          },
        ]
      : []),
  ];
}

function sweepText(
  { rules }: Template,
  { points, drawn, refused, failed, choices }: SweepTally,
  seed: number,
): string {
  const titleOf = (rule: string) => `“${rules.find(({ id }) => id === rule)?.title ?? rule}”`;
  const kept = Object.entries(refused);
  const by =
    kept.length === 1
      ? `by ${kept.map(([rule]) => titleOf(rule))}`
      : kept.map(([rule, count]) => `${count} by ${titleOf(rule)}`).join(', ');
  const visited = Object.values(choices).flatMap((values) => Object.values(values));
  return [
    `${counted(points, 'point')} spread over the parameter box (Latin hypercube, seed ${seed}, EI from a tenth to ten times)`,
    ...(kept.length > 0 ? [`${drawn - points} of ${drawn} kept out ${by}`] : []),
    ...(visited.length > 0 ? [`every choice at ${Math.min(...visited)} points or more`] : []),
    ...(failed > 0 ? [`${failed} without a proven result`] : []),
  ].join('; ');
}

const methodsText = ({ agreement, equilibrium, compatibility, short }: SweepTally): string =>
  `Force method and direct stiffness within ${shareOf(agreement)} of the largest value; equilibrium ${shareOf(equilibrium)}, compatibility ${shareOf(compatibility)}. Allowed: 10⁻⁹${short > 0 ? `, 10⁻⁶ at ${counted(short, 'point')} of very short lengths` : ''}`;

function formsRow({ forms }: SweepTally): ProofRow[] {
  const all = Object.values(forms);
  if (all.length === 0) return [];
  const compared = all.reduce((sum, { points }) => sum + points, 0);
  const largest = Math.max(...all.map((form) => form.largest));
  return [
    {
      name: 'Closed forms',
      text: `${all.length}, at ${compared} places together, within ${shareOf(largest)}`,
    },
  ];
}

const named = ({ symbol, column, held }: Limit): string =>
  `${column ? `${column} of ${symbol}` : symbol} = ${held}`;

function endsText(limits: readonly Limit[]): string {
  const of = (state: Limit['state']) => limits.filter((limit) => limit.state === state);
  const refused = of('refused');
  const failed = of('failed');
  return [
    `${of('proven').length} of ${limits.length} ends and choices proven`,
    ...(refused.length > 0 ? [`kept out by rules everywhere: ${refused.map(named).join(', ')}`] : []),
    ...(failed.length > 0 ? [`failed: ${failed.map(named).join(', ')}`] : []),
  ].join('; ');
}

const vanishingRow = (limit: Limit): ProofRow[] =>
  limit.without === undefined
    ? []
    : [
        {
          name: `${limit.symbol} → 0`,
          text: `The beam without it, within ${shareOf(limit.without)}${limit.near === undefined ? '' : `; a millionth of the length changes ${shareOf(limit.near)}`}`,
        },
      ];

function lawRows({ laws: { mirror, lengths, forces, stiffness } }: SweepTally): ProofRow[] {
  const largest = Math.max(lengths.largest, forces.largest, stiffness.largest);
  return [
    {
      name: 'Mirror',
      text: `Mirrored results at ${counted(mirror.points, 'point')}, within ${shareOf(mirror.largest)}`,
    },
    {
      name: 'Scaling',
      text: `Lengths × 3, loads × 7, EI × 11 in proportion at ${counted(lengths.points, 'point')}, within ${shareOf(largest)}`,
    },
  ];
}

function sameText(same: ProofReport['same'], isProven: boolean | null): string {
  if (!same) return 'Nothing was issued before it.';
  if (isProven) return `Same results, proven at ${counted(same.points, 'point')}`;
  const lost = same.lost > 0 ? `, ${same.lost} have no result any more` : '';
  return `Other results: ${same.differing} of ${same.points} points differ${lost}${same.largest ? `, by ${shareOf(same.largest.share)} at most` : ''}`;
}

/** "L = 2.435 m, a = 0.04 m, EI = 35170 kNm2". */
const pointText = (template: Template, { parameters, ei }: BoxPoint): string =>
  [
    ...template.parameters.flatMap(({ symbol }) => {
      const value = parameters[symbol];
      if (value === undefined) return [];
      return [
        typeof value === 'string' ? `${symbol} = ${value}` : `${symbol}: ${counted(value.length, 'row')}`,
      ];
    }),
    `EI = ${ei}`,
  ].join(', ');
