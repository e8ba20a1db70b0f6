import type { Path, Reader } from './reader';
import type { BeamDocument, Segment } from './types';
import { metres } from './words';

/** The segments from left to right, without those of no length. An empty list beside `ei` is none. */
export function readSegments(reader: Reader, document: BeamDocument, length: number | null): Segment[] {
  const wholeGiven = document.ei !== undefined || document.ga !== undefined;
  if (!document.segments || (document.segments.length === 0 && wholeGiven)) {
    return readOnly(reader, document, length);
  }
  for (const field of ['ei', 'ga'] as const) {
    if (document[field] === undefined) continue;
    const message = `Give ${field} either for the whole beam or in the segments, not both.`;
    reader.fail([field], 'conflict', message);
  }
  if (document.segments.length === 0) {
    reader.fail(['segments'], 'required', 'There is no segment. Give one for the whole beam, or ei instead.');
    return [];
  }
  const placed = document.segments.flatMap((segment, i) => {
    const path = ['segments', i];
    const stretch = reader.stretch(segment.from, segment.to, path);
    const stiffness = readStiffness(reader, segment.ei, segment.ga, path);
    return stretch && stiffness ? [{ ...stretch, ...stiffness, path }] : [];
  });
  const whole = placed.length === document.segments.length;
  const laid = placed.filter(({ from, to }) => from < to).sort((a, b) => a.from - b.from);
  if (whole && length !== null) checkCover(reader, laid, length);
  return laid.map(({ from, to, ei, ga }) => ({ from, to, ei, ga }));
}

function readOnly(reader: Reader, { ei, ga }: BeamDocument, length: number | null): Segment[] {
  if (ei === undefined) {
    reader.fail(['ei'], 'required', 'The bending stiffness is missing. Give ei, or segments with their ei.');
    return [];
  }
  const stiffness = readStiffness(reader, ei, ga, []);
  return stiffness && length !== null ? [{ from: 0, to: length, ...stiffness }] : [];
}

function readStiffness(reader: Reader, ei: number, ga: number | null | undefined, path: Path) {
  const bending = reader.positive(ei, [...path, 'ei'], 'The bending stiffness EI');
  const shear = ga == null ? null : reader.positive(ga, [...path, 'ga'], 'The shear stiffness GA');
  return bending === null || (ga != null && shear === null) ? null : { ei: bending, ga: shear };
}

function checkCover(reader: Reader, segments: readonly (Segment & { path: Path })[], length: number): void {
  let end = 0;
  for (const { from, to, path } of segments) {
    if (from > end) {
      const message = `No segment covers ${metres(end)} to ${metres(from)}. Start this one at ${metres(end)}.`;
      reader.fail([...path, 'from'], 'gap', message);
    }
    if (from < end) {
      const message = `It starts at ${metres(from)}, inside a segment that ends at ${metres(end)}. Start it there.`;
      reader.fail([...path, 'from'], 'overlap', message);
    }
    end = Math.max(end, to);
  }
  if (end < length) {
    const message = `No segment covers ${metres(end)} to ${metres(length)}. Let the last one end at ${metres(length)}.`;
    reader.fail(['segments'], 'gap', message);
  }
}
