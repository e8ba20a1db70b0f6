/** Rules that nearly every beam has, with values that break each. */
import { supportLetter } from '@/engine/model';
import { solveProven } from '@/features/beam/solve';
import type { Written } from '@/features/review/draft';
import { type Added, freshId } from './add';
import { baysOf } from './bays';
import { DraftSteps } from './draft-steps';
import { sketchOf } from './drawing/sketch';
import { listAt, textAt } from './edit';

/** Those that the draft has not: no support lifts, overhangs are short, the beam is slender, and it moves little. */
export function addUsualRules(document: Written): Added {
  const steps = new DraftSteps(document);
  const known = listAt(document, '/rules').map((one) => textAt(one, '/id'));
  const before = known.length;
  for (const rule of [liftRule(document), ...overhangRules(document), ...spanRules(document)])
    if (rule && !known.includes(rule.id))
      steps.append('/rules', { ...rule, id: freshId(steps.document, '/rules', rule.id) });
  const { length } = listAt(steps.document, '/rules');
  return { edits: steps.edits, select: `/rules/${Math.min(before, length - 1)}` };
}

interface Rule {
  readonly id: string;
  readonly [key: string]: unknown;
}

const loadsOf = (document: Written): string[] =>
  listAt(document, '/parameters')
    .filter((one) => textAt(one, '/group') !== '')
    .map((one) => textAt(one, '/symbol'));

const UPWARD: Readonly<Record<string, string>> = { line_load: '-5 kN/m', force: '-5 kN' };

function liftRule(document: Written): Rule | null {
  const standing = listAt(document, '/beam/supports')
    .map((one, index) => ({
      letter: supportLetter(index),
      when: textAt(one, '/when'),
      kind: textAt(one, '/kind'),
    }))
    .filter(({ when, kind }) => when === '' && kind !== 'free' && kind !== 'guided')
    .map(({ letter }) => `R${letter}`);
  const upward = listAt(document, '/parameters').flatMap((one) => {
    const text = UPWARD[textAt(one, '/dimension')];
    return text !== undefined && textAt(one, '/group') !== '' ? [[textAt(one, '/symbol'), text]] : [];
  });
  if (standing.length === 0 || upward.length === 0) return null;
  const shown = standing.map((symbol) => `{${symbol}}`).join(', ');
  return {
    id: 'supports-push',
    title: standing.length === 1 ? 'The reaction is upward' : 'Every reaction is upward',
    expression: standing.map((symbol) => `${symbol} >= 0`).join(' and '),
    // A beam that lifts as it is meant to cannot be warned of it: at the defaults a warning must hold.
    severity: lifts(document) ? 'note' : 'warn',
    message: `${standing.length === 1 ? 'The reaction is' : 'The reactions are'} ${shown}: one is uplift. Hold the beam down there.`,
    trial: { parameters: Object.fromEntries(upward) },
  };
}

/** Whether a support pulls at the defaults. */
function lifts(document: Written): boolean {
  const sketch = sketchOf(document);
  const solved = sketch && solveProven(sketch.instance.beam);
  return solved?.ok ? solved.value.solution.reactions.some(({ vertical }) => vertical < 0) : false;
}

const overhangRules = (document: Written): Rule[] => {
  const bays = baysOf(document);
  const spans = bays.filter(({ is }) => is === 'span');
  return bays
    .filter(({ is, symbol }) => is !== 'span' && symbol !== null && spans.length > 0)
    .flatMap(({ is, symbol: overhang }): Rule[] => {
      const span = (is === 'left' ? spans[0] : spans.at(-1))?.symbol;
      if (!span) return [];
      return [
        {
          id: `overhang-${is}`,
          title: `The overhang ${overhang} is at most the span beside it`,
          expression: `${overhang} <= ${span}`,
          severity: 'warn',
          message: `The overhang {${overhang}} is longer than the span {${span}} beside it. Shorten it, or lengthen the span.`,
          shown: { tex: `${overhang}/${span}`, expression: `${overhang}/${span}` },
          trial: { parameters: { [String(span)]: '4 m', [String(overhang)]: '4.5 m' } },
        },
      ];
    });
};

function spanRules(document: Written): Rule[] {
  const lengths = baysOf(document).flatMap(({ symbol }) => symbol ?? []);
  const spans = baysOf(document).flatMap(({ is, symbol }) => (is === 'span' && symbol ? [symbol] : []));
  const those = spans.length > 0 ? spans : lengths;
  const [first] = those;
  if (first === undefined || loadsOf(document).length === 0) return [];
  const one = first;
  const least = those.length === 1 ? one : `min(${those.join(', ')})`;
  return [
    {
      id: 'slender',
      title: 'The span is at least 10 times the depth, or shear deformation is included',
      expression: `${least}/h >= 10 or shear == "included"`,
      severity: 'warn',
      message:
        'The shortest span is less than 10 times the depth {h}. Include the section’s shear stiffness, or analyse it as a deep beam.',
      trial: { parameters: Object.fromEntries(those.map((symbol) => [symbol, '6 m'])), depth: '0.9 m' },
    },
    {
      id: 'small-movement',
      title: 'The largest movement is at most a hundredth of the span',
      expression: `dmax <= ${least}/100`,
      severity: 'warn',
      message:
        'The movement {dmax} is more than a hundredth of the shortest span. Choose a stiffer section; small-deflection theory ends there.',
      trial: { parameters: {}, ei: '20 kNm2' },
    },
  ];
}
