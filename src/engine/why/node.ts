import type { Formula, How, Part, Source, Trace } from './types';

/** What a number is, apart from how it came about. */
export type Head = Pick<Trace, 'label' | 'symbol' | 'value' | 'measure'>;

/** A number whose parts are made when they are first read. */
export function node(head: Head, how: How, parts: () => readonly Part[]): Trace {
  let made: readonly Part[] | null = null;
  return {
    label: head.label,
    symbol: head.symbol,
    value: head.value,
    measure: head.measure,
    how,
    get parts() {
      made ??= parts();
      return made;
    },
  };
}

export const leaf = (head: Head, how: How): Trace => node(head, how, () => []);

type Given = Pick<Formula, 'method' | 'tree'> & Partial<Pick<Formula, 'sources' | 'note'>>;

export const formula = (head: Head, given: Given, parts: () => readonly Part[]): Trace =>
  node(head, { kind: 'formula', sources: [], note: '', ...given }, parts);

/** The same number by another name. */
export const renamed = (trace: Trace, names: Partial<Pick<Head, 'label' | 'symbol'>>): Trace =>
  node({ ...headOf(trace), ...names }, trace.how, () => trace.parts);

const headOf = ({ label, symbol, value, measure }: Trace): Head => ({ label, symbol, value, measure });

export const constant = (head: Head, source: string): Trace =>
  leaf(head, { kind: 'constant', source: { text: source, fromMemory: false } } as const);

export const cited = (text: string): Source => ({ text, fromMemory: false });

/** Where the criteria say that something is printed. */
export const sourceOf = ({
  publication,
  clause,
  from_memory,
}: {
  publication: string;
  clause: string;
  from_memory: boolean;
}): Source => ({
  text: `${publication}, ${clause}`,
  fromMemory: from_memory,
});

/** Makes everything once, by its key. */
export class Once {
  private readonly made = new Map<string, Trace>();

  get(key: string, make: () => Trace): Trace {
    const found = this.made.get(key) ?? make();
    this.made.set(key, found);
    return found;
  }
}
