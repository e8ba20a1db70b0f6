import { type DimensionName, unitFactor } from '@/engine/quantity';
import { cellText } from './cells';
import type { Axes, Confidence, Field, HeadingLanguage, MappedColumn, NumberField } from './contract';
import { REGIONAL, SYNONYMS } from './synonyms';

/** Quantity of each numeric field. */
export const FIELD_QUANTITY: Readonly<Record<NumberField, DimensionName>> = {
  h: 'length',
  b: 'length',
  tw: 'length',
  tf: 'length',
  r: 'length',
  t: 'length',
  dClear: 'length',
  mass: 'mass_per_length',
  area: 'area',
  iMajor: 'second_moment',
  iMinor: 'second_moment',
  wElMajor: 'section_modulus',
  wElMinor: 'section_modulus',
  wPlMajor: 'section_modulus',
  wPlMinor: 'section_modulus',
  rMajor: 'length',
  rMinor: 'length',
  j: 'second_moment',
  iw: 'warping',
};
export const isNumberField = (field: Field | null): field is NumberField =>
  field !== null && Object.hasOwn(FIELD_QUANTITY, field);

export const FIELD_WORDS: Readonly<Record<Field, string>> = {
  designation: 'the designation',
  shape: 'the shape',
  computed: 'the list of computed values',
  h: 'h, the depth',
  b: 'b, the width',
  tw: 't_w, the web',
  tf: 't_f, the flange',
  r: 'r, the root radius',
  t: 't, the wall',
  dClear: 'd, the clear depth of the web',
  mass: 'the mass',
  area: 'A, the area',
  iMajor: 'I major',
  iMinor: 'I minor',
  wElMajor: 'W_el major',
  wElMinor: 'W_el minor',
  wPlMajor: 'W_pl major',
  wPlMinor: 'W_pl minor',
  rMajor: 'i major',
  rMinor: 'i minor',
  j: 'I_t',
  iw: 'I_w',
};

type Heading = { name: string; unit: string | null; factor: number };

const QUANTITIES = [...new Set(Object.values(FIELD_QUANTITY))];
const known = new Map<string, boolean>();
export function isUnit(text: string): boolean {
  const before = known.get(text);
  if (before !== undefined) return before;
  const is = text !== '' && text.length < 20 && QUANTITIES.some((quantity) => unitFactor(text, quantity).ok);
  if (known.size < 1000) known.set(text, is);
  return is;
}

const withPowers = (text: string) =>
  cellText(text)
    .replaceAll(/[⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+/g, (run) => `^${run.normalize('NFKC').replace('\u2212', '-')}`)
    .normalize('NFKC');

/** "10^3 cm^6" into unit and multiplier. */
export function readUnitText(text: string): { unit: string | null; factor: number } {
  const unit = withPowers(text).replaceAll(/^[([]|[)\]]$/g, '');
  const power = /[x×*]?\s*10\^(-?\d+)\s*[x×*·]?/.exec(unit);
  return {
    unit:
      unit
        .replace(power?.[0] ?? '', '')
        .replaceAll('^', '')
        .trim() || null,
    factor: 10 ** Number(power?.[1] ?? 0),
  };
}

/** "I_w (10³ cm⁶)" into name, unit and multiplier. A unit also stands after a blank or a low line: "A cm2", "A_cm2". */
function readHeading(heading: string): Heading {
  const text = withPowers(heading);
  const bracketed = /^(.*?)\s*[([]\s*([^)\]]*)[)\]]\s*$/.exec(text);
  if (bracketed) return { name: bracketed[1] ?? '', ...readUnitText(bracketed[2] ?? '') };
  const trailing = /^(.*\S)(?:\s+|_(?=(?:mm|cm|m|in|ft)\d?$))(\S+)$/.exec(text);
  const [, name = text, unit = ''] = trailing ?? [];
  return trailing && isUnit(unit) ? { name, ...readUnitText(unit) } : { name: text, unit: null, factor: 1 };
}

const plainName = (name: string) =>
  name
    .normalize('NFD')
    .toLowerCase()
    .replaceAll('ß', 'ss')
    .replaceAll(/[^a-z0-9]/g, '');

type Synonym = { field: Field; language: HeadingLanguage | null };
const BY_NAME: ReadonlyMap<string, Synonym> = new Map(
  (Object.keys(SYNONYMS) as Field[]).flatMap((field) =>
    Object.entries(SYNONYMS[field]).flatMap(([language, words]) =>
      words.map((word): [string, Synonym] => [
        word,
        { field, language: language === 'symbol' ? null : (language as HeadingLanguage) },
      ]),
    ),
  ),
);

