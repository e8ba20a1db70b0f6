const SIZE = 3;

function trigrams(text: string): ReadonlySet<string> {
  const padded = `  ${text} `;
  return new Set(Array.from({ length: padded.length - SIZE + 1 }, (_, i) => padded.slice(i, i + SIZE)));
}

/** What two sets have in common, as a share of what either has. */
const share = (common: number, one: number, other: number): number => common / (one + other - common);

/** How alike texts are to one, from 0 to 1: the trigrams that both have, as a share of those that either has. */
export function similarTo(text: string): (other: string) => number {
  const own = trigrams(text);
  return (other) => {
    const theirs = trigrams(other);
    const common = [...theirs].filter((trigram) => own.has(trigram)).length;
    return share(common, own.size, theirs.size);
  };
}

/** Many texts, of which those like one are found without a look at the others. */
export class SimilarTexts {
  /** Texts that have a trigram, by their place. */
  private readonly holders = new Map<string, number[]>();
  /** How many trigrams each text has. */
  private readonly sizes: number[] = [];

  add(text: string): void {
    const own = trigrams(text);
    const at = this.sizes.push(own.size) - 1;
    for (const trigram of own) {
      const holders = this.holders.get(trigram);
      if (holders) holders.push(at);
      else this.holders.set(trigram, [at]);
    }
  }

  /** The places of the texts that are at least so alike to one, each with how alike it is: as similarTo. */
  *like(text: string, least: number): Generator<readonly [number, number]> {
    const own = trigrams(text);
    const common = new Uint16Array(this.sizes.length);
    for (const trigram of own) {
      for (const at of this.holders.get(trigram) ?? []) common[at] = (common[at] ?? 0) + 1;
    }
    for (const [at, shared] of common.entries()) {
      const alike = shared === 0 ? 0 : share(shared, own.size, this.sizes[at] ?? 0);
      if (alike >= least && shared > 0) yield [at, alike];
    }
  }
}
