/**
 * The slow, obvious second answer to the closing: try pipe directions all over the sphere, bend a piece of pipe from each
 * end to that direction by walking along the arcs, and see how far the two straight ends miss each other. Wherever the
 * miss has a dip, follow it down. Shares no code and no formula with the solver: no derived gradient, no half-angle
 * tangents, no proof, only walking along pipes and measuring.
 */
type V = [number, number, number];

export interface SearchInput {
  p0: readonly number[];
  d0: readonly number[];
  p1: readonly number[];
  d1: readonly number[];
  r0: number;
  r1: number;
  a: number;
  b: number;
  gap: number;
}

export interface SearchHit {
  u: V;
  theta0: number;
  theta1: number;
  /** Straight distance between the two bends' ends. */
  straight: number;
}

/** Ends of the arc that starts at p along d and turns to heading h with a radius: position and angle turned. */
function walkArc(p: V, d: V, h: V, radius: number): { at: V; angle: number } {
  const angle = Math.acos(Math.max(-1, Math.min(1, d[0] * h[0] + d[1] * h[1] + d[2] * h[2])));
  let side: V = [h[0] - Math.cos(angle) * d[0], h[1] - Math.cos(angle) * d[1], h[2] - Math.cos(angle) * d[2]];
  const size = Math.sqrt(side[0] * side[0] + side[1] * side[1] + side[2] * side[2]);
  if (size < 1e-14) return { at: p, angle };
  side = [side[0] / size, side[1] / size, side[2] / size];
  const ahead = radius * Math.sin(angle);
  const aside = radius * (1 - Math.cos(angle));
  return { at: [p[0] + ahead * d[0] + aside * side[0], p[1] + ahead * d[1] + aside * side[1], p[2] + ahead * d[2] + aside * side[2]], angle };
}

/** All directions in which the two bent ends meet in one straight line, found by brute force. `steps` is the grid's fineness. A thorough search lets bent ends pass each other and starts nine times at each dip. */
export function closingSearch(input: SearchInput, steps = 36, thorough = false): SearchHit[] {
  const unit = (v: readonly number[]): V => {
    const s = Math.hypot(v[0]!, v[1]!, v[2]!);
    return [v[0]! / s, v[1]! / s, v[2]! / s];
  };
  const d0 = unit(input.d0);
  const d1 = unit(input.d1);
  const start = (p: readonly number[], d: V, k: number): V => [p[0]! + k * d[0], p[1]! + k * d[1], p[2]! + k * d[2]];
  const a0 = start(input.p0, d0, input.a + input.gap);
  const a1 = start(input.p1, d1, input.b + input.gap);
  const scale = Math.hypot(a1[0] - a0[0], a1[1] - a0[1], a1[2] - a0[2]) + input.r0 + input.r1;

  const tryHeading = (u: V) => {
    const x = walkArc(a0, d0, u, input.r0);
    const y = walkArc(a1, d1, [-u[0], -u[1], -u[2]], input.r1);
    const way: V = [y.at[0] - x.at[0], y.at[1] - x.at[1], y.at[2] - x.at[2]];
    const straight = way[0] * u[0] + way[1] * u[1] + way[2] * u[2];
    const off: V = [way[0] - straight * u[0], way[1] - straight * u[1], way[2] - straight * u[2]];
    // Bent ends that have passed each other miss by the whole way back: no dip where the pipe would be shorter than nothing.
    const back = thorough ? 0 : Math.min(0, straight);
    const miss = Math.sqrt(off[0] * off[0] + off[1] * off[1] + off[2] * off[2] + back * back);
    return { miss, off, straight, theta0: x.angle, theta1: y.angle };
  };

  const hits: SearchHit[] = [];
  // A miss changes by at most a few scales per radian, so a dip this high over the grid cannot hide a hit.
  const hopeless = (4 * scale * Math.PI) / steps;
  for (const u of dips(tryHeading, steps)) {
    if (tryHeading(u).miss > hopeless) continue;
    for (const from of thorough ? starts(u, Math.PI / steps) : [u]) {
      const low = straightened(followDown(from, (v) => tryHeading(v).miss, Math.PI / steps, scale), tryHeading);
      const end = tryHeading(low);
      if (end.miss > 1e-8 * scale || end.straight < 0 || end.theta0 > Math.PI - 1e-4 || end.theta1 > Math.PI - 1e-4) continue;
      if (hits.some((h) => Math.hypot(h.u[0] - low[0], h.u[1] - low[1], h.u[2] - low[2]) < 1e-5)) continue;
      hits.push({ u: low, theta0: end.theta0, theta1: end.theta1, straight: end.straight });
    }
  }
  return hits;
}

