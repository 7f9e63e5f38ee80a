/**
 * The end of a branch pipe cut to sit on, or in, a run pipe.
 *
 * The picture: the run is a cylinder of radius H, the branch a cylinder of radius r whose axis meets the run's at the angle β,
 * passing it at the distance e (the eccentricity; 0 = axes cross). φ goes round the branch from the acute side. Along the
 * branch, from the foot of the common perpendicular, the two surfaces meet at
 *
 *     s(φ) = [sqrt(H² - (e + r·sin φ)²) + r·cos φ·cos β] / sin β
 *
 * Set on: the inside of the branch rests on the run's outside, so r is the branch's inside radius. Set in: the branch goes
 * through the run's wall and fills the hole, so r is its outside radius. (Printed tables that omit the division by sin β are
 * right at 90° only.)
 */

export interface SaddleInput {
  /** Outside radius of the run. */
  readonly runRadiusMm: number;
  /** Radius of the branch that meets it: inside when set on, outside when set in. */
  readonly branchRadiusMm: number;
  /** Outside diameter of the branch: what the template is wrapped round. */
  readonly branchOdMm: number;
  /** Angle between the two axes, radians, over 0 and up to π/2. */
  readonly angleRad: number;
  /** Distance between the axes; 0 = they cross. */
  readonly offsetMm: number;
}

export interface SaddleCut {
  /** From the foot of the common perpendicular along the branch's axis to the cut, at equal steps from the acute side. */
  readonly reachMm: readonly number[];
  /** How far each station lies below the longest station. */
  readonly dropMm: readonly number[];
  /** Longest station less shortest. */
  readonly depthMm: number;
  /** Longest and shortest point of the cut, between the stations too. */
  readonly longestMm: number;
  readonly shortestMm: number;
  /** Arc on the branch's outside between two stations. */
  readonly spacingMm: number;
  /** The hole's outline on the run laid flat: along the run from the foot, and arc round it from the plane of the axes. */
  readonly hole: readonly (readonly [alongMm: number, arcMm: number])[];
}

export type SaddleResult = { readonly ok: true; readonly cut: SaddleCut } | { readonly ok: false; readonly message: string };

/** Stations tried for the longest and the shortest point before it is narrowed down. */
const COARSE = 720;
const NARROWINGS = 60;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

/** Along the branch's axis to where the surfaces meet, at angle φ from the acute side; NaN where they do not. */
export function saddleReach({ runRadiusMm, branchRadiusMm, angleRad, offsetMm }: SaddleInput, phi: number): number {
  const across = offsetMm + branchRadiusMm * Math.sin(phi);
  return (Math.sqrt(runRadiusMm ** 2 - across ** 2) + branchRadiusMm * Math.cos(phi) * Math.cos(angleRad)) / Math.sin(angleRad);
}

/** The cut at `steps` stations. @returns a sentence when the branch does not meet the run all round. Never throws. */
export function saddleCut(input: SaddleInput, steps = 16): SaddleResult {
  const refusal = saddleRefusal(input);
  if (refusal !== null) return { ok: false, message: refusal };
  const reach = (phi: number) => saddleReach(input, phi);
  const longestMm = extreme(reach);
  const shortestMm = -extreme((phi) => -reach(phi));
  const stations = Array.from({ length: steps }, (_, i) => (2 * Math.PI * i) / steps);
  const reachMm = stations.map(reach);
  const top = Math.max(...reachMm);
  return {
    ok: true,
    cut: {
      reachMm, longestMm, shortestMm, dropMm: reachMm.map((s) => top - s), depthMm: top - Math.min(...reachMm),
      spacingMm: (Math.PI * input.branchOdMm) / steps, hole: stations.map((phi) => holePoint(input, phi)),
    },
  };
}

function holePoint(input: SaddleInput, phi: number): readonly [number, number] {
  const { runRadiusMm, branchRadiusMm, angleRad, offsetMm } = input;
  const along = saddleReach(input, phi) * Math.cos(angleRad) + branchRadiusMm * Math.cos(phi) * Math.sin(angleRad);
  return [along, runRadiusMm * Math.asin((offsetMm + branchRadiusMm * Math.sin(phi)) / runRadiusMm)];
}

function saddleRefusal({ runRadiusMm, branchRadiusMm, angleRad, offsetMm }: SaddleInput): string | null {
  if (![runRadiusMm, branchRadiusMm, angleRad, offsetMm].every(Number.isFinite) || runRadiusMm <= 0 || branchRadiusMm <= 0) return "Give the diameters of both pipes.";
  if (angleRad <= 0 || angleRad > Math.PI / 2) return "The branch's angle must be over 0° and at most 90°: measure it on the acute side.";
  if (Math.abs(offsetMm) + branchRadiusMm > runRadiusMm * (1 + Number.EPSILON)) return "The branch reaches past the side of the run: make it smaller, or bring it nearer the run's middle.";
  return null;
}

/** Greatest value round the pipe: the best of many stations, narrowed by golden sections between its neighbours. */
function extreme(f: (phi: number) => number): number {
  const step = (2 * Math.PI) / COARSE;
  let best = 0;
  for (let i = 1; i < COARSE; i++) if (f(i * step) > f(best * step)) best = i;
  let [low, high] = [(best - 1) * step, (best + 1) * step];
  for (let i = 0; i < NARROWINGS; i++) {
    const [a, b] = [high - GOLDEN * (high - low), low + GOLDEN * (high - low)];
    if (!(f(b) > f(a))) high = b;
    else low = a;
  }
  return Math.max(f(best * step), f((low + high) / 2));
}
