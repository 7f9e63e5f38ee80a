/**
 * A slow, obvious smallest box: rims as rings of points, tried in every rotation of a dense grid (unit quaternions about
 * `stepDeg` apart). Shares no code with iso. The grid finds a box at most a little too large, so it bounds from above.
 */
export interface Ring {
  readonly centre: readonly [number, number, number];
  readonly axis: readonly [number, number, number];
  readonly radiusMm: number;
}

type Triple = readonly [number, number, number];
const RING_POINTS = 24;

export function ringPoints(rings: readonly Ring[]): Triple[] {
  return rings.flatMap(({ centre, axis, radiusMm }) => {
    const some: Triple = Math.abs(axis[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0];
    const u = unit(cross(axis, some));
    const v = cross(axis, u);
    return Array.from({ length: RING_POINTS }, (_, i): Triple => {
      const [c, s] = [Math.cos((2 * Math.PI * i) / RING_POINTS) * radiusMm, Math.sin((2 * Math.PI * i) / RING_POINTS) * radiusMm];
      return [centre[0] + u[0] * c + v[0] * s, centre[1] + u[1] * c + v[1] * s, centre[2] + u[2] * c + v[2] * s];
    });
  });
}

/** Sides of the box of smallest volume over the grid, longest first; and the smallest excess over a room. */
export function searchBox(points: readonly Triple[], stepDeg: number, room: Triple): { sizes: Triple; volume: number; leastOver: number } {
  let best = { sizes: [0, 0, 0] as Triple, volume: Infinity };
  let leastOver = Infinity;
  const step = (stepDeg * Math.PI) / 180;
  for (let tilt = 0; tilt <= Math.PI / 2 + step / 2; tilt += step) {
    const around = Math.max(1, Math.ceil((2 * Math.PI * Math.sin(tilt)) / step));
    for (let k = 0; k < around; k++) {
      const turn = (2 * Math.PI * k) / around;
      const w: Triple = [Math.sin(tilt) * Math.cos(turn), Math.sin(tilt) * Math.sin(turn), Math.cos(tilt)];
      const some: Triple = Math.abs(w[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0];
      const p = unit(cross(w, some));
      const q = cross(w, p);
      const high = span(points, w);
      for (let spin = 0; spin < Math.PI / 2; spin += step) {
        const [c, s] = [Math.cos(spin), Math.sin(spin)];
        const sizes = [high, span(points, [p[0] * c + q[0] * s, p[1] * c + q[1] * s, p[2] * c + q[2] * s]), span(points, [q[0] * c - p[0] * s, q[1] * c - p[1] * s, q[2] * c - p[2] * s])].sort((a, b) => b - a) as unknown as Triple;
        const volume = sizes[0] * sizes[1] * sizes[2];
        if (volume < best.volume) best = { sizes, volume };
        leastOver = Math.min(leastOver, Math.max(sizes[0] - room[0], sizes[1] - room[1], sizes[2] - room[2]));
      }
    }
  }
  return { ...best, leastOver: Math.max(leastOver, 0) };
}

function span(points: readonly Triple[], d: Triple): number {
  let [low, high] = [Infinity, -Infinity];
  for (const p of points) {
    const at = p[0] * d[0] + p[1] * d[1] + p[2] * d[2];
    if (at < low) low = at;
    if (at > high) high = at;
  }
  return high - low;
}

function cross(a: Triple, b: Triple): Triple {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}

function unit(v: Triple): Triple {
  const size = Math.hypot(...v);
  return [v[0] / size, v[1] / size, v[2] / size];
}
