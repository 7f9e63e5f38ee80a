/** A way as a small isometric: one thick line, a dot at each weld, the two ends named. Not to scale with its neighbours. */
import type { Vec3, Way } from "@/iso";

const C = Math.cos(Math.PI / 6);
const S = Math.sin(Math.PI / 6);
/** Paper vectors of east and north, up always (0, -1): the four corners one may look from. */
const VIEWS = [[[C, -S], [-C, -S]], [[C, S], [C, -S]], [[-C, S], [C, S]], [[-C, -S], [-C, S]]] as const;

const WIDTH = 200;
const HEIGHT = 120;
const EDGE = 16;
/** Length of the pipe drawn behind each end, as a share of the way's size. */
const STUB_SHARE = 0.12;

type Paper = readonly [number, number];

function projected([e, n, u]: Vec3, view: (typeof VIEWS)[number]): Paper {
  return [e * view[0][0] + n * view[1][0], e * view[0][1] + n * view[1][1] - u];
}

/** The view in which the shortest-looking straight looks longest, against its true length. */
function bestView(way: Way): (typeof VIEWS)[number] {
  const worth = (view: (typeof VIEWS)[number]) => Math.min(...way.straights.map(({ direction }) => Math.hypot(...projected(direction, view))));
  return VIEWS.reduce((best, view) => (worth(view) > worth(best) + 1e-9 ? view : best), VIEWS[0]);
}

export function WayPicture({ way, className }: { readonly way: Way; readonly className?: string }) {
  const view = bestView(way);
  const size = Math.max(...[0, 1, 2].map((axis) => Math.max(...way.path.map((p) => p[axis as 0])) - Math.min(...way.path.map((p) => p[axis as 0]))));
  const stub = (at: Vec3, d: Vec3, sign: number): Vec3 => [at[0] + sign * d[0] * size * STUB_SHARE, at[1] + sign * d[1] * size * STUB_SHARE, at[2] + sign * d[2] * size * STUB_SHARE];
  const [first, last] = [way.path[0], way.path[way.path.length - 1]];
  const [d0, d1] = [way.straights[0]?.direction, way.straights[way.straights.length - 1]?.direction];
  if (!first || !last || !d0 || !d1) return null;
  const ends = [stub(first, d0, -1), stub(last, d1, 1)] as const;
  const all = [ends[0], ...way.path, ends[1]].map((p) => projected(p, view));
  const place = fitted(all);
  const line = (points: readonly Vec3[]) => points.map((p) => place(projected(p, view)).map((x) => x.toFixed(1)).join(",")).join(" ");
  const [a, b] = [place(projected(ends[0], view)), place(projected(ends[1], view))];
  return (
    <svg role="img" aria-label={`Isometric of ${way.title}`} viewBox={`0 0 ${WIDTH} ${HEIGHT}`} className={className}>
      <polyline points={line([ends[0], first])} fill="none" stroke="var(--color-soft)" strokeWidth="2.5" strokeDasharray="5 3" />
      <polyline points={line([last, ends[1]])} fill="none" stroke="var(--color-soft)" strokeWidth="2.5" strokeDasharray="5 3" />
      <polyline points={line(way.path)} fill="none" stroke="var(--color-ink)" strokeWidth="2.5" strokeLinejoin="round" />
      {weldPlaces(way).map((p, i) => {
        const [x, y] = place(projected(p, view));
        return <circle key={i} cx={x} cy={y} r="3.2" fill="var(--color-ink)" />;
      })}
      {([[a, "0"], [b, "1"]] as const).map(([[x, y], name]) => (
        <text key={name} x={Math.min(WIDTH - 8, Math.max(8, x))} y={y < HEIGHT / 2 ? Math.max(11, y - 6) : Math.min(HEIGHT - 3, y + 14)} fontSize="12" textAnchor="middle" fill="var(--color-dye)">
          {name}
        </text>
      ))}
    </svg>
  );
}

/** Scales and centres paper points into the picture. */
function fitted(points: readonly Paper[]): (p: Paper) => Paper {
  const [xs, ys] = [points.map((p) => p[0]), points.map((p) => p[1])];
  const [left, right, top, bottom] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  const scale = Math.min((WIDTH - 2 * EDGE) / Math.max(right - left, 1), (HEIGHT - 2 * EDGE) / Math.max(bottom - top, 1));
  return ([x, y]) => [WIDTH / 2 + (x - (left + right) / 2) * scale, HEIGHT / 2 + (y - (top + bottom) / 2) * scale];
}

/** Where the welds are: at the faces of fittings, at the ends, at both faces of a reducer. */
function weldPlaces(way: Way): Vec3[] {
  const on = (at: Vec3, d: Vec3, mm: number): Vec3 => [at[0] + d[0] * mm, at[1] + d[1] * mm, at[2] + d[2] * mm];
  return way.straights.flatMap((straight, j) => {
    const [before, after] = [way.turns[j - 1], way.turns[j]];
    const start = on(straight.from, straight.direction, before?.takeOutMm ?? 0);
    const end = on(straight.to, straight.direction, -(after?.takeOutMm ?? 0));
    const { reducer } = straight;
    const faces = reducer ? [reducer.largeEnd, on(reducer.largeEnd, straight.direction, straight.nps === reducer.smallNps ? reducer.lengthMm : -reducer.lengthMm)] : [];
    return straight.cutMm === null ? [start, ...faces] : [start, ...faces, end];
  });
}
