import type { Beam, Load, Restraint } from '../model/index';
import { PlainBand } from './plain-band';
import { PlainElement } from './plain-element';

/** Places and weights, in halves of the stretch, of Gauss's rule of three points: exact up to the fifth degree. */
const GAUSS = Math.sqrt(3 / 5);
const OUTER = 5 / 18;
const MIDDLE = 8 / 18;

/**
 * The independent check of the fast solver: the direct stiffness method in plain doubles, over elements that reach from
 * support to support or to a step of the section. Of the fast solver it knows nothing: it has nodes, equations and loads
 * of its own, the loads as forces consistent with the elements' exact shape functions.
 *
 * Beams without hinges; units and signs of the engine. `take` once a beam, `solve` once a set of loads, in arrays that
 * are made once.
 */
export class PlainStiffness {
  elements = 0;
  readonly element: PlainElement[] = [];
  /** Reactions in the order of the document: N, up; N·m, anticlockwise. */
  vertical = new Float64Array(0);
  moment = new Float64Array(0);
  /** Of each support of the document: its node. */
  node = new Int32Array(0);

  private beam!: Beam;
  private x = new Float64Array(0);
  private readonly band = new PlainBand();
  private size = 0;
  /** At 2n and 2n + 1 for v and ψ of node n: the row, −1 where it is prescribed; the movement; what acts on the node. */
  private row = new Int32Array(0);
  private movement = new Float64Array(0);
  private applied = new Float64Array(0);
  private right = new Float64Array(0);

  /** False where the beam has hinges, or its stiffness cannot be factorised in doubles. */
  take(beam: Beam): boolean {
    this.beam = beam;
    if (beam.hinges.length > 0) return false;
    this.fit(beam.supports.length, beam.supports.length + beam.segments.length + 1);
    this.layOut(beam);
    this.number(beam);
    this.assemble(beam);
    return this.band.factorise();
  }

  /** The beam under the loads, all of its own unless given; `moved: false` leaves the supports where they are. */
  solve(loads: readonly Load[] = this.beam.loads, moved = true): void {
    const { element, elements, applied, movement } = this;
    for (let e = 0; e < elements; e++) element[e]!.unload();
    for (let i = 0; i < 2 * elements + 2; i++) {
      applied[i] = 0;
      movement[i] = 0;
    }
    for (let i = 0; i < loads.length; i++) this.addLoad(loads[i]!);
    if (moved) this.prescribe(this.beam);
    this.balance(moved);
    for (let e = 0; e < elements; e++) element[e]!.respond(movement, 2 * e);
    this.react(this.beam);
  }

  /** Nodes at the ends of the beam and of its segments, and at its supports; elements between them. */
  private layOut({ segments, supports }: Beam): void {
    const { x, element } = this;
    let nodes = 1;
    x[0] = 0;
    for (let i = 0; i < segments.length; i++) x[nodes++] = segments[i]!.to;
    for (let i = 0; i < supports.length; i++) nodes = insert(x, nodes, supports[i]!.at);
    this.elements = nodes - 1;
    while (element.length < this.elements) element.push(new PlainElement());
    let segment = 0;
    for (let e = 0; e < this.elements; e++) {
      while (segments[segment]!.to <= x[e]!) segment++;
      const { ei, ga } = segments[segment]!;
      element[e]!.measure(x[e]!, x[e + 1]!, ei, ga);
    }
  }

  private number({ supports }: Beam): void {
    const { row, node, elements } = this;
    for (let i = 0; i < 2 * elements + 2; i++) row[i] = 0;
    for (let i = 0; i < supports.length; i++) {
      const { at, vertical, rotation } = supports[i]!;
      const n = this.nodeFrom(at);
      node[i] = n;
      if (vertical.kind === 'rigid') row[2 * n] = -1;
      if (rotation.kind === 'rigid') row[2 * n + 1] = -1;
    }
    let next = 0;
    for (let i = 0; i < 2 * elements + 2; i++) if (row[i] === 0) row[i] = next++;
    this.size = next;
  }

  private assemble({ supports }: Beam): void {
    const { band, element, elements, row, node } = this;
    band.clear(this.size);
    for (let e = 0; e < elements; e++) {
      const { twelve, six, near, far } = element[e]!;
      const [a, b, c, d] = [row[2 * e]!, row[2 * e + 1]!, row[2 * e + 2]!, row[2 * e + 3]!];
      band.couple(a, a, twelve);
      band.couple(b, a, six);
      band.couple(c, a, -twelve);
      band.couple(d, a, six);
      band.couple(b, b, near);
      band.couple(c, b, -six);
      band.couple(d, b, far);
      band.couple(c, c, twelve);
      band.couple(d, c, -six);
      band.couple(d, d, near);
    }
    for (let i = 0; i < supports.length; i++) {
      const { vertical, rotation } = supports[i]!;
      const n = 2 * node[i]!;
      if (vertical.kind === 'spring') band.couple(row[n]!, row[n]!, vertical.stiffness);
      if (rotation.kind === 'spring') band.couple(row[n + 1]!, row[n + 1]!, rotation.stiffness);
    }
  }

  private addLoad(load: Load): void {
    if (load.kind === 'line') this.spread(load.from, load.to, load.w0, load.w1);
    else if (load.kind === 'curvature') this.bend(load.from, load.to, load.kappa);
    else {
      const n = this.nodeFrom(load.at);
      const atNode = this.x[n] === load.at;
      if (load.kind === 'point') {
        if (atNode) this.applied[2 * n]! -= load.p;
        else this.element[n]!.addForce(load.p, load.at - this.x[n]!);
      } else if (atNode) this.applied[2 * n + 1]! += load.m;
      else this.element[n]!.addCouple(load.m, load.at - this.x[n]!);
    }
  }