/** Secant steps on the two sideways misses, from slopes measured by trying: a compass alone jams in a valley a hundred times longer than wide. */
function straightened(from: V, tryHeading: (u: V) => { miss: number; off: V }): V {
  const dot = (a: V, b: V) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
  let u = from;
  for (let k = 0; k < 12; k += 1) {
    const { e, f } = crossHairs(u);
    const move = (i: number, j: number): V => {
      const v: V = [u[0] + i * e[0] + j * f[0], u[1] + i * e[1] + j * f[1], u[2] + i * e[2] + j * f[2]];
      const size = Math.hypot(...v);
      return [v[0] / size, v[1] / size, v[2] / size];
    };
    const side = (v: V): [number, number] => {
      const { off } = tryHeading(v);
      return [dot(off, e), dot(off, f)];
    };
    const h = 1e-6;
    const [x, y] = side(u);
    const [xe, ye] = [side(move(h, 0)), side(move(-h, 0))].reduce(([a, b], [c, d]) => [(a! - c) / (2 * h), (b! - d) / (2 * h)] as [number, number]);
    const [xf, yf] = [side(move(0, h)), side(move(0, -h))].reduce(([a, b], [c, d]) => [(a! - c) / (2 * h), (b! - d) / (2 * h)] as [number, number]);
    const det = xe * yf - xf * ye;
    const next = move(-(yf * x - xf * y) / det, -(xe * y - ye * x) / det);
    if (!(tryHeading(next).miss < tryHeading(u).miss)) return u;
    u = next;
  }
  return u;
}

/** Two directions across a heading and across each other. */
function crossHairs(u: V): { e: V; f: V } {
  const x: V = Math.abs(u[2]) < 0.7 ? [-u[1], u[0], 0] : [0, -u[2], u[1]];
  const n = Math.hypot(...x);
  const e: V = [x[0] / n, x[1] / n, x[2] / n];
  return { e, f: [u[1] * e[2] - u[2] * e[1], u[2] * e[0] - u[0] * e[2], u[0] * e[1] - u[1] * e[0]] };
}

/** A heading, and eight more at half a grid step from it. */
function starts(u: V, step: number): V[] {
  const { e, f } = crossHairs(u);
  const round = Array.from({ length: 8 }, (_, k): V => {
    const c = (step / 2) * Math.cos((Math.PI * k) / 4);
    const s = (step / 2) * Math.sin((Math.PI * k) / 4);
    const v: V = [u[0] + c * e[0] + s * f[0], u[1] + c * e[1] + s * f[1], u[2] + c * e[2] + s * f[2]];
    const size = Math.hypot(...v);
    return [v[0] / size, v[1] / size, v[2] / size];
  });
  return [u, ...round];
}

/** Grid points no worse than their eight neighbours. */
function dips(tryHeading: (u: V) => { miss: number }, steps: number): V[] {
  const rows = steps;
  const columns = 2 * steps;
  const at = (i: number, j: number): V => {
    const t = (Math.PI * (i + 0.5)) / rows;
    const p = (2 * Math.PI * j) / columns;
    return [Math.sin(t) * Math.cos(p), Math.sin(t) * Math.sin(p), Math.cos(t)];
  };
  const miss = Array.from({ length: rows }, (_, i) => Array.from({ length: columns }, (_, j) => tryHeading(at(i, j)).miss));
  const found: V[] = [];
  for (let i = 0; i < rows; i += 1) {
    for (let j = 0; j < columns; j += 1) {
      const here = miss[i]![j]!;
      let lowest = true;
      for (let di = -1; di <= 1 && lowest; di += 1) {
        for (let dj = -1; dj <= 1; dj += 1) {
          const row = miss[i + di];
          if (row && row[(j + dj + columns) % columns]! < here) lowest = false;
        }
      }
      if (lowest) found.push(at(i, j));
    }
  }
  return found;
}

/** Looks per step size: enough to come near, few enough to end. */
const MOST_LOOKS = 12;

/** Best of a 5 by 5 grid round about, again and again until the middle is best, then with half the step. */
function followDown(from: V, miss: (u: V) => number, firstStep: number, scale: number): V {
  let u = from;
  let here = miss(u);
  for (let step = firstStep / 2; step > 1e-5 && here > 1e-12 * scale; step /= 2) {
    for (let look = 0; look < MOST_LOOKS; look += 1) {
      const better = bestRoundAbout(u, here, step, miss);
      if (!better) break;
      u = better.u;
      here = better.miss;
    }
  }
  return u;
}

function bestRoundAbout(u: V, here: number, step: number, miss: (u: V) => number): { u: V; miss: number } | null {
  const { e, f } = crossHairs(u);
  let best: { u: V; miss: number } | null = null;
  for (let i = -2; i <= 2; i += 1) {
    for (let j = -2; j <= 2; j += 1) {
      const a = u[0] + step * (i * e[0] + j * f[0]);
      const b = u[1] + step * (i * e[1] + j * f[1]);
      const c = u[2] + step * (i * e[2] + j * f[2]);
      const size = Math.sqrt(a * a + b * b + c * c);
      const there = miss([a / size, b / size, c / size]);
      if (there < (best?.miss ?? here)) best = { u: [a / size, b / size, c / size], miss: there };
    }
  }
  return best;
}
