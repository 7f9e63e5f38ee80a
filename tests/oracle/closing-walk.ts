/**
 * Builds a closing forwards, as a fitter would: from end 0 a gap, a tangent, a bend, a gap, a pipe, a gap, a bend, a
 * tangent, a gap, and there is end 1. Own vector arithmetic throughout; shares nothing with the solver.
 */
export type V = [number, number, number];

const add = (a: V, b: V, k = 1): V => [a[0] + k * b[0], a[1] + k * b[1], a[2] + k * b[2]];
const cross = (a: V, b: V): V => [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
const dot = (a: V, b: V): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const unit = (a: V): V => {
  const s = Math.hypot(...a);
  return [a[0] / s, a[1] / s, a[2] / s];
};

/** v turned about a unit axis by an angle, right-handed. */
export function turned(v: V, axis: V, angle: number): V {
  const c = Math.cos(angle);
  return add(add([v[0] * c, v[1] * c, v[2] * c], cross(axis, v), Math.sin(angle)), axis, dot(axis, v) * (1 - c));
}

export interface Walk {
  p0: V;
  d0: V;
  r0: number;
  r1: number;
  a: number;
  b: number;
  gap: number;
  /** Unit vector square to d0, about which the first bend turns. */
  axis0: V;
  theta0: number;
  length: number;
  /** Turns the bend plane about the pipe. */
  roll: number;
  theta1: number;
}

/** End 1 of a closing walked from end 0: its centre and its outward axis. */
export function closingWalk(w: Walk): { p1: V; d1: V; u: V } {
  const bend = (at: V, along: V, axis: V, r: number, angle: number): V => {
    const centre = add(at, cross(axis, along), r);
    return add(centre, turned(add(at, centre, -1), axis, angle));
  };
  const start = add(w.p0, w.d0, w.a + w.gap);
  const u = turned(w.d0, w.axis0, w.theta0);
  const pipeStart = bend(start, w.d0, w.axis0, w.r0, w.theta0);
  const pipeEnd = add(pipeStart, u, w.length + 2 * w.gap);
  const axis1 = turned(w.axis0, u, w.roll);
  const out = turned(u, axis1, w.theta1);
  const bendEnd = bend(pipeEnd, u, axis1, w.r1, w.theta1);
  return { p1: add(bendEnd, out, w.b + w.gap), d1: [-out[0], -out[1], -out[2]], u };
}
