import type { Beam } from '@/engine/model/index';

/** Stations of every answer: ten equal steps. */
export const STATIONS = 11;

/** What a peer answers, in arrays that it reuses. */
export class Answer {
  readonly reactions: Float64Array;
  readonly turning: Float64Array;
  readonly shear = new Float64Array(STATIONS);
  readonly moment = new Float64Array(STATIONS);
  readonly slope = new Float64Array(STATIONS);
  readonly deflection = new Float64Array(STATIONS);

  constructor(supports: number) {
    this.reactions = new Float64Array(supports);
    this.turning = new Float64Array(supports);
  }
}

/** Solves K u = f for the free unknowns; K symmetric, positive definite. `stiffness(i, j)` is added to by `add`. */
export interface Equations {
  clear(): void;
  /** i ≥ j */
  add(i: number, j: number, value: number): void;
  load(i: number, value: number): void;
  solve(): void;
  movement(i: number): number;
}

/**
 * The direct stiffness method over beam elements as textbooks have it, for rigid supports, uniform and point loads: what
 * an engineer would write round a package that solves equations. What does not change from beam to beam of one case is
 * done once: nodes, numbers of the unknowns, which load is where. Point loads stand on nodes.
 */
export class Frame {
  readonly unknowns: number;
  readonly elements: number;
  private readonly x: Float64Array;
  /** Unknown of each node's deflection (2n) and rotation (2n + 1); −1 where a support holds it. */
  private readonly unknown: Int32Array;
  /** The mesh: at each corner a support's, a load's or the beam's own end, then `perStretch` elements to the next. */
  private readonly corners: readonly ((beam: Beam) => number)[];
  private readonly split: Int32Array;
  private readonly loadNode: Int32Array;
  private readonly supportNode: Int32Array;
  private readonly moved: Float64Array;
  private readonly force: Float64Array;
  private readonly stiffness = new Float64Array(16);
  private readonly held = new Float64Array(4);

  /** `perSpan`: elements from support to support (or to a free end); 0 for one per stretch between supports and loads. */
  constructor(beam: Beam, perSpan: number) {
    const corners = cornersOf(beam);
    this.corners = corners.map(({ read }) => read);
    this.split = splitOf(
      corners.map(({ support }) => support !== null),
      perSpan,
    );
    const first = new Int32Array(corners.length);
    for (let c = 0; c + 1 < corners.length; c++) first[c + 1] = first[c]! + this.split[c]!;
    this.elements = first[corners.length - 1]!;
    this.x = new Float64Array(this.elements + 1);
    this.unknown = new Int32Array(2 * this.x.length);
    this.loadNode = Int32Array.from(
      beam.loads,
      (_, i) => first[corners.findIndex(({ loads }) => loads.includes(i))] ?? -1,
    );
    this.supportNode = Int32Array.from(
      beam.supports,
      (_, i) => first[corners.findIndex(({ support }) => support === i)]!,
    );
    beam.supports.forEach(({ rotation }, i) => {
      this.unknown[2 * this.supportNode[i]!] = -1;
      if (rotation.kind === 'rigid') this.unknown[2 * this.supportNode[i]! + 1] = -1;
    });
    let free = 0;
    this.unknown.forEach((held, i) => {
      if (held === 0) this.unknown[i] = free++;
    });
    this.unknowns = free;
    this.moved = new Float64Array(this.unknown.length);
    this.force = new Float64Array(this.unknown.length);
  }

  solve(beam: Beam, equations: Equations, answer: Answer): void {
    this.place(beam);
    const ei = beam.segments[0]!.ei;
    const w = this.assemble(beam, ei, equations);
    equations.solve();
    const { unknown, moved } = this;
    for (let i = 0; i < unknown.length; i++) moved[i] = unknown[i]! < 0 ? 0 : equations.movement(unknown[i]!);
    this.react(beam, ei, w, answer);
    this.measure(beam, ei, w, answer);
  }

  private place(beam: Beam): void {
    const { x, corners, split } = this;
    let node = 0;
    let from = 0;
    for (let c = 1; c < corners.length; c++) {
      const to = corners[c]!(beam);
      const parts = split[c - 1]!;
      for (let i = 1; i <= parts; i++) x[++node] = i === parts ? to : from + ((to - from) * i) / parts;
      from = to;
    }
  }

  private assemble({ loads }: Beam, ei: number, equations: Equations): number {
    const { unknown, loadNode, stiffness, held } = this;
    equations.clear();
    let w = 0;
    for (let i = 0; i < loads.length; i++) {
      const load = loads[i]!;
      if (load.kind === 'line') w += load.w0;
      const row = unknown[2 * loadNode[i]!]!;
      if (load.kind === 'point' && row >= 0) equations.load(row, -load.p);
    }
    for (let e = 0; e < this.elements; e++) {
      this.element(e, ei, w);
      for (let a = 0; a < 4; a++) {
        const row = unknown[2 * e + a]!;
        if (row < 0) continue;
        equations.load(row, -held[a]!);
        for (let b = 0; b < 4; b++) {
          const column = unknown[2 * e + b]!;
          if (column >= 0) equations.add(row, column, stiffness[4 * a + b]!);
        }
      }
    }
    return w;
  }

