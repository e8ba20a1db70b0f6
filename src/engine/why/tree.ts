import type { Expression } from '../chart/index';
import type { Tree } from '../template/index';

type Monomial = Omit<Expression[number], 'factors' | 'key'>;
type Rank = (name: string) => number;

/** A formula of exact algebra as the tree of a template's expressions, its letters in the order of their rank. */
export const treeOf = (expression: Expression, rank: Rank = () => 0): Tree =>
  total(
    expression.map((term) => {
      const factors = term.factors.map(({ sum, power }) => ({
        tree: total(sum.map((monomial) => termOf(monomial, [], rank))),
        power,
      }));
      return termOf(term, factors, rank);
    }),
  );

type Signed = { readonly negative: boolean; readonly tree: Tree };
type Power = { readonly tree: Tree; readonly power: number };

/** The sum; 0 of nothing. */
export function total(terms: readonly Signed[]): Tree {
  const [first, ...rest] = terms;
  if (!first) return 0;
  return rest.reduce<Tree>(
    (sum, { negative, tree }) => [negative ? '-' : '+', sum, tree],
    first.negative ? ['neg', first.tree] : first.tree,
  );
}

export const positive = (tree: Tree): Signed => ({ negative: false, tree });

function termOf({ coefficient, powers }: Monomial, factors: readonly Power[], rank: Rank): Signed {
  const letters = [...powers]
    .map(([tree, power]) => ({ tree, power }))
    .sort((a, b) => rank(a.tree) - rank(b.tree));
  const all: Power[] = [...letters, ...factors];
  const top = product(
    Math.abs(coefficient.n),
    all.filter(({ power }) => power > 0),
  );
  const bottom = product(
    coefficient.d,
    all.filter(({ power }) => power < 0),
  );
  return { negative: coefficient.n < 0, tree: bottom === 1 ? top : ['/', top, bottom] };
}

function product(whole: number, powers: readonly Power[]): Tree {
  const factors = powers.map(({ tree, power }): Tree => {
    const size = Math.abs(power);
    return size === 1 ? tree : ['^', tree, size];
  });
  const all = whole === 1 && factors.length > 0 ? factors : [whole, ...factors];
  return all.reduce((left, right): Tree => ['*', left, right]);
}

/** The same with other names. */
export function withNames(tree: Tree, rename: (name: string) => string): Tree {
  if (typeof tree === 'string') return rename(tree);
  if (typeof tree === 'number') return tree;
  const [operation, ...parts] = tree;
  return [operation, ...parts.map((part) => withNames(part, rename))];
}
