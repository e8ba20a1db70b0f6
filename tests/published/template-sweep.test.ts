import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam';
import { type Beam, readBeam } from '@/engine/model';
import { isProven, proofLimit, proveSolution } from '@/engine/proof';
import {
  evaluateNumber,
  evaluateTruth,
  type Instance,
  instantiate,
  limitsOf,
  type Parameter,
  type QuantityParameter,
  readParameters,
  select,
  type Template,
} from '@/engine/template';
import { type Dice, dice } from '../support/random';
import { shippedTemplate, writtenTemplates } from '../support/templates';

const SETS = 200;

function drawn(parameter: Parameter, random: Dice): unknown {
  if (parameter.kind === 'choice') return random.pick(parameter.options).value;
  if (parameter.kind === 'quantity') return number(parameter, random);
  return Array.from({ length: random.whole(parameter.least, 6) }, () =>
    Object.fromEntries(
      parameter.columns.flatMap((column) =>
        column.kind === 'quantity' ? [[column.symbol, number(column, random)]] : [],
      ),
    ),
  );
}

/** Anywhere in the range, its ends and zero included now and then; stiffnesses over their orders of magnitude. */
function number(parameter: QuantityParameter, random: Dice): number {
  const { min, max } = limitsOf(parameter);
  if (random.chance(0.1)) return random.pick([min, max, Math.max(min, 0)]);
  return min > 0 && max / min > 1e3 ? random.logBetween(min, max) : random.between(min, max);
}

/** A random set of parameters that no block rule refuses. */
function drawInstance(template: Template, random: Dice): Instance {
  for (;;) {
    const raw = Object.fromEntries(template.parameters.map((one) => [one.symbol, drawn(one, random)]));
    const values = readParameters(template, raw);
    if (!values.ok) throw new Error(JSON.stringify(values.faults));
    const made = instantiate(template, values.values, { ei: random.logBetween(1e4, 1e9) });
    if (made.ok) return made.instance;
  }
}

function beamOf({ beam }: Instance): Beam {
  const reading = readBeam(beam);
  if (reading.ok) return reading.value;
  throw new Error(JSON.stringify(reading.faults));
}

describe.each([...writtenTemplates.keys()])('%s', (slug) => {
  test(`its formulas agree with the solver over ${SETS} random sets of parameters`, {
    timeout: 30_000,
  }, () => {
    const template = shippedTemplate(slug);
    const random = dice(slug.length * 7919);
    let compared = 0;
    let worst = 0;
    for (let set = 0; set < SETS; set++) {
      const instance = drawInstance(template, random);
      const beam = beamOf(instance);
      const solution = solveBeam(beam, instance.beam.redundants);
      expect(isProven(proveSolution(beam, solution), beam)).toBe(true);
      for (const { id, quantity, expression, when } of template.results) {
        if (when && !evaluateTruth(when.tree, instance.scope)) continue;
        const { value, scale } = select(quantity, solution, instance.scope);
        const share =
          scale === 0
            ? Math.abs(value)
            : Math.abs(value - evaluateNumber(expression.tree, instance.scope)) / scale;
        expect(share, `${id} at ${JSON.stringify([...instance.scope])}`).toBeLessThanOrEqual(
          proofLimit(beam),
        );
        worst = Math.max(worst, share);
        compared++;
      }
    }
    process.stdout.write(
      `${slug}: ${compared} values compared, worst difference ${worst.toExponential(1)}\n`,
    );
    expect(compared).toBeGreaterThanOrEqual(SETS);
  });
});
