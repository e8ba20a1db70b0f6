import type { SectionShape } from '@/engine/section';
import type { Cause, Mapping } from '@/features/section/import/contract';
import { type Dice, dice } from './random';
import {
  cellAt,
  columnAt,
  csvOf,
  type Format,
  lineOf,
  metres,
  plainly,
  plausibleTable,
  scaleCell,
  setCell,
  setSection,
  shippedTable,
  type Table,
} from './section-table';

/** One fault in a file that is else clean, and how it must be named. `line` null: of a column or the file. */
export type Seeded = {
  rule: number;
  words: string;
  csv: string;
  change: Partial<Mapping>;
  causes: readonly Cause[];
  line: number | null;
  /** Where the fault is found before a row is read: a question, or a refusal. */
  before: string | null;
};

type Found = { causes: readonly Cause[]; line?: number | null; before?: string };
type Maker = { rule: number; words: string; make: (file: File) => Found };

/** A clean table of one kind, with the row that will be spoilt. */
type File = { table: Table; row: number; dice: Dice; shape: SectionShape; format: Format };

const ALL: readonly SectionShape[] = ['i', 'channel', 'rhs', 'shs', 'chs', 'rectangle', 'round'];
const ROLLED: readonly SectionShape[] = ['i', 'channel'];
const TUBES: readonly SectionShape[] = ['rhs', 'shs', 'chs'];

const at = (file: File, causes: readonly Cause[], line = lineOf(file.row)): Found => ({ causes, line });
const column = (causes: readonly Cause[]): Found => ({ causes, line: null });

const PROPERTIES = ['A', 'I_major', 'I_minor', 'W_el_major', 'W_pl_major'] as const;
const POWERS: Readonly<Record<string, number>> = {
  A: 2,
  I_major: 4,
  I_minor: 4,
  W_el_major: 3,
  W_pl_major: 3,
};

function scaled(name: string, factors: readonly number[], ...causes: Cause[]): Maker['make'] {
  return (file) => {
    scaleCell(file.table, file.row, name, file.dice.pick(factors));
    return at(file, causes);
  };
}

function swapped(one: string, other: string, ...causes: Cause[]): Maker['make'] {
  return (file) => {
    const [first, second] = [cellAt(file.table, file.row, one), cellAt(file.table, file.row, other)];
    setCell(file.table, file.row, one, second);
    setCell(file.table, file.row, other, first);
    return at(file, causes);
  };
}

function typed(names: readonly string[], values: readonly string[], ...causes: Cause[]): Maker['make'] {
  return (file) => {
    setCell(file.table, file.row, file.dice.pick(names), file.dice.pick(values));
    return at(file, causes);
  };
}

function renamed(change: (name: string) => string, ...causes: Cause[]): Maker['make'] {
  return (file) => {
    setCell(file.table, file.row, 'designation', change(cellAt(file.table, file.row, 'designation')));
    return at(file, causes);
  };
}

function wholeColumn(name: string, by: number, ...causes: Cause[]): Maker['make'] {
  return ({ table }) => {
    for (let row = 0; row < table.rows.length; row++) scaleCell(table, row, name, by);
    return column(causes);
  };
}

const headed = (name: string, heading: string, found: Found): Maker['make'] => {
  return ({ table }) => {
    table.headings[columnAt(table, name)] = heading;
    return found;
  };
};

function added(cells: (file: File) => string[], ...causes: Cause[]): Maker['make'] {
  return (file) => {
    const row = cells(file);
    file.table.rows.splice(
      file.row + 1,
      0,
      [...row, ...Array(file.table.headings.length).fill('')].slice(0, file.table.headings.length),
    );
    return at(file, causes, lineOf(file.row + 1));
  };
}

const copied = (file: File): string[] => [...(file.table.rows[file.row] ?? [])];

type Kind = { shapes: readonly SectionShape[]; faults: readonly Maker[] };

const rule = (number: number, words: string, make: Maker['make']): Maker => ({ rule: number, words, make });

