/** Deflections by their datum, the movements of free ends, and the places without shear or moment: as the page says them. */
import { figure } from '@/components/drawing/format';
import { DRAWING_FORMATS } from '@/components/drawing/quantity-format';
import { toScreen } from '@/components/drawing/signs';
import { type Datum, deflectionFrom, type Solution, shearShare, tipParts, zeroShear } from '@/engine/beam';
import { type Beam, letteredSupports } from '@/engine/model';
import { extremes, type Piecewise } from '@/engine/polynomial';
import { formatNumber, type UnitSystemName } from '@/engine/quantity';
import { stationText } from './script';

type Solved = Pick<Solution, 'diagrams' | 'extremes' | 'contraflexure'>;

export interface DatumLine {
  readonly datum: string;
  /** "5.0 mm at 3.275 m"; null where nothing moves that way. */
  readonly down: string | null;
  readonly up: string | null;
}

/** From where the beam was, from the chords, and from each support in turn. */
export function datumLines(beam: Beam, { diagrams }: Solved, system: UnitSystemName): DatumLine[] {
  const supports = letteredSupports(beam).filter(({ support }) => support.vertical.kind !== 'free');
  const data: [string, Datum][] = [
    ['Where the beam was', { kind: 'absolute' }],
    ['Chord between the supports', { kind: 'chord' }],
    ...supports.map(({ letter, index }): [string, Datum] => [
      `Support ${letter}`,
      { kind: 'support', support: index },
    ]),
  ];
  return data.flatMap(([name, datum]) => {
    const line = deflectionFrom(beam, diagrams.deflection, datum);
    return line ? [datumLine(beam, name, line, system)] : [];
  });
}

function datumLine(beam: Beam, datum: string, line: Piecewise, system: UnitSystemName): DatumLine {
  const { max, min } = extremes(line);
  const text = ({ value, at }: { value: number; at: number[] }) =>
    `${movementText(Math.abs(value), system)} at ${stationText(beam, at[0]!, system)}`;
  return { datum, down: min.value < 0 ? text(min) : null, up: max.value > 0 ? text(max) : null };
}

/** A size of deflection with its unit. */
const movementText = (size: number, system: UnitSystemName): string =>
  figure(DRAWING_FORMATS[system], 'deflection', size);

const signedText = (deflection: number, system: UnitSystemName): string =>
  movementText(toScreen('deflection', deflection) + 0, system);

interface TipLine {
  readonly name: string;
  readonly text: string;
}
export interface TipTable {
  readonly title: string;
  readonly lines: readonly TipLine[];
  readonly total: string;
}

/** Each free end with its parts, down positive as the sheet has it. */
export function tipTables(beam: Beam, solution: Solved, system: UnitSystemName): TipTable[] {
  const shears = beam.segments.some(({ ga }) => ga !== null);
  return tipParts(beam, solution).map(({ at, support, total, settlement, rotation, bending, shear }) => {
    const root = stationText(beam, beam.supports[support]!.at, system);
    const parts: [string, number][] = [
      [`Movement of ${root} itself`, settlement],
      [`Rotation at ${root} times the length`, rotation],
      ['Own bending, as a cantilever', bending],
      ...(shears ? ([['Own shear', shear]] as [string, number][]) : []),
    ];
    return {
      title: `Tip at ${stationText(beam, at, system)}, beyond ${root}`,
      lines: parts.map(([name, value]) => ({ name, text: signedText(value, system) })),
      total: signedText(total, system),
    };
  });
}

/** "3.345 m, B": where the shear, or the moment, changes its sign; null for nowhere. */
export function signChangeTexts(
  beam: Beam,
  solution: Solved,
  system: UnitSystemName,
): { shear: string | null; moment: string | null } {
  const list = (places: readonly number[]) =>
    places.length === 0 ? null : places.map((x) => stationText(beam, x, system)).join(', ');
  return { shear: list(zeroShear(solution)), moment: list(solution.contraflexure) };
}

/** What shear deformation adds to the largest deflection; null where the beam does not shear or does not move. */
export function shearText(beam: Beam, solution: Solved, system: UnitSystemName): string | null {
  const { max, min } = solution.extremes.deflection;
  const largest = -min.value >= max.value ? min : max;
  const share = shearShare(beam, solution, largest.at[0]!);
  if (!share || share.total === 0) return null;
  const part = formatNumber((100 * share.shear) / share.total, { places: 0 });
  return `Of ${signedText(share.total, system)} at ${stationText(beam, share.at, system)}, shear deformation makes ${signedText(share.shear, system)} (${part} %).`;
}
