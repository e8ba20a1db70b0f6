import type { Point } from './curve';

/**
 * Parallel lines at `angle` degrees (screen sense: 0 along x, 45 falling to the right, −45 rising), `pitch` px apart, clipped to the polygon by
 * the even-odd rule, as path data. Lines keep to one grid through the whole drawing, so neighbouring areas match.
 * Real lines and not a pattern fill: patterns are turned into pictures when a sheet is printed.
 */
export function hatchOf(polygon: readonly Point[], angle: number, pitch: number): string {
  const radians = (angle * Math.PI) / 180;
  const cos = Math.cos(radians);
  const sin = Math.sin(radians);
  const crossings = new Map<number, number[]>();
  polygon.forEach(([x, y], i) => {
    const [nextX, nextY] = polygon[(i + 1) % polygon.length] ?? [x, y];
    const along0 = x * cos + y * sin;
    const across0 = (y * cos - x * sin) / pitch;
    const along1 = nextX * cos + nextY * sin;
    const across1 = (nextY * cos - nextX * sin) / pitch;
    // Half-open, so that a line through a corner crosses one of its two edges only.
    const first = Math.ceil(Math.min(across0, across1));
    const end = Math.ceil(Math.max(across0, across1));
    for (let line = first; line < end; line++) {
      const at = along0 + ((line - across0) / (across1 - across0)) * (along1 - along0);
      const known = crossings.get(line);
      if (known) known.push(at);
      else crossings.set(line, [at]);
    }
  });
  let path = '';
  const place = (along: number, across: number) =>
    `${(along * cos - across * sin).toFixed(1)} ${(along * sin + across * cos).toFixed(1)}`;
  for (const [line, found] of crossings) {
    found.sort((a, b) => a - b);
    for (let i = 0; i + 1 < found.length; i += 2) {
      const from = found[i] ?? 0;
      const to = found[i + 1] ?? 0;
      if (to - from > 0.4) path += `M${place(from, line * pitch)}L${place(to, line * pitch)}`;
    }
  }
  return path;
}

export function rectangle(x: number, y: number, width: number, height: number): Point[] {
  return [
    [x, y],
    [x + width, y],
    [x + width, y + height],
    [x, y + height],
  ];
}

/** Ground and cut walls: 45° at 6 px. */
export function groundHatch(x: number, y: number, width: number, height: number): string {
  return hatchOf(rectangle(x, y, width, height), -45, 6);
}
