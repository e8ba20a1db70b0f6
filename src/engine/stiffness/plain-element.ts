/**
 * A prismatic stretch of beam that bends and shears, between two nodes; v and ψ of its ends are v₁, ψ₁, v₂, ψ₂. Its shape
 * functions are exact where it carries no load (J. S. Przemieniecki, Theory of Matrix Structural Analysis, 1968, section
 * 5.6, from memory), so that forces consistent with them are exact too.
 */
export class PlainElement {
  from = NaN;
  length = NaN;
  ei = NaN;
  /** Φ = 12 EI / (GA h²) */
  phi = NaN;
  /** Stiffness: 12, 6h, (4 + Φ)h² and (2 − Φ)h² times EI / ((1 + Φ) h³). */
  twelve = NaN;
  six = NaN;
  near = NaN;
  far = NaN;
  /** Forces on its ends held fixed under its loads, up and anticlockwise. */
  readonly held = new Float64Array(4);
  /** V, M, ψ and v just inside its ends. */
  readonly left = new Float64Array(4);
  readonly right = new Float64Array(4);
  private inverse = NaN; // 1/h
  private scale = NaN; // 1/(1 + Φ)
  private readonly shape = new Float64Array(4);

  measure(from: number, to: number, ei: number, ga: number | null): void {
    const h = to - from;
    this.from = from;
    this.length = h;
    this.ei = ei;
    this.phi = ga === null ? 0 : (12 * ei) / (ga * h * h);
    this.inverse = 1 / h;
    this.scale = 1 / (1 + this.phi);
    const unit = ei * this.scale * this.inverse * this.inverse * this.inverse;
    this.twelve = 12 * unit;
    this.six = 6 * unit * h;
    this.near = (4 + this.phi) * unit * h * h;
    this.far = (2 - this.phi) * unit * h * h;
  }

  unload(): void {
    for (let i = 0; i < 4; i++) this.held[i] = 0;
  }

  /** A downward load p at s from its left end. */
  addForce(p: number, s: number): void {
    const { held, shape } = this;
    this.deflectAt(s);
    for (let i = 0; i < 4; i++) held[i]! += p * shape[i]!;
  }

  /** An anticlockwise couple at s. */
  addCouple(m: number, s: number): void {
    const { held, shape } = this;
    this.turnAt(s);
    for (let i = 0; i < 4; i++) held[i]! -= m * shape[i]!;
  }

  /** A free curvature between a and b: EI κ times the turn of b against a. */
  addCurvature(kappa: number, a: number, b: number): void {
    this.addCouple(this.ei * kappa, b);
    this.addCouple(-this.ei * kappa, a);
  }

  /** V, M, ψ and v inside its ends from the movements of its nodes, at 2n and 2n + 1. */
  respond(movement: Float64Array, n: number): void {
    const { held, left, right, six, near, far, inverse } = this;
    const v = movement[n]!;
    const psi = movement[n + 1]!;
    const w = movement[n + 2]!;
    const phi = movement[n + 3]!;
    const chord = (w - v) * inverse;
    const turn = psi - chord;
    const turnFar = phi - chord;
    const shear = six * (turn + turnFar);
    left[0] = held[0]! + shear;
    left[1] = -held[1]! - near * turn - far * turnFar;
    left[2] = psi;
    left[3] = v;
    right[0] = shear - held[2]!;
    right[1] = held[3]! + far * turn + near * turnFar;
    right[2] = phi;
    right[3] = w;
  }

  /** v at s for a unit of each end movement. */
  private deflectAt(s: number): void {
    const { shape, phi, length: h, scale } = this;
    const x = s * this.inverse;
    const y = 1 - x;
    shape[0] = scale * (y * y * (1 + 2 * x) + phi * y);
    shape[1] = scale * h * x * y * (y + phi / 2);
    shape[2] = scale * (x * x * (1 + 2 * y) + phi * x);
    shape[3] = -scale * h * x * y * (x + phi / 2);
  }

  /** ψ at s for a unit of each end movement. */
  private turnAt(s: number): void {
    const { shape, phi, scale, inverse } = this;
    const x = s * inverse;
    const y = 1 - x;
    shape[0] = -6 * scale * x * y * inverse;
    shape[1] = scale * y * (1 - 3 * x + phi);
    shape[2] = -shape[0]!;
    shape[3] = scale * x * (1 - 3 * y + phi);
  }
}
