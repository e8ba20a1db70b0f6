import { toUnit } from '@/engine/quantity';
import {
  depthOf,
  dimensionFaults,
  type SectionDimensions,
  type SectionShape,
  sectionProperties,
  tube,
} from '@/engine/section';
import { mulberry32 } from './random';

/** A row as a supplier would print it; the keys are the headings. */
export type PrintedRow = Record<(typeof PRINTED_HEADINGS)[number], string>;

export const PRINTED_HEADINGS = [
  'designation',
  'shape',
  'h (mm)',
  'b (mm)',
  't_w (mm)',
  't_f (mm)',
  'r (mm)',
  't (mm)',
  'mass (kg/m)',
  'A (cm2)',
  'I_major (cm4)',
  'I_minor (cm4)',
  'W_el_major (cm3)',
  'W_el_minor (cm3)',
  'W_pl_major (cm3)',
  'W_pl_minor (cm3)',
  'I_t (cm4)',
  'I_w (cm6)',
] as const;

type Made = { designation: (massKgM: string) => string; dimensions: SectionDimensions };
type Random = () => number;

const STEEL = 7850; // kg/m³
const FIGURES = 4; // what suppliers print
const mm = (value: number) => Math.round(value * 10) / 10;
const m = (value: number) => mm(value) / 1000;

function* upTo(from: number, to: number, step: number) {
  for (let value = from; value <= to; value += step) yield value;
}

const WEIGHTS = 20; // of one serial size, each some 7 % thicker than the one before
const FLANGE_RATIOS = [0.36, 0.42, 0.48, 0.55, 0.64, 0.74, 0.86, 1];

/** Serial sizes, each rolled in many weights: the flanges part as they grow thicker, as between real rolls. */
function* flanged(random: Random): Generator<Made> {
  for (const depth of upTo(100, 1104, 4)) {
    for (const ratio of FLANGE_RATIOS) {
      const width = Math.round((ratio * depth) / 2) * 2;
      const web = (3 + 0.012 * depth) * (0.95 + 0.1 * random());
      const radius = Math.round(4 + 0.02 * depth);
      const family = ratio > 0.8 ? 'OVC' : 'OV';
      for (let weight = 0; weight < WEIGHTS; weight++) {
        const tw = web * (1 + 0.06 * weight);
        const tf = 1.55 * web * (1 + 0.075 * weight);
        const h = depth + 3.1 * web * 0.075 * weight;
        const b = width + tw - web;
        yield {
          designation: (mass) => `${family} ${depth}x${width}x${mass}`,
          dimensions: { shape: 'i', h: m(h), b: m(b), tw: m(tw), tf: m(tf), r: m(radius) },
        };
      }
    }
  }
}

function* channels(random: Random): Generator<Made> {
  for (const depth of upTo(80, 480, 4)) {
    for (const ratio of [0.25, 0.3, 0.35, 0.4]) {
      const width = Math.round(24 + ratio * depth);
      const web = (3.5 + 0.014 * depth) * (0.95 + 0.1 * random());
      for (let weight = 0; weight < 10; weight++) {
        const tw = web * (1 + 0.08 * weight);
        const tf = 1.5 * web * (1 + 0.04 * weight);
        const b = width + tw - web;
        const r = Math.round(8 + 0.015 * depth);
        yield {
          designation: (mass) => `OVU ${depth}x${width}x${mass}`,
          dimensions: { shape: 'channel', h: m(depth), b: m(b), tw: m(tw), tf: m(tf), r: m(r) },
        };
      }
    }
  }
}

const WALLS = [2, 2.5, 3, 3.2, 4, 5, 6, 6.3, 7.1, 8, 10, 12, 12.5, 14.2, 16, 20];
const THINNEST = 5; // walls across the smaller side, below which nobody rolls a tube

function* rectangularTubes(): Generator<Made> {
  for (const h of upTo(40, 600, 10)) {
    for (const b of upTo(20, h - 10, 10)) {
      for (const t of WALLS.filter((wall) => wall * THINNEST < b && wall * 100 > h)) {
        yield {
          designation: () => `OVR ${h}x${b}x${t}`,
          dimensions: tube(h / 1000, b / 1000, t / 1000, 'EN 10210'),
        };
      }
    }
  }
}

function* squareTubes(): Generator<Made> {
  for (const h of upTo(20, 800, 1)) {
    for (const t of WALLS.filter((wall) => wall * THINNEST < h && wall * 100 > h)) {
      yield {
        designation: () => `OVS ${h}x${h}x${t}`,
        dimensions: tube(h / 1000, h / 1000, t / 1000, 'EN 10210'),
      };
    }
  }
}

