const SIZE = 3;

function trigrams(text: string): ReadonlySet<string> {
  const padded = `  ${text} `;
  return new Set(Array.from({ length: padded.length - SIZE + 1 }, (_, i) => padded.slice(i, i + SIZE)));
}

/** How alike texts are to one, from 0 to 1: the trigrams that both have, as a share of those that either has. */
export function similarTo(text: string): (other: string) => number {
  const own = trigrams(text);
  return (other) => {
    const theirs = trigrams(other);
    const common = [...theirs].filter((trigram) => own.has(trigram)).length;
    return common / (own.size + theirs.size - common);
  };
}