  /** Stiffness of element e, and the forces at its ends held fixed under the uniform load. */
  private element(e: number, ei: number, w: number): void {
    const { x, stiffness, held } = this;
    const h = x[e + 1]! - x[e]!;
    const near = (4 * ei) / h;
    const cross = (6 * ei) / (h * h);
    const shear = (12 * ei) / (h * h * h);
    stiffness[0] = shear;
    stiffness[1] = cross;
    stiffness[2] = -shear;
    stiffness[3] = cross;
    stiffness[4] = cross;
    stiffness[5] = near;
    stiffness[6] = -cross;
    stiffness[7] = near / 2;
    stiffness[8] = -shear;
    stiffness[9] = -cross;
    stiffness[10] = shear;
    stiffness[11] = -cross;
    stiffness[12] = cross;
    stiffness[13] = near / 2;
    stiffness[14] = -cross;
    stiffness[15] = near;
    held[0] = (w * h) / 2;
    held[1] = (w * h * h) / 12;
    held[2] = held[0]!;
    held[3] = -held[1]!;
  }

  /** What the supports must hold beyond the loads that stand on them. */
  private react({ loads }: Beam, ei: number, w: number, answer: Answer): void {
    const { moved, force, stiffness, held, supportNode, loadNode } = this;
    force.fill(0);
    for (let e = 0; e < this.elements; e++) {
      this.element(e, ei, w);
      for (let a = 0; a < 4; a++) {
        let sum = held[a]!;
        for (let b = 0; b < 4; b++) sum += stiffness[4 * a + b]! * moved[2 * e + b]!;
        force[2 * e + a]! += sum;
      }
    }
    for (let i = 0; i < loads.length; i++) {
      const load = loads[i]!;
      if (load.kind === 'point') force[2 * loadNode[i]!]! += load.p;
    }
    for (let i = 0; i < supportNode.length; i++) {
      answer.reactions[i] = force[2 * supportNode[i]!]!;
      answer.turning[i] = force[2 * supportNode[i]! + 1]!;
    }
  }

  /** The cubic of the end movements and the shape of the element held at its ends under its uniform load. */
  private measure({ length }: Beam, ei: number, w: number, answer: Answer): void {
    const { x, moved } = this;
    let e = 0;
    for (let i = 0; i < STATIONS; i++) {
      const at = i === STATIONS - 1 ? length : (length * i) / (STATIONS - 1);
      while (e + 1 < this.elements && x[e + 1]! <= at) e++;
      const h = x[e + 1]! - x[e]!;
      const s = at - x[e]!;
      const [a, b, c, d] = [moved[2 * e]!, moved[2 * e + 1]!, moved[2 * e + 2]!, moved[2 * e + 3]!];
      const chord = (c - a) / h;
      const p = (3 * chord - 2 * b - d) / h;
      const q = (b + d - 2 * chord) / (h * h);
      const load = w / (24 * ei);
      const r = h - s;
      answer.deflection[i] = a + s * (b + s * (p + s * q)) - load * s * s * r * r;
      answer.slope[i] = b + s * (2 * p + 3 * s * q) - 2 * load * s * r * (r - s);
      answer.moment[i] = ei * (2 * p + 6 * s * q) - (w / 12) * (h * h - 6 * s * r);
      answer.shear[i] = 6 * ei * q + w * (h / 2 - s);
    }
  }
}

type Corner = { support: number | null; loads: number[]; read: (beam: Beam) => number };

/** Supports, point loads and the two ends, from left to right, each with how to read its position in a beam alike. */
function cornersOf(beam: Beam): Corner[] {
  const corners: (Corner & { at: number })[] = [];
  const corner = (at: number, read: (beam: Beam) => number): Corner => {
    const there = corners.find((other) => other.at === at) ?? { at, support: null, loads: [], read };
    if (!corners.includes(there)) corners.push(there);
    return there;
  };
  corner(0, () => 0);
  beam.supports.forEach(({ at }, i) => {
    corner(at, ({ supports }) => supports[i]!.at).support = i;
  });
  beam.loads.forEach((load, i) => {
    if ('at' in load) corner(load.at, ({ loads }) => (loads[i] as typeof load).at).loads.push(i);
  });
  corner(beam.length, ({ length }) => length);
  return corners.sort((a, b) => a.at - b.at);
}

function splitOf(supported: readonly boolean[], perSpan: number): Int32Array {
  const split = new Int32Array(supported.length - 1).fill(1);
  if (perSpan === 0) return split;
  for (let from = 0; from < split.length; ) {
    let to = from + 1;
    while (to < split.length && !supported[to]) to++;
    split.fill(Math.round(perSpan / (to - from)), from, to);
    from = to;
  }
  return split;
}