/** Faults by the kinds of section that can have them. */
const KINDS: readonly Kind[] = [
  {
    shapes: ALL,
    faults: [
      rule(1, 'mass some percent off', scaled('mass', [1.03, 0.97, 1.08, 0.9], 'mass')),
      rule(3, 'area some percent off', scaled('A', [1.03, 0.97, 1.12], 'area')),
      rule(4, 'major second moment off', scaled('I_major', [1.03, 0.96, 1.08], 'second_moment')),
      rule(5, 'minor second moment off', scaled('I_minor', [1.04, 0.95, 1.12], 'second_moment')),
      rule(7, 'radius of gyration off', scaled('r_major', [1.03, 0.95], 'gyration')),
      rule(8, 'elastic modulus off', scaled('W_el_major', [1.02, 0.98, 1.05], 'elastic_modulus')),
      rule(9, 'elastic and plastic modulus exchanged', swapped('W_el_major', 'W_pl_major', 'moduli_swapped')),
      rule(
        12,
        'plastic modulus off',
        scaled('W_pl_major', [1.025, 0.975], 'plastic_modulus', 'shape_factor'),
      ),
      rule(18, 'cell in another power of ten', (file) => {
        const name = file.dice.pick(PROPERTIES);
        scaleCell(file.table, file.row, name, 10 ** ((POWERS[name] ?? 1) * file.dice.sign()));
        return at(file, ['power_of_ten']);
      }),
      rule(18, 'decimal mark moved', scaled('I_major', [10, 0.1], 'power_of_ten')),
      rule(19, 'cell in inches', (file) => {
        const name = file.dice.pick(PROPERTIES);
        scaleCell(file.table, file.row, name, 2.54 ** -(POWERS[name] ?? 1));
        return at(file, ['inches']);
      }),
      rule(19, 'mass in lb/ft', scaled('mass', [1 / 1.488164], 'mass_units')),
      rule(20, 'column in mm⁴', wholeColumn('I_major', 1e4, 'column_slip')),
      rule(20, 'column in cubic inches', wholeColumn('W_el_major', 2.54 ** -3, 'column_slip')),
      rule(20, 'masses in lb/ft', wholeColumn('mass', 1 / 1.488164, 'column_slip')),
      rule(20, 'sizes in cm', wholeColumn('h', 0.1, 'size_column_slip')),
      rule(21, 'cells moved to the right', (file) => {
        const cells = file.table.rows[file.row] ?? [];
        const from = columnAt(file.table, file.dice.pick(['h', 'mass']));
        file.table.rows[file.row] = [...cells.slice(0, from), '', ...cells.slice(from)].slice(
          0,
          cells.length,
        );
        return at(file, ['row_shift']);
      }),
      rule(
        23,
        'section twice with other values',
        added((file) => {
          const cells = copied(file);
          cells[columnAt(file.table, 'A')] = plainly(Number(cellAt(file.table, file.row, 'A')) * 1.005);
          return cells;
        }, 'duplicate_differs'),
      ),
      rule(23, 'section twice', added(copied, 'duplicate')),
      rule(
        24,
        'section under another name',
        added((file) => {
          const cells = copied(file);
          cells[0] = (cells[0] ?? '').replace(/^OV[A-Z]? /, 'OVZ ');
          return cells;
        }, 'near_duplicate'),
      ),
      rule(25, 'axis letters', headed('I_major', 'Iy (cm4)', { causes: [], before: 'axes' })),
      rule(25, 'heading that means nothing', headed('I_t', 'Lagerplatz', column(['column_unknown']))),
      rule(25, 'heading twice', headed('I_t', 'A (cm2)', column(['column_repeated']))),
      rule(26, 'heading without a unit', headed('A', 'A', { causes: [], before: 'unit' })),
      rule(26, 'cell with an unknown unit', typed(['A', 'I_major'], ['12 furlong', '7 kN'], 'unit_unknown')),
      rule(27, 'two units in one column', ({ table, dice: { pick } }) => {
        const name = pick(['I_major', 'A']);
        for (let row = 0; row < table.rows.length; row += 3)
          scaleCell(table, row, name, 10 ** (POWERS[name] ?? 1));
        return column(['mixed_units']);
      }),
      rule(27, 'units in some cells', ({ table, format }) => {
        for (let row = 1; row < 4; row++) {
          setCell(
            table,
            row,
            'h',
            `${plainly(Number(cellAt(table, row, 'h')) / 10).replace('.', format.mark)} cm`,
          );
        }
        return column(['cell_unit']);
      }),
      rule(28, 'other decimal mark', (file) => {
        const value = Number(cellAt(file.table, file.row, 'mass')).toFixed(2);
        setCell(
          file.table,
          file.row,
          'mass',
          file.format.mark === ',' ? `${value} ` : value.replace('.', ','),
        );
        return at(file, ['decimal_mark']);
      }),
      rule(29, 'thousands not in threes', (file) => {
        const digits = String(
          Math.round(Number(cellAt(file.table, file.row, 'I_major')) * 1000) / 1000,
        ).split('.');
        const whole = (digits[0] ?? '').padStart(2, '0');
        const spaced = `${whole.slice(0, 1)} ${whole.slice(1)}`;
        const text = digits[1] ? `${spaced}${file.format.mark}${digits[1]}` : spaced;
        setCell(file.table, file.row, 'I_major', text.length > 1 && whole.length !== 4 ? text : `${text} 0`);
        return at(file, ['thousands']);
      }),
      rule(
        30,
        'replacement character',
        renamed((name) => `${name}\ufffd`, 'replacement_character'),
      ),
      rule(30, 'byte order mark in a heading', headed('A', '\ufeffA (cm2)', column(['byte_order_mark']))),
      rule(31, 'row cut off', (file) => {
        file.table.rows[file.row] = copied(file).slice(0, -5);
        return at(file, ['ragged_row']);
      }),
      rule(
        32,
        'line of averages',
        added(({ table }) => ['Average', '', ...(table.rows[0] ?? []).slice(2)], 'summary_row'),
      ),
      rule(
        32,
        'headings once more',
        added(({ table }) => [...table.headings], 'repeated_header'),
      ),
      rule(
        32,
        'remark',
        added(() => ['Tolerances to the maker’s own standard'], 'remark'),
      ),
      rule(
        33,
        'value missing',
        typed(['mass', 'A', 'I_major', 'W_el_major', 'h'], ['-', '–', 'n/a', '#N/A'], 'missing'),
      ),
      rule(33, 'zero for a missing value', typed(['mass', 'A', 'I_major', 'h'], ['0', '0.0'], 'zero')),
      rule(34, 'date', typed(['mass', 'h'], ['3-Apr', '2026-04-03', 'Mar-07'], 'date')),
      rule(34, 'spreadsheet error', typed(['mass', 'A'], ['#DIV/0!', '#REF!'], 'not_a_number')),
      rule(34, 'hidden apostrophe', (file) => {
        const value = cellAt(file.table, file.row, 'h').replace('.', file.format.mark);
        setCell(file.table, file.row, 'h', `'${value}`);
        return at(file, ['hidden_apostrophe']);
      }),
      rule(34, 'power of ten of a spreadsheet', typed(['I_major'], ['12E+03', '4E+05'], 'scientific')),
      rule(35, 'fraction among millimetres', (file) => {
        const tenths = Math.round(Number(cellAt(file.table, file.row, 'h')) * 10);
        setCell(file.table, file.row, 'h', `${Math.floor(tenths / 10)} ${tenths % 10}/10`);
        return at(file, ['fraction']);
      }),
      rule(36, 'two sections whose names read the same', (file) => {
        const name = cellAt(file.table, file.row, 'designation');
        setCell(file.table, file.row + 3, 'designation', name.replace('OV', 'ov '));
        return at(file, ['key_clash'], lineOf(file.row + 3));
      }),
      rule(
        37,
        'Cyrillic letter in a name',
        renamed(
          (name) => (name.includes('x') ? name.replace('x', 'х') : name.replace('O', 'Ο')),
          'look_alike',
        ),
      ),
      rule(37, 'letter for a digit', (file) => {
        const text = `${Number(cellAt(file.table, file.row, 'mass'))
          .toFixed(1)
          .replace('.', file.format.mark)}`;
        setCell(file.table, file.row, 'mass', `${text}O`);
        return at(file, ['letter_for_digit']);
      }),
      rule(
        38,
        'formula',
        typed(['mass', 'A'], ['=1+1', '@SUM(A1)', '=HYPERLINK("http://x.example")'], 'formula'),
      ),
      rule(
        38,
        'formula for a name',
        renamed((name) => `=${name}`, 'formula'),
      ),
      rule(
        38,
        'control character',
        renamed((name) => `${name}\u0007`, 'control_character'),
      ),
    ],
  },
  {
    shapes: ['i', 'channel', 'rhs', 'rectangle'],
    faults: [rule(6, 'axes exchanged', swapped('I_major', 'I_minor', 'axes_swapped'))],
  },
  {
    shapes: ALL,
    faults: [rule(10, 'shape factor', scaled('W_pl_major', [1.4], 'shape_factor'))],
  },
  {
    shapes: ['i'],
    faults: [
      rule(
        11,
        'minor shape factor',
        scaled('W_pl_minor', [1.15, 0.9], 'shape_factor_minor', 'moduli_swapped'),
      ),
      rule(14, 'warping constant off', scaled('I_w', [1.1, 0.9], 'warping')),
      rule(18, 'warping constant in dm⁶', scaled('I_w', [1e-6], 'power_of_ten')),
      rule(15, 'depth and width exchanged', swapped('h', 'b', 'columns_swapped', 'geometry')),
    ],
  },
  {
    shapes: ROLLED,
    faults: [
      rule(13, 'torsion constant off', scaled('I_t', [2.2, 0.45], 'torsion')),
      rule(15, 'web and flange exchanged', swapped('t_w', 't_f', 'columns_swapped')),
      rule(15, 'flanges that fill the depth', scaled('t_f', [13, 17], 'geometry')),
      rule(15, 'negative size', typed(['t_w', 'b'], ['-7'], 'negative')),
      rule(16, 'clear depth off', scaled('d_clear', [0.9, 1.1], 'clear_depth')),
      rule(
        17,
        'mass of another section in the name',
        renamed((name) => name.replace(/[\d.]+$/, (mass) => plainly(Number(mass) * 1.3 + 2)), 'name_mass'),
      ),
      rule(
        17,
        'depth of another section in the name',
        renamed(
          (name) => name.replace(/(\d+)x/, (_, depth) => `${Math.round(Number(depth) * 1.4)}x`),
          'name_depth',
        ),
      ),
      rule(22, 'section of another series', (file) => {
        const { table, row } = file;
        const [h, b] = [metres(table, row, 'h'), metres(table, row, 'b')];
        const [tw, tf, r] = ['t_w', 't_f', 'r'].map((name) => metres(table, row, name)) as [
          number,
          number,
          number,
        ];
        const shape = file.shape === 'i' ? 'i' : 'channel';
        setSection(table, row, { shape, h: h * 1.25, b, tw: tw * 0.95, tf, r });
        return at(file, ['series', 'not_rising']);
      }),
    ],
  },
  {
    shapes: TUBES,
    faults: [
      rule(13, 'torsion constant of a tube off', scaled('I_t', [1.2, 0.85], 'torsion')),
      rule(14, 'warping constant of a tube', typed(['I_w'], ['12.5'], 'warping')),
      rule(15, 'walls that fill the tube', typed(['t'], ['900'], 'geometry')),
      rule(
        17,
        'sizes of another tube in the name',
        renamed((name) => name.replace(/(\d+)x/, (_, size) => `${Number(size) + 25}x`), 'name_size'),
      ),
    ],
  },
];

