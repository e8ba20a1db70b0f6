/** What a change of a template does to its benchmarks: the proof cases of the one revision, worked by both. */
import type { ProofCase, Selector, Template } from './document';
import { runProofCases } from './proof';

type Worked = { readonly expected: number; readonly got: number };

/** One quantity of one proof case, SI. Null: the revision cannot work it, or has no such closed form. */
export type Benchmark = {
  readonly proofCase: string;
  readonly name: string;
  readonly quantity: Selector;
  /** The formula or printed figure that it is compared with. */
  readonly against: string;
  readonly from: Worked | null;
  readonly to: Worked | null;
  /** Whether what the formula says, or what the solver finds, is another figure by now. */
  readonly moved: boolean;
};

/** Below this share of the figure two values are the same. */
const SAME = 1e-9;

export const compareBenchmarks = (from: Template, to: Template): Benchmark[] =>
  from.proof_cases.flatMap((proof) => benchmarksOf(from, to, proof));

function benchmarksOf(from: Template, to: Template, proof: ProofCase): Benchmark[] {
  const before = checksOf(from, proof);
  const isThere = proof.expect.map(
    (one) => !('result' in one) || to.results.some(({ id }) => id === one.result),
  );
  const after = checksOf(to, { ...proof, expect: proof.expect.filter((_, k) => isThere[k]) });
  let next = 0;
  return before.map((was, k): Benchmark => {
    const is = isThere[k] ? (after[next++] ?? null) : null;
    const { name, quantity, against } = was;
    return {
      proofCase: proof.name,
      name,
      quantity,
      against,
      from: worked(was),
      to: is && worked(is),
      moved: is === null || differ(was.expected, is.expected) || differ(was.got, is.got),
    };
  });
}

const checksOf = (template: Template, proof: ProofCase) =>
  runProofCases({ ...template, proof_cases: [proof] })[0]?.checks ?? [];

const worked = ({ expected, got }: Worked): Worked => ({ expected, got });

/** Nothing beside next to nothing is the same. */
const differ = (a: number, b: number): boolean => {
  const size = Math.max(Math.abs(a), Math.abs(b));
  return size > TINY && Math.abs(a - b) > SAME * size;
};

/** N, m, N·m: what rounding leaves of a zero. */
const TINY = 1e-9;
