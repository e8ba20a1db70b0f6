import { formatNumber, toUnit } from '@/engine/quantity';
import type { Finding, SectionDimensions, TabulatedName } from '@/engine/section';
import type { Values } from './reading';

const FIGURES = { significant: 4 };
const mm = (metres: number) => String(Number(toUnit(metres, 'mm').toPrecision(4)));

const inCm = (value: number, unit: string) =>
  `${formatNumber(toUnit(value, unit), FIGURES)} ${unit.replace('2', '²').replace('3', '³').replace('4', '⁴')}`;

/** Symbolic formula of a property by shape; the numbers of its letters follow it. */
const FORMULAS: Readonly<Record<string, { readonly [Name in TabulatedName]?: string }>> = {
  i: {
    area: '2·b·t_f + (h − 2·t_f)·t_w + (4 − π)·r²',
    iMajor: '[b·h³ − (b − t_w)·(h − 2·t_f)³]/12 + 4 fillets',
    iMinor: '2·t_f·b³/12 + (h − 2·t_f)·t_w³/12 + 4 fillets',
    wPlMajor: 'b·t_f·(h − t_f) + t_w·(h − 2·t_f)²/4 + 4 fillets',
    wPlMinor: 't_f·b²/2 + (h − 2·t_f)·t_w²/4 + 4 fillets',
    j: '2·b·t_f³/3 + (h − 2·t_f)·t_w³/3 + junctions',
  },
  channel: {
    area: '2·b·t_f + (h − 2·t_f)·t_w + (2 − π/2)·r²',
    iMajor: '[b·h³ − (b − t_w)·(h − 2·t_f)³]/12 + 2 fillets',
    iMinor: 'Σ(I + A·e²) of web, flanges and fillets',
    wPlMajor: 'b·t_f·(h − t_f) + t_w·(h − 2·t_f)²/4 + 2 fillets',
    wPlMinor: 'Σ A·|e| about the axis of equal areas',
    j: '2·b·t_f³/3 + (h − 2·t_f)·t_w³/3 + corners',
  },
  rhs: {
    area: 'b·h − (b − 2t)·(h − 2t) − corners',
    iMajor: '[b·h³ − (b − 2t)·(h − 2t)³]/12 − corners',
    iMinor: '[h·b³ − (h − 2t)·(b − 2t)³]/12 − corners',
    wPlMajor: 'b·h²/4 − (b − 2t)·(h − 2t)²/4 − corners',
    wPlMinor: 'h·b²/4 − (h − 2t)·(b − 2t)²/4 − corners',
    j: '4·A_m²·t/p + p·t³/3',
  },
  chs: {
    area: 'π·[d² − (d − 2t)²]/4',
    iMajor: 'π·[d⁴ − (d − 2t)⁴]/64',
    iMinor: 'π·[d⁴ − (d − 2t)⁴]/64',
    wPlMajor: '[d³ − (d − 2t)³]/6',
    wPlMinor: '[d³ − (d − 2t)³]/6',
    j: 'π·[d⁴ − (d − 2t)⁴]/32',
  },
  rectangle: {
    area: 'b·h',
    iMajor: 'b·h³/12',
    iMinor: 'h·b³/12',
    wPlMajor: 'b·h²/4',
    wPlMinor: 'h·b²/4',
    j: 'h·b³·[1/3 − 0.21·(b/h)·(1 − (b/h)⁴/12)]',
  },
  round: {
    area: 'π·d²/4',
    iMajor: 'π·d⁴/64',
    iMinor: 'π·d⁴/64',
    wPlMajor: 'd³/6',
    wPlMinor: 'd³/6',
    j: 'π·d⁴/32',
  },
};

/** Shapes whose formulas are those of another, tapered ones with the mean thickness of their flanges. */
const SAME_FORMULAS: Readonly<Record<string, string>> = {
  shs: 'rhs',
  tapered_i: 'i',
  tapered_channel: 'channel',
};

const SYMBOLS: Readonly<Record<string, string>> = { tw: 't_w', tf: 't_f', ro: 'r_o', ri: 'r_i' };

/** "h 178, b 90, t_w 5, t_f 7.6, r 8 mm". */
export const sizesInWords = (d: SectionDimensions): string =>
  `${Object.entries(d)
    .filter((entry): entry is [string, number] => typeof entry[1] === 'number')
    .map(([symbol, metres]) => `${SYMBOLS[symbol] ?? symbol} ${mm(metres)}`)
    .join(', ')} mm`;

/** The formula of a finding with the numbers it was worked out with. */
export function withNumbers(found: Finding, d: SectionDimensions, values: Values, density: number): string {
  const { area, iMajor, iMinor } = values;
  const both = (i: number | undefined) =>
    i === undefined || area === undefined ? '' : `, I ${inCm(i, 'cm4')}, A ${inCm(area, 'cm2')}`;
  switch (found.rule) {
    case 'mass':
      return `ρ·A with ρ ${formatNumber(density)} kg/m³${area === undefined ? '' : `, A ${inCm(area, 'cm2')}`}`;
    case 'gyration':
      return `√(I/A)${both(found.property === 'rMajor' ? iMajor : iMinor)}`;
    case 'elastic_modulus': {
      const i = found.property === 'wElMajor' ? iMajor : iMinor;
      return `I/c${i === undefined ? '' : ` with I ${inCm(i, 'cm4')}`}, ${sizesInWords(d)}`;
    }
    case 'warping':
      return `${found.formula} with ${sizesInWords(d)}`;
    default: {
      const shape = SAME_FORMULAS[d.shape] ?? d.shape;
      return `${FORMULAS[shape]?.[found.property] ?? found.formula} with ${sizesInWords(d)}`;
    }
  }
}