const special: readonly {
  rule: number;
  words: string;
  make: (dice: Dice) => Omit<Seeded, 'rule' | 'words' | 'before'>;
}[] = [
  {
    rule: 2,
    words: 'US tube with the mass of its design wall',
    make: (random) => {
      const table = plausibleTable(24, 5, ['shs']);
      for (let row = 0; row < table.rows.length; row++) {
        const nominal = metres(table, row, 't');
        setUsTube(table, row, nominal);
      }
      const row = random.whole(2, table.rows.length - 3);
      setCell(table, row, 'mass', plainly(0.785 * Number(cellAt(table, row, 'A'))));
      const change = { tubeStandard: 'ASTM A500' } as const;
      return { csv: csvOf(table), change, causes: ['nominal_wall'], line: lineOf(row) };
    },
  },
  {
    rule: 39,
    words: 'lumber of nominal sizes',
    make: (random) => {
      const table = shippedTable('dimension-lumber');
      const row = random.whole(8, 13);
      const [b = 0, h = 0] = cellAt(table, row, 'designation').split('x').map(Number);
      setRectangle(table, row, h, b);
      return { csv: csvOf(table), change: {}, causes: ['nominal_size'], line: lineOf(row) };
    },
  },
  {
    rule: 39,
    words: 'sawn for regularised timber',
    make: (random) => {
      const table = shippedTable('regularised-timber');
      const row = random.whole(3, table.rows.length - 3);
      const [h, b] = [Number(cellAt(table, row, 'h')), Number(cellAt(table, row, 'b'))];
      setRectangle(table, row, h + 5, b + 3, 0.01);
      return { csv: csvOf(table), change: {}, causes: ['name_size'], line: lineOf(row) };
    },
  },
  {
    rule: 22,
    words: 'a section heavier than its neighbours in a family',
    make: (random) => {
      const table = shippedTable('european-i');
      const name = random.pick(['IPE 180', 'IPE 200', 'IPE 220', 'IPE 240']);
      const row = table.rows.findIndex(([first]) => first === name);
      const [h, b, tw, tf, r] = ['h', 'b', 't_w', 't_f', 'r'].map((name) => metres(table, row, name)) as [
        number,
        number,
        number,
        number,
        number,
      ];
      setSection(table, row, { shape: 'i', h, b, tw: tw * 1.9, tf, r });
      return { csv: csvOf(table), change: {}, causes: ['series', 'not_rising'], line: lineOf(row) };
    },
  },
];

