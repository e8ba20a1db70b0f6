/** Path data of the small marks that drawings are made of. */

const px = (value: number): string => value.toFixed(1);

/** A shaft with a closed head; drawn with the same stroke and fill. */
export function arrowPath(x1: number, y1: number, x2: number, y2: number, head = 8, half = 2.6): string {
  const angle = Math.atan2(y2 - y1, x2 - x1);
  const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
  const [bx, by] = [x2 - head * cos, y2 - head * sin];
  const wing = (side: number) => `${px(bx - side * half * sin)} ${px(by + side * half * cos)}`;
  return `M${px(x1)} ${px(y1)}L${px(bx)} ${px(by)}M${px(x2)} ${px(y2)}L${wing(1)}L${wing(-1)}Z`;
}

/** A three-quarter arc about (x, y), and the head at its end. */
export function turnPaths(
  x: number,
  y: number,
  radius: number,
  clockwise: boolean,
): { arc: string; head: string } {
  const sense = clockwise ? 1 : -1;
  const start = clockwise ? -2.4 : -0.75;
  const end = start + sense * 3.4;
  const at = (angle: number) => [x + radius * Math.cos(angle), y + radius * Math.sin(angle)] as const;
  const [sx, sy] = at(start);
  const [ex, ey] = at(end);
  const along = end + (sense * Math.PI) / 2 - sense * 0.22;
  const [cos, sin] = [Math.cos(along), Math.sin(along)];
  const [bx, by] = [ex - 8 * cos, ey - 8 * sin];
  const wing = (side: number) => `${px(bx - side * 2.8 * sin)} ${px(by + side * 2.8 * cos)}`;
  return {
    arc: `M${px(sx)} ${px(sy)}A${radius} ${radius} 0 1 ${clockwise ? 1 : 0} ${px(bx)} ${px(by)}`,
    head: `M${px(ex)} ${px(ey)}L${wing(1)}L${wing(-1)}Z`,
  };
}

/**
 * A comb of arrows over x1…x2 with its cap; `tall1` and `tall2` are the heights at the ends. Downward arrows land on y; upward ones leave it.
 */
export function combPaths(
  [x1, x2]: readonly [number, number],
  y: number,
  [tall1, tall2]: readonly [number, number],
  { step, upward }: { step: number; upward: boolean },
): { arrows: string; cap: string } {
  const count = Math.max(1, Math.round((x2 - x1) / step));
  let arrows = '';
  for (let i = 0; i <= count; i++) {
    const x = x1 + ((x2 - x1) * i) / count;
    const tall = tall1 + ((tall2 - tall1) * i) / count;
    if (tall < 7) continue;
    arrows += upward ? arrowPath(x, y - 2, x, y - tall, 6, 1.7) : arrowPath(x, y - tall, x, y - 1.5, 6, 1.7);
  }
  // The cap joins the tails: over a downward comb, along the member under an upward one, whose slope the heads then show.
  const cap = upward
    ? `M${px(x1)} ${px(y - 2)}H${px(x2)}`
    : `M${px(x1)} ${px(y - tall1)}L${px(x2)} ${px(y - tall2)}`;
  return { arrows, cap };
}

/** Oblique ticks of a dimension line, one path for all. */
export function ticksPath(xs: readonly number[], y: number): string {
  return xs.map((x) => `M${px(x - 3.5)} ${px(y + 3.5)}l7 -7`).join('');
}

/** A revision cloud round a rectangle: scallops of radius r. */
export function cloudPath(x: number, y: number, width: number, height: number, r = 9): string {
  const side = (x1: number, y1: number, x2: number, y2: number) => {
    const count = Math.max(1, Math.round(Math.hypot(x2 - x1, y2 - y1) / (r * 1.7)));
    let path = '';
    for (let i = 1; i <= count; i++) {
      path += `A${r} ${r} 0 0 1 ${px(x1 + ((x2 - x1) * i) / count)} ${px(y1 + ((y2 - y1) * i) / count)}`;
    }
    return path;
  };
  const [right, bottom] = [x + width, y + height];
  return `M${px(x)} ${px(y)}${side(x, y, right, y)}${side(right, y, right, bottom)}${side(right, bottom, x, bottom)}${side(x, bottom, x, y)}Z`;
}

/** A spiral of a little over two turns, from its middle to the point (x + reach, y). */
export function spiralPath(x: number, y: number, reach: number): string {
  const steps = 36;
  const turns = 2 * 2 * Math.PI;
  const points = Array.from({ length: steps + 1 }, (_, i) => {
    const t = i / steps;
    const radius = reach * t;
    return `${px(x + radius * Math.cos(turns * t))} ${px(y + Math.abs(radius) * Math.sin(turns * t))}`;
  });
  return `M${points.join('L')}`;
}