  /** A load times a shape function is of the fourth degree. */
  private spread(from: number, to: number, w0: number, w1: number): void {
    if (to === from) return;
    const { x, elements, element } = this;
    for (let e = this.nodeFrom(from); e < elements && x[e]! < to; e++) {
      const a = Math.max(from, x[e]!);
      const b = Math.min(to, x[e + 1]!);
      const middle = (a + b) / 2;
      const reach = (GAUSS * (b - a)) / 2;
      const w = w0 + ((w1 - w0) * (middle - from)) / (to - from);
      const more = ((w1 - w0) * reach) / (to - from);
      element[e]!.addForce((w - more) * OUTER * (b - a), middle - reach - x[e]!);
      element[e]!.addForce(w * MIDDLE * (b - a), middle - x[e]!);
      element[e]!.addForce((w + more) * OUTER * (b - a), middle + reach - x[e]!);
    }
  }

  private bend(from: number, to: number, kappa: number): void {
    const { x, elements, element } = this;
    for (let e = this.nodeFrom(from); e < elements && x[e]! < to; e++) {
      const a = Math.max(from, x[e]!);
      const b = Math.min(to, x[e + 1]!);
      element[e]!.addCurvature(kappa, a - x[e]!, b - x[e]!);
    }
  }

  /** Known movements of the supports. */
  private prescribe({ supports }: Beam): void {
    for (let i = 0; i < supports.length; i++) {
      const n = 2 * this.node[i]!;
      const { vertical, rotation } = supports[i]!;
      if (vertical.kind === 'rigid') this.movement[n] = vertical.movement;
      if (rotation.kind === 'rigid') this.movement[n + 1] = rotation.movement;
    }
  }

  /** What a spring presses onto its node where its ground moves. */
  private press(i: number, restraint: Restraint): void {
    if (restraint.kind === 'spring') this.right[this.row[i]!]! += restraint.stiffness * restraint.movement;
  }

  /** K u = f of the free movements: what acts on the nodes, less what the held elements press onto them. */
  private balance(moved: boolean): void {
    const { element, elements, row, movement, applied, right, node } = this;
    const { supports } = this.beam;
    for (let i = 0; i < 2 * elements + 2; i++) if (row[i]! >= 0) right[row[i]!] = applied[i]!;
    for (let i = 0; moved && i < supports.length; i++) {
      this.press(2 * node[i]!, supports[i]!.vertical);
      this.press(2 * node[i]! + 1, supports[i]!.rotation);
    }
    for (let e = 0; e < elements; e++) {
      element[e]!.respond(movement, 2 * e); // of the known movements alone
      const { left, right: end } = element[e]!;
      subtract(right, row[2 * e]!, left[0]!);
      subtract(right, row[2 * e + 1]!, -left[1]!);
      subtract(right, row[2 * e + 2]!, -end[0]!);
      subtract(right, row[2 * e + 3]!, end[1]!);
    }
    this.band.solve(right);
    for (let i = 0; i < 2 * elements + 2; i++) if (row[i]! >= 0) movement[i] = right[row[i]!]!;
  }

  /** A support carries what the shear and the moment jump by, beyond the loads on its node. */
  private react({ supports }: Beam): void {
    const { element, elements, node, vertical, moment } = this;
    for (let i = 0; i < supports.length; i++) {
      const n = node[i]!;
      let [up, turning] = [0, 0];
      if (n < elements) {
        up += element[n]!.left[0]!;
        turning -= element[n]!.left[1]!;
      }
      if (n > 0) {
        up -= element[n - 1]!.right[0]!;
        turning += element[n - 1]!.right[1]!;
      }
      vertical[i] = supports[i]!.vertical.kind === 'free' ? 0 : up - this.applied[2 * n]!;
      moment[i] = supports[i]!.rotation.kind === 'free' ? 0 : turning - this.applied[2 * n + 1]!;
    }
  }

  /** The last node at or left of the position. */
  private nodeFrom(position: number): number {
    const { x } = this;
    let low = 0;
    let high = this.elements;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if (x[middle]! <= position) low = middle;
      else high = middle - 1;
    }
    return low;
  }

  private fit(supports: number, nodes: number): void {
    if (supports > this.node.length) {
      this.node = new Int32Array(2 * supports);
      this.vertical = new Float64Array(2 * supports);
      this.moment = new Float64Array(2 * supports);
    }
    if (nodes <= this.x.length) return;
    this.x = new Float64Array(2 * nodes);
    this.row = new Int32Array(4 * nodes);
    this.movement = new Float64Array(4 * nodes);
    this.applied = new Float64Array(4 * nodes);
    this.right = new Float64Array(4 * nodes);
  }
}

/** Puts a position among `count` ascending ones unless it is there; how many there are then. */
function insert(x: Float64Array, count: number, position: number): number {
  let i = count;
  while (i > 0 && x[i - 1]! > position) i--;
  if (i > 0 && x[i - 1] === position) return count;
  for (let j = count; j > i; j--) x[j] = x[j - 1]!;
  x[i] = position;
  return count + 1;
}

function subtract(right: Float64Array, row: number, value: number): void {
  if (row >= 0) right[row]! -= value;
}