/** Mass of the nominal wall, properties of 0.93 of it: how US tables print tubes to ASTM A500. */
function setUsTube(table: Table, row: number, nominal: number): void {
  const h = metres(table, row, 'h');
  const outline = (t: number) => ({ shape: 'shs', h, b: h, t, ro: 2 * t, ri: t }) as const;
  setSection(table, row, outline(nominal));
  const mass = cellAt(table, row, 'mass');
  setSection(table, row, outline(0.93 * nominal));
  setCell(table, row, 'mass', mass);
  setCell(table, row, 't', plainly(nominal * 1000));
  for (const name of ['r_major', 'r_minor', 'd_clear']) setCell(table, row, name, '');
  setCell(table, row, 'r', '');
}

/** Sizes and all that follows from them, in the units of the table. */
function setRectangle(table: Table, row: number, h: number, b: number, cm = 1): void {
  const unit = cm === 1 ? 1 : 0.1;
  const [H, B] = [h * unit, b * unit];
  const density = Number(cellAt(table, row, 'mass')) / Number(cellAt(table, row, 'A'));
  setCell(table, row, 'h', plainly(h));
  setCell(table, row, 'b', plainly(b));
  const values = {
    A: H * B,
    I_major: (B * H ** 3) / 12,
    I_minor: (H * B ** 3) / 12,
    W_el_major: (B * H ** 2) / 6,
    W_el_minor: (H * B ** 2) / 6,
    W_pl_major: (B * H ** 2) / 4,
    W_pl_minor: (H * B ** 2) / 4,
  };
  for (const [name, value] of Object.entries(values)) setCell(table, row, name, plainly(value, 5));
  setCell(table, row, 'mass', plainly(density * H * B, 5));
  setCell(table, row, 'I_t', '');
}

