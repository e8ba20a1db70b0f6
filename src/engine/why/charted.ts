import {
  add,
  type ChartTerm,
  chartTerms,
  type Expression,
  type Movement,
  movementTerms,
  type NamedLoad,
  type SupportForces,
  shearTerms,
  supportForces,
} from '../chart/index';
import { loadsOn, movementsOn, type NamedBeam, type Piece, yieldingOn } from '../derivation/index';
import { formula, type Head } from './node';
import type { State } from './state';
import type { Source, Trace } from './types';

/** The published cases behind some terms, each once. */
function sourcesOf(terms: readonly ChartTerm[]): Source[] {
  const used = new Map(terms.map(({ chart }) => [chart.id, chart]));
  return [...used.values()].map(({ title, source: { work, edition, table, entry, fromMemory } }) => {
    const place = [
      work,
      edition && `${edition} edition`,
      table && `table ${table}`,
      table ? `case ${entry}` : entry,
    ];
    return { text: `${title}: ${place.filter((part) => part !== '').join(', ')}`, fromMemory };
  });
}

/** A movement by closed forms, in the letters of what was given. */
export function byChart(
  head: Head,
  state: State,
  expression: Expression,
  terms: readonly ChartTerm[],
): Trace {
  const trace = state.worked(head, 'closed form', expression);
  return trace.how.kind === 'formula'
    ? formula(head, { ...trace.how, sources: sourcesOf(terms) }, () => trace.parts)
    : trace;
}

/** Loads of one letter, or why else a piece moves. */
export type Cause = { readonly name: string; readonly terms: ChartTerm[] };

/** What moves a piece of the released beam at a place: each letter's loads, the springs, its supports, shear. */
export function chartedCauses(
  beam: NamedBeam,
  piece: Piece,
  place: Expression,
  movement: Movement,
): Cause[] | null {
  const setting = beam.setting(piece.ei);
  const letters = new Map<string, NamedLoad[]>();
  for (const { tex, coarse } of beam.groups) letters.set(tex, [...(letters.get(tex) ?? []), ...coarse]);
  const all = loadsOn(beam, piece, [...letters.values()].flat());
  const byLoad = [...letters].map(([tex, loads]) => ({
    name: tex,
    terms: bending(beam, piece, loadsOn(beam, piece, loads), place, movement),
  }));
  const moved = movementTerms(piece.released, movementsOn(piece), place, movement, setting);
  const causes = [
    ...byLoad,
    { name: '\\Delta', terms: moved },
    { name: 'k', terms: yielding(beam, piece, all, place, movement) },
    { name: '\\mathrm{s}', terms: shearing(beam, piece, all, place, movement) },
  ];
  return causes.every((cause): cause is Cause => cause.terms !== null)
    ? causes.filter(({ terms }) => terms.length > 0)
    : null;
}

/** The same for one unit load: all of it at once. */
export function chartedUnit(
  beam: NamedBeam,
  piece: Piece,
  load: NamedLoad,
  place: Expression,
  movement: Movement,
): ChartTerm[] | null {
  const bent = bending(beam, piece, [load], place, movement);
  return (
    bent && [
      ...bent,
      ...yielding(beam, piece, [load], place, movement),
      ...shearing(beam, piece, [load], place, movement),
    ]
  );
}

function bending(
  beam: NamedBeam,
  piece: Piece,
  loads: readonly NamedLoad[],
  place: Expression,
  movement: Movement,
): ChartTerm[] | null {
  const setting = beam.setting(piece.ei);
  const found = loads.map((load) => chartTerms(piece.released, load, place, movement, setting));
  return found.every((terms) => terms !== null) ? found.flat() : null;
}

function yielding(
  beam: NamedBeam,
  piece: Piece,
  loads: readonly NamedLoad[],
  place: Expression,
  movement: Movement,
): ChartTerm[] {
  const carried = loads.map((load) => supportForces(piece.released, load));
  const together: SupportForces = {
    forces: [add(...carried.map(({ forces }) => forces[0])), add(...carried.map(({ forces }) => forces[1]))],
    couple: add(...carried.map(({ couple }) => couple)),
  };
  return movementTerms(piece.released, yieldingOn(piece, together), place, movement, beam.setting(piece.ei));
}

const shearing = (
  beam: NamedBeam,
  { released, ei, ga }: Piece,
  loads: readonly NamedLoad[],
  place: Expression,
  movement: Movement,
): ChartTerm[] => (ga ? shearTerms(released, loads, place, movement, beam.setting(ei), ga) : []);