const AXES = Object.keys(REGIONAL) as Axes[];

/** Field by each convention. Old British tables part D from d, T from t, and H is their warping constant. */
function byConvention(name: string, plain: string, isLength: boolean) {
  const british: Field | null =
    name === 't' ? 'tw' : name === 'T' ? 'tf' : name === 'D' ? 'h' : name === 'H' ? 'iw' : null;
  const settled = (axes: Axes): Field | null => {
    if (axes === 'british' && british) return british;
    const field = Object.hasOwn(REGIONAL[axes], plain) ? (REGIONAL[axes][plain] ?? null) : null;
    if (!isLength || !plain.startsWith('i')) return field;
    return field === 'iMajor' ? 'rMajor' : field === 'iMinor' ? 'rMinor' : null;
  };
  const each = { en: settled('en'), us: settled('us'), british: settled('british') };
  return AXES.some((axes) => each[axes] !== null) ? each : null;
}

export type ReadHeading = Pick<MappedColumn, 'field' | 'unit' | 'factor' | 'byAxes'> & {
  name: string;
  confidence: Confidence;
  reason: string;
  language: HeadingLanguage | null;
};

/** What one heading means by itself; `d` and `t` are settled by the columns beside them. */
export function meaningOf(heading: string): ReadHeading {
  const written = readHeading(heading);
  const isMass = written.unit === null && unitFactor(written.name, 'mass_per_length').ok; // headed "kg/m"
  const { name, unit, factor } = isMass ? { ...written, unit: written.name } : written;
  const plain = plainName(name);
  const isA = (quantity: DimensionName) => unit !== null && unitFactor(unit, quantity).ok;
  const named: Synonym | undefined =
    isMass || (plain === 'w' && isA('mass_per_length'))
      ? { field: 'mass', language: null }
      : plain === 'd'
        ? { field: 'h', language: null }
        : BY_NAME.get(plain);
  const byAxes = byConvention(name, plain, isA('length'));
  const isOther =
    unit !== null && isNumberField(named?.field ?? null) && !isA(FIELD_QUANTITY[named?.field as NumberField]);
  const found = isOther && byAxes ? undefined : named; // H in dm⁶ is no depth
  const base = { name, unit, factor, language: found?.language ?? null };
  if (byAxes) {
    const neutral = found?.field ?? null;
    const each = {
      en: byAxes.en ?? neutral,
      us: byAxes.us ?? neutral,
      british: byAxes.british ?? neutral,
    };
    const reason = neutral
      ? `"${name}" is ${FIELD_WORDS[neutral]}, in old British tables something else.`
      : `"${name}" means opposite axes by region.`;
    return { ...base, field: neutral, byAxes: each, confidence: neutral ? 'likely' : 'unsure', reason };
  }
  if (!found)
    return { ...base, field: null, confidence: 'unsure', reason: `"${name}" is no heading known here.` };
  const isSure = found.language !== null || plain.length > 1;
  const reason = `"${name}" is ${FIELD_WORDS[found.field]}.`;
  return { ...base, field: found.field, confidence: isSure ? 'certain' : 'likely', reason };
}

/** How many headings of a line are known: the line of headings is the one with the most. */
export const knownHeadings = (cells: readonly string[]): number =>
  cells.filter((cell) => {
    const text = cellText(cell);
    if (text === '' || /^\d/.test(text)) return false;
    const { field, byAxes } = meaningOf(text);
    return field !== null || byAxes !== undefined;
  }).length;

/**
 * `d` is the clear depth where another column is the depth; `t` is the flange where there is a web and no flange, as
 * German tables head web and flange with s and t. A field that two columns claim goes to the first.
 */
export function settle<C extends Pick<MappedColumn, 'heading' | 'field'>>(columns: readonly C[]): C[] {
  const has = (field: Field) => columns.some((column) => column.field === field);
  const isD = (heading: string) => plainName(readHeading(heading).name) === 'd';
  const hasOtherDepth = columns.some(({ field, heading }) => field === 'h' && !isD(heading));
  const hasTwo = columns.filter(({ field, heading }) => field === 'h' && isD(heading)).length > 1;
  const isFlange = has('tw') && !has('tf');
  const taken = new Set<Field>();
  return columns.map((column) => {
    const { heading } = column;
    let { field } = column;
    if (field === 'h' && isD(heading)) {
      const isSmall = readHeading(heading).name === 'd';
      if (hasOtherDepth || (hasTwo && isSmall)) field = 'dClear';
    }
    if (field === 't' && isFlange) field = 'tf';
    if (field !== null && taken.has(field)) field = null;
    if (field !== null) taken.add(field);
    return { ...column, field };
  });
}