const makers = KINDS.flatMap(({ shapes, faults }) => faults.map((fault) => ({ ...fault, shapes })));
export const FAULT_RULES: readonly number[] = [
  ...new Set([...makers, ...special].map(({ rule: number }) => number)),
].sort((a, b) => a - b);

const ROWS = 40;
const FORMATS: readonly Format[] = [
  { delimiter: ',', mark: '.' },
  { delimiter: ';', mark: ',' },
  { delimiter: '\t', mark: ',' },
  { delimiter: '|', mark: '.' },
];

/** Typed with a point: turned into the mark of the file by csvOf, but for this fault. */
const KEEPS_POINT = 'other decimal mark';

function spoil(maker: (typeof makers)[number], random: Dice, seed: number): Seeded {
  const shape = random.pick(maker.shapes);
  const table = plausibleTable(ROWS, seed, [shape]);
  const format = random.pick(FORMATS);
  const file = { table, row: random.whole(4, ROWS - 6), dice: random, shape, format };
  const { causes, line = null, before = null } = maker.make(file);
  const csv = csvOf(table, format);
  const words = `${maker.words} (${shape}, ${JSON.stringify(format.delimiter)}, ${format.mark})`;
  return {
    rule: maker.rule,
    words,
    csv: maker.words === KEEPS_POINT ? csv : csv,
    change: {},
    causes,
    line,
    before: before ?? null,
  };
}

/** Faults at random, every rule that a file alone can break at least twice. */
export function seededFaults(count: number, seed: number): Seeded[] {
  const random = dice(seed);
  const byRule = FAULT_RULES.flatMap((number) => [number, number]);
  const rules = Array.from({ length: count }, (_, k) => byRule[k] ?? random.pick(FAULT_RULES));
  return rules.map((number, k) => {
    const plain = makers.filter((maker) => maker.rule === number);
    const odd = special.filter((maker) => maker.rule === number);
    const which = random.whole(0, plain.length + odd.length - 1);
    const maker = plain[which];
    if (maker) return spoil(maker, random, seed + k);
    const one = odd[which - plain.length];
    if (!one) throw new Error(`no fault of rule ${number}`);
    return { rule: number, words: one.words, before: null, ...one.make(random) };
  });
}
