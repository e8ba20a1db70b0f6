import { stabilityFaults } from './motion';
import { readSegments } from './read-segments';
import { readSupports } from './read-supports';
import { type Path, Reader } from './reader';
import type { Beam, BeamDocument, Load, Reading, Support } from './types';
import { metres } from './words';

/**
 * Reads a beam document into a beam that every solver can solve, or into all its faults. Positions within 1e-12 of the
 * length coincide and become one: supports win over hinges, hinges over segments' ends, those over loads.
 * Stability is judged last, when nothing else is wrong.
 */
export function readBeam(document: BeamDocument): Reading<Beam> {
  const length = readLength(document.length);
  const reader = new Reader(length.ok ? length.value : null);
  if (!length.ok) reader.faults.push(...length.faults);
  const supports = readSupports(reader, document.supports);
  const hinges = readHinges(reader, document.hinges ?? []);
  checkHinged(reader, document, supports, hinges);
  const segments = readSegments(reader, document, length.ok ? length.value : null);
  const loads = (document.loads ?? []).flatMap(
    (load, i) => readLoad(reader, load, hinges, ['loads', i]) ?? [],
  );
  readStations(reader, document.stations ?? []);
  if (!length.ok || reader.faults.length > 0) return { ok: false, faults: reader.faults };

  const beam = {
    length: length.value,
    segments,
    supports,
    hinges,
    loads,
    degree: degreeOf(supports, hinges),
  };
  const faults = stabilityFaults(beam, document.horizontal);
  return faults.length > 0 ? { ok: false, faults } : { ok: true, value: beam };
}

function readLength(value: number): Reading<number> {
  const reader = new Reader(null);
  const length = reader.positive(value, ['length'], 'The length of the beam');
  return length === null ? { ok: false, faults: reader.faults } : { ok: true, value: length };
}

/** Vertical and rotational restraints, springs included, − 2 − hinges. */
function degreeOf(supports: readonly Support[], hinges: readonly number[]): number {
  const held = supports.flatMap(({ vertical, rotation }) => [vertical, rotation]);
  return held.filter(({ kind }) => kind !== 'free').length - 2 - hinges.length;
}

function readHinges(reader: Reader, positions: readonly number[]): number[] {
  const hinges: number[] = [];
  positions.forEach((value, i) => {
    const path = ['hinges', i];
    const at = reader.position(value, path);
    if (at === null) return;
    if (hinges.includes(at)) {
      reader.fail(path, 'duplicate', `Another hinge is at ${metres(at)} already. Keep one of them.`);
    }
    if (reader.isEnd(at)) {
      const message = `A hinge at the end of the beam, ${metres(at)}, releases nothing. Move it inside, or leave it out.`;
      reader.fail(path, 'out_of_range', message);
    }
    hinges.push(at);
  });
  return hinges.sort((a, b) => a - b);
}

/** A hinge passes no moment, so nothing beside it can hold rotation there: it would be unclear on which side. */
function checkHinged(
  reader: Reader,
  document: BeamDocument,
  supports: readonly Support[],
  hinges: readonly number[],
): void {
  if (supports.length < document.supports.length) return; // the places of the others are unknown
  supports.forEach(({ at, rotation, kind }, i) => {
    if (rotation.kind === 'free' || !hinges.includes(at)) return;
    const sprung = rotation.kind === 'spring';
    const cure = sprung ? 'Remove kr' : 'Make it a pin or a roller';
    const message = `A ${sprung ? 'rotation spring' : `${kind} support`} cannot hold rotation at the hinge at ${metres(at)}. ${cure}, or move the hinge.`;
    reader.fail(['supports', i, sprung ? 'kr' : 'kind'], 'at_hinge', message);
  });
}

function readLoad(reader: Reader, load: Load, hinges: readonly number[], path: Path): Load | null {
  const number = (value: number, field: string) => reader.number(value, [...path, field]);
  if (load.kind === 'point') {
    const at = reader.position(load.at, [...path, 'at']);
    const p = number(load.p, 'p');
    return at === null || p === null ? null : { ...load, at, p };
  }
  if (load.kind === 'couple') {
    const at = reader.position(load.at, [...path, 'at']);
    const m = number(load.m, 'm');
    if (at !== null && hinges.includes(at)) {
      const message = `A couple cannot act in the hinge at ${metres(at)}. Put it on one side of the hinge.`;
      return reader.fail([...path, 'at'], 'at_hinge', message);
    }
    return at === null || m === null ? null : { ...load, at, m };
  }
  const stretch = reader.stretch(load.from, load.to, path);
  if (load.kind === 'curvature') {
    const kappa = number(load.kappa, 'kappa');
    return stretch === null || kappa === null ? null : { ...load, ...stretch, kappa };
  }
  const w0 = number(load.w0, 'w0');
  const w1 = number(load.w1, 'w1');
  return stretch === null || w0 === null || w1 === null ? null : { ...load, ...stretch, w0, w1 };
}

function readStations(reader: Reader, stations: number | readonly number[]): void {
  if (typeof stations !== 'number') {
    stations.forEach((x, i) => {
      reader.position(x, ['stations', i]);
    });
  } else if (!(Number.isInteger(stations) && stations >= 2)) {
    const message =
      'The count of stations must be a whole number from 2. Both ends of the beam are stations.';
    reader.fail(['stations'], 'out_of_range', message);
  }
}
