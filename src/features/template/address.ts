/** A template page's values in its address: what differs from the defaults, so that a link says it all. */
import type { Template } from '@/engine/template';
import { type Raw, type RawOptions, toParameters, toRaw } from './raw';

/** What is chosen besides the parameters. */
export interface Stiffness {
  /** Text with its unit; empty for the template's own. */
  readonly ei: string;
  readonly section: string;
  readonly table: string;
  readonly material: string;
}
export const OWN_STIFFNESS: Stiffness = { ei: '', section: '', table: '', material: '' };

type Parameters = Pick<Template, 'parameters'>;

/** Values by symbol out of a query; rows and loads by group are JSON there. */
export function readValues({ parameters }: Parameters, query: URLSearchParams): Record<string, unknown> {
  return Object.fromEntries(
    parameters.flatMap(({ symbol }): [string, unknown][] => {
      const text = query.get(symbol);
      return text === null || text.length > LONGEST ? [] : [[symbol, fromText(text)]];
    }),
  );
}

const LONGEST = 4000; // characters of one value; 50 rows have about 3000

function fromText(text: string): unknown {
  if (!/^[[{]/.test(text)) return text;
  try {
    return JSON.parse(text);
  } catch {
    return text;
  }
}

export function readStiffness(query: URLSearchParams): Stiffness {
  const word = (name: string) => (query.get(name) ?? '').slice(0, 80);
  return { ei: word('ei'), section: word('section'), table: word('table'), material: word('material') };
}

/** The query that says these values, without the defaults. */
export function writeValues(
  template: Parameters,
  raw: Raw,
  stiffness: Stiffness,
  options: RawOptions,
): URLSearchParams {
  const query = new URLSearchParams();
  const defaults = toParameters(template, toRaw(template, {}, options));
  for (const [symbol, value] of Object.entries(toParameters(template, raw))) {
    const [said, own] = [value, defaults[symbol]].map((one) =>
      typeof one === 'string' ? one : JSON.stringify(one),
    );
    if (said !== own) query.set(symbol, said ?? '');
  }
  for (const [name, value] of Object.entries(stiffness)) if (value !== '') query.set(name, value);
  return query;
}
