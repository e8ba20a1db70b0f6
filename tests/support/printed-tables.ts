import { readFileSync } from 'node:fs';
import Papa from 'papaparse';
import type { BeamDocument, Load, SupportDocument } from '@/engine/model/index';
import { ARRANGEMENTS } from './arrangements';

/** One printed value, with the beam that it is of and the name of the quantity (`quantityOf`). */
export type PrintedBeamValue = {
  family: string;
  source: string;
  title: string;
  document: BeamDocument;
  quantity: string;
  printed: string;
  /** Units of the last digit that the table may be off by. */
  units: number;
};

type Row = Record<string, string>;
type Family = {
  name: string;
  file: string;
  read: (row: Row) => Omit<PrintedBeamValue, 'family' | 'source'>[];
};

const FAMILIES: readonly Family[] = [
  { name: 'single beams', file: 'beam-cases.csv', read: readCase },
  { name: 'equal spans, all patterns', file: 'equal-spans.csv', read: readEqualSpans },
  { name: 'influence ordinates', file: 'influence-ordinates.csv', read: readOrdinates },
  { name: 'sinking supports', file: 'support-movements.csv', read: readMovements },
  { name: 'turned ends and springs', file: 'movements-and-springs.csv', read: readMoved },
];

/** Every printed value of every beam table in data/published. Throws where a row names what is not known here. */
export function printedBeamValues(): PrintedBeamValue[] {
  return FAMILIES.flatMap(({ name, file, read }) =>
    rowsOf(file).flatMap((row) => {
      const { source = '', edition = '', table = '', from_memory: memory = '' } = row;
      if (!(source && edition && table && /^(yes|no)$/.test(memory))) {
        throw new Error(`a row of ${file} does not name its source: ${JSON.stringify(row)}`);
      }
      return read(row).map((value) => ({ family: name, source: `${source} ${table}`, ...value }));
    }),
  );
}

function rowsOf(file: string): Row[] {
  const text = readFileSync(new URL(`../../data/published/${file}`, import.meta.url), 'utf8');
  return Papa.parse<Row>(text, { header: true, skipEmptyLines: true }).data;
}

const list = (text: string | undefined): string[] => (text ?? '').split(' ').filter(Boolean);

function continuous(spans: readonly number[], loads: Load[], moved: SupportDocument[] = []): BeamDocument {
  const ends = [0];
  for (const span of spans) ends.push(ends.at(-1)! + span);
  const supports = ends.map((at) => moved.find((one) => one.at === at) ?? ({ at, kind: 'roller' } as const));
  return { length: ends.at(-1)!, ei: 1, supports, loads, horizontal: 'ignore' };
}

function readCase({ arrangement = '', quantity = '', printed = '', units, case: number }: Row) {
  const document = ARRANGEMENTS[arrangement];
  if (!document) throw new Error(`no arrangement is called ${arrangement}`);
  const title = `case ${number}, ${arrangement}: ${quantity}`;
  return [{ title, document, quantity, printed, units: Number(units) }];
}

const SPAN_LOADS: Readonly<Record<string, (left: number) => Load[]>> = {
  uniform: (left) => [{ kind: 'line', from: left, to: left + 1, w0: 1, w1: 1 }],
  centre: (left) => [{ kind: 'point', at: left + 0.5, p: 1 }],
  thirds: (left) => [1 / 3, 2 / 3].map((part) => ({ kind: 'point', at: left + part, p: 1 })),
};

/** A row is an arrangement; every filled cell that names a quantity is a value. */
function readEqualSpans({ load = '', spans, loaded = '', ...cells }: Row) {
  const loads = SPAN_LOADS[load];
  if (!loads) throw new Error(`no load is called ${load}`);
  const lengths = new Array<number>(Number(spans)).fill(1);
  const document = continuous(
    lengths,
    list(loaded).flatMap((span) => loads(Number(span) - 1)),
  );
  return Object.entries(cells)
    .filter(([quantity, printed]) => /^[MVf]([A-F][lr]?|\d)$/.test(quantity) && printed)
    .map(([quantity, printed]) => {
      const title = `${spans} spans, ${load} on ${loaded}: ${quantity}`;
      return { title, document, quantity, printed, units: 0.5 };
    });
}