function* roundTubes(): Generator<Made> {
  for (const d of upTo(20, 1200, 1)) {
    for (const t of WALLS.filter((wall) => wall * THINNEST < d && wall * 100 > d)) {
      yield {
        designation: () => `OVT ${d}x${t}`,
        dimensions: { shape: 'chs', d: d / 1000, t: t / 1000 },
      };
    }
  }
}

function* flats(): Generator<Made> {
  for (const h of upTo(20, 1000, 2)) {
    for (const b of upTo(5, Math.min(h, 160) - 1, 3)) {
      yield {
        designation: () => `OVF ${h}x${b}`,
        dimensions: { shape: 'rectangle', h: h / 1000, b: b / 1000 },
      };
    }
  }
}

function* rounds(): Generator<Made> {
  for (const d of upTo(6, 1100, 0.5)) {
    yield { designation: () => `OVB ${d}`, dimensions: { shape: 'round', d: d / 1000 } };
  }
}

/** What part of a file each kind is. */
const KINDS: readonly { shape: SectionShape; share: number; made: (random: Random) => Generator<Made> }[] = [
  { shape: 'i', share: 0.38, made: flanged },
  { shape: 'channel', share: 0.03, made: channels },
  { shape: 'rhs', share: 0.17, made: rectangularTubes },
  { shape: 'shs', share: 0.08, made: squareTubes },
  { shape: 'chs', share: 0.1, made: roundTubes },
  { shape: 'rectangle', share: 0.22, made: flats },
  { shape: 'round', share: 0.02, made: rounds },
];

const printed = (value: number, unit: string) => {
  const number = Number(toUnit(value, unit).toPrecision(FIGURES));
  return Math.abs(number) < 1e-6 && number !== 0 ? number.toFixed(12) : String(number);
};

/** The row of a section, its properties to four figures. */
function printedRow({ designation, dimensions: d }: Made): PrintedRow {
  const properties = sectionProperties(d);
  const size = (value: number | undefined) => (value === undefined ? '' : String(mm(value * 1000)));
  const mass = String(Number((STEEL * properties.area).toPrecision(FIGURES)));
  return {
    designation: designation(mass),
    shape: d.shape,
    'h (mm)': size(depthOf(d)),
    'b (mm)': size('b' in d ? d.b : undefined),
    't_w (mm)': size('tw' in d ? d.tw : undefined),
    't_f (mm)': size('tf' in d ? d.tf : undefined),
    'r (mm)': size('r' in d ? d.r : undefined),
    't (mm)': size('t' in d ? d.t : undefined),
    'mass (kg/m)': mass,
    'A (cm2)': printed(properties.area, 'cm2'),
    'I_major (cm4)': printed(properties.iMajor, 'cm4'),
    'I_minor (cm4)': printed(properties.iMinor, 'cm4'),
    'W_el_major (cm3)': printed(properties.wElMajor, 'cm3'),
    'W_el_minor (cm3)': printed(properties.wElMinor, 'cm3'),
    'W_pl_major (cm3)': printed(properties.wPlMajor, 'cm3'),
    'W_pl_minor (cm3)': printed(properties.wPlMinor, 'cm3'),
    'I_t (cm4)': printed(properties.j, 'cm4'),
    'I_w (cm6)': printed(properties.iw, 'cm6'),
  };
}

/**
 * Rows of all kinds, or of the shapes given, that are physically consistent: the properties follow from the dimensions.
 * Every designation occurs once. The same seed gives the same rows. Up to a hundred thousand of all kinds.
 */
export function* plausibleSections(
  count: number,
  seed: number,
  shapes: readonly SectionShape[] = KINDS.map(({ shape }) => shape),
): Generator<PrintedRow> {
  const random = mulberry32(seed);
  const kinds = KINDS.filter(({ shape }) => shapes.includes(shape));
  const whole = kinds.reduce((sum, { share }) => sum + share, 0);
  const seen = new Set<string>();
  let owed = 0;
  for (const { share, made } of kinds) {
    owed += (share / whole) * count;
    for (const one of made(random)) {
      if (seen.size >= Math.round(owed)) break;
      if (dimensionFaults(one.dimensions).length > 0) continue;
      const row = printedRow(one);
      if (seen.has(row.designation)) continue;
      seen.add(row.designation);
      yield row;
    }
  }
}
