import { describe, expect, test } from 'vitest';
import { answerSolve, type SolveOutcome } from '@/features/beam/beam';
import { hostileBodies } from '../support/hostile';

const BODIES = 1000;
const LONGEST = 50; // ms

type Tally = { refused: number; answered: number; slowest: number };

/** The outcome and how long it took; a slow one is timed again, since the machine may have been busy elsewhere. */
function timed(body: unknown): { outcome: SolveOutcome; took: number } {
  let took = Number.POSITIVE_INFINITY;
  let outcome: SolveOutcome | undefined;
  for (let run = 0; run < 4 && took >= LONGEST; run++) {
    const from = performance.now();
    outcome = answerSolve(body);
    took = Math.min(took, performance.now() - from);
  }
  return { outcome: outcome!, took };
}

/** Everything that is wrong with an outcome; nothing is, of a proven answer or of a clear refusal. */
function complaints(outcome: SolveOutcome): string[] {
  if (outcome.ok) {
    const { proof } = outcome.answer;
    const worst = Math.max(proof.equilibrium, proof.compatibility, proof.agreement);
    return [
      ...(worst <= 1e-6 ? [] : [`its proof is off by ${worst}`]),
      ...notFinite(outcome.answer).map((path) => `${path} is no finite number`),
    ];
  }
  return [
    ...(outcome.errors.length > 0 ? [] : ['it is refused without a reason']),
    ...outcome.errors.flatMap(({ pointer, code, message }) => [
      ...(pointer === '' || pointer.startsWith('/') ? [] : [`${pointer} points nowhere`]),
      ...(/^[a-z_]+$/.test(code) ? [] : [`"${code}" is no code`]),
      ...(message.length >= 10 && /[.?]$/.test(message) ? [] : [`"${message}" is no sentence`]),
      ...(/undefined|NaN|\[object|Invalid input/.test(unquoted(message))
        ? [`"${message}" is for nobody`]
        : []),
    ]),
  ];
}

/** Without what the message repeats of the body. */
const unquoted = (message: string): string => message.replace(/"[^"]*"|“[^”]*”/g, '');

function notFinite(value: unknown, path = ''): string[] {
  if (typeof value === 'number') return Number.isFinite(value) ? [] : [path];
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) => notFinite(inner, `${path}/${key}`));
}

describe(`${BODIES} hostile bodies`, () => {
  test(`are refused in clear words, or answered and proven, each in less than ${LONGEST} ms`, {
    timeout: 120_000,
  }, () => {
    const tallies = new Map<string, Tally>();
    const bad: string[] = [];
    for (const { seed, family, verdict, body } of hostileBodies(BODIES)) {
      const { outcome, took } = timed(body);
      const tally = tallies.get(family) ?? { refused: 0, answered: 0, slowest: 0 };
      tallies.set(family, {
        refused: tally.refused + (outcome.ok ? 0 : 1),
        answered: tally.answered + (outcome.ok ? 1 : 0),
        slowest: Math.max(tally.slowest, took),
      });
      if (verdict === 'refused' && outcome.ok) bad.push(`seed ${seed}, ${family}: it is answered`);
      if (!(took < LONGEST)) bad.push(`seed ${seed}, ${family}: it takes ${Math.round(took)} ms`);
      bad.push(...complaints(outcome).map((complaint) => `seed ${seed}, ${family}: ${complaint}`));
    }
    const rows = [...tallies].map(
      ([family, { refused, answered, slowest }]) =>
        `${String(refused).padStart(5)} ${String(answered).padStart(8)} ${slowest.toFixed(1).padStart(8)}  ${family}`,
    );
    console.info(['refused answered  slowest ms', ...rows].join('\n'));
    expect(bad).toEqual([]);
  });

  test('leave the prototypes of this program as they were', () => {
    for (const { body } of hostileBodies(150)) answerSolve(body);
    const fresh = {};
    expect(Reflect.get(fresh, 'length')).toBeUndefined();
    expect(Reflect.get(fresh, 'kind')).toBeUndefined();
  });
});