/** A row is a stretch of one line; `at` counts tenths of the span that the unit load crosses. */
function readOrdinates({ spans, line = '', span, at, printed }: Row) {
  const lengths = list(spans).map(Number);
  const index = Number(span) - 1;
  const left = lengths.slice(0, index).reduce((total, length) => total + length, 0);
  return paired(list(at), list(printed)).map(([part, text]) => {
    const load: Load = { kind: 'point', at: left + Number(part) * lengths[index]!, p: 1 };
    const title = `spans ${spans}, ${line} for 1 at ${part} of span ${span}`;
    return { title, document: continuous(lengths, [load]), quantity: line, printed: text, units: 0.5 };
  });
}

/** A row is one quantity for the movement of each support in turn; a dash is a value that was not remembered. */
function readMovements({ spans, movement, quantity = '', printed }: Row) {
  const lengths = new Array<number>(Number(spans)).fill(1);
  return list(printed).flatMap((text, at) => {
    if (text === '-') return [];
    const moved: SupportDocument = { at, kind: 'roller', rise: Number(movement) };
    const title = `${spans} spans, support ${at + 1} moves ${movement}: ${quantity}`;
    return [{ title, document: continuous(lengths, [], [moved]), quantity, printed: text, units: 0.5 }];
  });
}

function single(left: Omit<SupportDocument, 'at'>, right: Omit<SupportDocument, 'at'>, loads: Load[] = []) {
  const supports = [
    { at: 0, ...left },
    { at: 1, ...right },
  ];
  return { length: 1, ei: 1, supports, loads, horizontal: 'ignore' } satisfies BeamDocument;
}

const UNIFORM: Load[] = [{ kind: 'line', from: 0, to: 1, w0: 1, w1: 1 }];
const FIXED = { kind: 'fixed' } as const;
const ROLLER = { kind: 'roller' } as const;
/** A fixity factor r is 1/(1 + 3EI/(kL)); 0.5 is a spring of 3EI/L. */
const HALF_FIXED = { kind: 'roller', kr: 3 } as const;
const MOVED: Readonly<Record<string, BeamDocument>> = {
  'built in both ends: left turns 1': single({ ...FIXED, rotation: 1 }, FIXED),
  'built in both ends: left rises 1': single({ ...FIXED, rise: 1 }, FIXED),
  'propped: built in end turns 1': single({ ...FIXED, rotation: 1 }, ROLLER),
  'propped: built in end rises 1': single({ ...FIXED, rise: 1 }, ROLLER),
  'prop on a spring of 3EI/L³: uniform': single(FIXED, { kind: 'free', kv: 3 }, UNIFORM),
  'prop on a spring of 24EI/L³: uniform': single(FIXED, { kind: 'free', kv: 24 }, UNIFORM),
  'fixity factors 0.5 and 0.5: uniform': single(HALF_FIXED, HALF_FIXED, UNIFORM),
  'fixity factors 1 and 0.5: uniform': single(FIXED, HALF_FIXED, UNIFORM),
  'ends turn in springs of 2EI/L: uniform': single({ ...ROLLER, kr: 2 }, { ...ROLLER, kr: 2 }, UNIFORM),
  'ends turn in springs of 8EI/L: uniform': single({ ...ROLLER, kr: 8 }, { ...ROLLER, kr: 8 }, UNIFORM),
};

function readMoved({ arrangement = '', quantity = '', printed = '' }: Row) {
  const document = MOVED[arrangement];
  if (!document) throw new Error(`no arrangement is called ${arrangement}`);
  return [{ title: `${arrangement}: ${quantity}`, document, quantity, printed, units: 0.5 }];
}

function paired(a: readonly string[], b: readonly string[]): [string, string][] {
  if (a.length !== b.length) throw new Error(`${a.length} places, but ${b.length} printed values`);
  return a.map((one, i) => [one, b[i]!]);
}
