import { type Solution, solveBeam } from '@/engine/beam/index';
import { prepareFast } from '@/engine/continuous/index';
import { influenceLine } from '@/engine/influence/index';
import { type Beam, readBeam } from '@/engine/model/index';
import { evaluate } from '@/engine/polynomial/index';
import { proofLimit, proveSolution } from '@/engine/proof/index';
import { runProofCases } from '@/engine/template/index';
import { featuresOf } from '../tests/support/beam-features';
import { differences, exactBeams, type Kinds, kindsOf } from '../tests/support/exact-beams';
import { printedBeamValues } from '../tests/support/printed-tables';
import { ordinateLine, quantityOf, readPrinted } from '../tests/support/printed-value';
import { randomBeam } from '../tests/support/random-beam';
import { authored, writtenTemplates } from '../tests/support/templates';
import { ErrorTable } from './support/error-table';

/**
 * Prints how far the engine is from what others printed and from what another program solved: the mean and the worst
 * error of each family, and why it is not zero. Fails where a value is missed or a sample is skipped.
 */
const RANDOM = 20_000;
/** Of the largest value of each kind. */
const WITHIN = 1e-9;

const REASON = {
  digit: 'the rounding of the printed digit',
  doubles: 'the rounding of the result to doubles',
  both: 'the rounding of the printed digit, and for closed forms the rounding of the result to doubles',
  two: 'the rounding of both methods, 32 digits inside',
} as const;

/** The rows of what doubles solve, beside those of 32 digits. */
const inDoubles = (family: string): string => `${family}, in doubles`;

/** The beam by the fast solver; null where it leaves it to 32 digits. */
function solvedInDoubles(beam: Beam): Solution | null {
  const { by, ...solution } = prepareFast(beam).solve();
  // Of what is compared here it has all.
  return by === 'doubles' ? (solution as Solution) : null;
}

function printedValues(): ErrorTable {
  const table = new ErrorTable('Printed values, in units of the last printed digit', REASON.digit);
  for (const { family, source, title, document, quantity, printed, units } of printedBeamValues()) {
    const name = `${source}, ${title}`;
    const reading = readBeam(document);
    if (!reading.ok) {
      table.skip(name, 'the beam is refused');
      continue;
    }
    const beam = reading.value;
    const { want, tolerance } = readPrinted(printed, units);
    const add = (kind: string, got: number) => {
      // A fraction has no last digit; half a unit is then what doubles leave of it.
      table.add(kind, (Math.abs(got - want) / tolerance) * units, units * (1 + 1e-9), name);
    };
    add(family, quantityOf(quantity, beam, solveBeam(beam)));
    const fast = solvedInDoubles(beam);
    if (fast) add(inDoubles(family), quantityOf(quantity, beam, fast));
    const ordinate = family === 'influence ordinates' && ordinateLine(beam, quantity);
    if (ordinate) {
      const { line } = influenceLine(ordinate.unloaded, ordinate.quantity);
      add(`${family}, by their lines`, evaluate(line, ordinate.at)[0]);
    }
  }
  return table;
}

const KINDS: Readonly<Record<keyof Kinds, string>> = {
  force: 'reactions',
  couple: 'moments of supports',
  shear: 'shear',
  moment: 'moment',
  slope: 'slope',
  deflection: 'deflection',
};

function exactValues(): ErrorTable {
  const table = new ErrorTable('Exact rationals by sympy, as parts of the largest value', REASON.doubles);
  for (const { name, document, positions, exact } of exactBeams()) {
    const reading = readBeam(document);
    if (!reading.ok) {
      table.skip(name, 'the beam is refused');
      continue;
    }
    const add = (solution: Solution, family: (kind: string) => string) => {
      const apart = differences(kindsOf(solution, positions), exact);
      for (const kind of Object.keys(KINDS) as (keyof Kinds)[]) {
        for (const error of apart[kind]) table.add(family(KINDS[kind]), error, WITHIN, name);
      }
    };
    add(solveBeam(reading.value), (kind) => kind);
    const fast = solvedInDoubles(reading.value);
    if (fast) add(fast, inDoubles);
  }
  return table;
}

function templateProofs(): ErrorTable {
  const table = new ErrorTable('Proof cases of the templates, as parts of what is allowed', REASON.both);
  for (const [slug, written] of writtenTemplates) {
    for (const { name, checks, fault } of runProofCases(authored(written))) {
      if (fault !== undefined || checks.length === 0)
        table.skip(`${slug}: ${name}`, fault ?? 'it checks nothing');
      for (const { name: what, got, expected, tolerance } of checks) {
        const apart = Math.abs(got - expected);
        table.add(slug, apart === 0 ? 0 : apart / tolerance, 1, `${name}: ${what}`);
      }
    }
  }
  return table;
}

/**
 * How far the solver in doubles is from stiffness in 32 digits, as proofs have it: beside what its kind could be, so that
 * a deflection of nothing is none. Null where it does not solve the beam.
 */
function differenceOfDoubles(beam: Beam): number | null {
  const fast = solvedInDoubles(beam);
  return fast && proveSolution(beam, fast).agreement;
}

function randomBeams(): ErrorTable {
  const table = new ErrorTable('Random beams, force method against stiffness, by feature', REASON.two);
  let found = 0;
  for (let seed = 1; found < RANDOM; seed++) {
    const document = randomBeam(seed);
    const reading = readBeam(document);
    if (!reading.ok) {
      const mechanism = reading.faults.every(({ code }) => code === 'unstable');
      if (!mechanism) table.skip(`seed ${seed}`, reading.faults.map(({ message }) => message).join(' '));
      continue;
    }
    found++;
    const beam = reading.value;
    const solution = solveBeam(beam);
    const { equilibrium, compatibility, agreement } = proveSolution(beam, solution);
    const worst = Math.max(equilibrium, compatibility, agreement); // NaN if one of them is
    for (const feature of ['all', ...featuresOf(document)])
      table.add(feature, worst, proofLimit(beam), `seed ${seed}`);
    const apart = differenceOfDoubles(beam);
    if (apart !== null) table.add('doubles beside 32 digits', apart, proofLimit(beam), `seed ${seed}`);
  }
  return table;
}

const faults = [printedValues, exactValues, templateProofs, randomBeams].flatMap((make) => {
  const table = make();
  console.log(`${table.print()}\n`);
  return table.faults();
});
console.log(faults.length === 0 ? 'No value missed, no sample skipped.' : faults.join('\n'));
process.exitCode = faults.length === 0 ? 0 : 1;
