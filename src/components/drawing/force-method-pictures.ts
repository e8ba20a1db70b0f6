import type { ForceMethodParts, Solution } from '@/engine/beam/index';
import type { Beam, Redundant } from '@/engine/model/index';
import type { DrawingFormat } from './format';
import { letterAt, namedSupports } from './names';
import type { SchematicProps } from './Schematic';
import type { SchematicMark } from './schematic/SchematicMarks';

export type Picture = Pick<SchematicProps, 'beam' | 'deflected' | 'mark'> & { caption: string };

/** "R_{B}", "M_{A}": a redundant as the drawing names it, and where it acts. */
export function redundantName(
  beam: Beam,
  redundant: Redundant,
): { symbol: string; letter: string; at: number } {
  const at = redundant.component === 'moment' ? redundant.at : (beam.supports[redundant.support]?.at ?? 0);
  const letter = letterAt(namedSupports(beam), at, beam.length) ?? 'x';
  return { symbol: `${redundant.component === 'vertical' ? 'R' : 'M'}_{${letter}}`, letter, at };
}

function gapMark(beam: Beam, redundant: Redundant): SchematicMark {
  const { letter, at } = redundantName(beam, redundant);
  return redundant.component === 'vertical'
    ? { kind: 'gap', at, component: 'vertical', label: `δ_{${letter}0}` }
    : { kind: 'gap', at, component: 'turn', label: `θ_{${letter}0}` };
}

/** The unit force in the engine's own sense: upward; anticlockwise; sagging, which is a pair of couples on a cut. */
function unitMark(beam: Beam, redundant: Redundant, format: DrawingFormat): SchematicMark {
  const { letter, at } = redundantName(beam, redundant);
  const effect = `f_{${letter}${letter}}`;
  if (redundant.component === 'vertical')
    return { kind: 'unit', at, component: 'vertical', label: `1 ${format.unit('force')}`, effect };
  const component = redundant.component === 'moment' ? 'pair' : 'turn';
  return { kind: 'unit', at, component, clockwise: false, label: `1 ${format.unit('moment')}`, effect };
}

/** The released beam under the loads; with one redundant the gap where it acts. */
export function releasedPicture(beam: Beam, { released, loads, redundants }: ForceMethodParts): Picture {
  const [first] = redundants;
  const mark = first && redundants.length === 1 ? gapMark(beam, first) : undefined;
  return { beam: released, deflected: loads.diagrams.deflection, mark, caption: 'released, loads on' };
}

/** The terms of the picture equation, from what the engine solved. */
export function forceMethodPictures(
  beam: Beam,
  parts: ForceMethodParts,
  solution: Pick<Solution, 'diagrams'>,
  format: DrawingFormat,
) {
  const unloaded = { ...parts.released, loads: [] };
  const units = parts.redundants.map((redundant, i): Picture => {
    const deflected = parts.units[i]?.diagrams.deflection;
    const caption = `${redundantName(beam, redundant).symbol} times the unit case`;
    return { beam: unloaded, deflected, mark: unitMark(beam, redundant, format), caption };
  });
  return {
    released: releasedPicture(beam, parts),
    units,
    built: { beam, deflected: solution.diagrams.deflection, caption: 'the member as built' },
  };
}
