/** The solids of the true shape as buffers of three. */
import { CatmullRomCurve3, CurvePath, CylinderGeometry, LineCurve3, Object3D, SphereGeometry, TubeGeometry, Vector3, type BufferGeometry } from "three";
import type { Vec3 } from "@/iso";
import type { ShapePart } from "./shape-parts";

/** Metres in the scene, so that depth keeps its precision. */
const METRE = 1 / 1000;
/** Facets round a solid. */
const ROUND = 20;

function point([x, y, z]: Vec3): Vector3 {
  return new Vector3(x * METRE, y * METRE, z * METRE);
}

/** @returns a buffer of its own, to be given back by the scene. */
export function solidGeometry(part: ShapePart): BufferGeometry {
  if (part.solid === "ball") {
    const ball = new SphereGeometry(part.radiusMm * METRE, ROUND, ROUND / 2);
    const at = point(part.at);
    return ball.translate(at.x, at.y, at.z);
  }
  if (part.solid === "cone") return between(point(part.from), point(part.to), part.fromRadiusMm * METRE, part.toRadiusMm * METRE);
  const places = part.path.map(point);
  const [from, to] = [places[0], places[places.length - 1]];
  if (places.length === 2 && from && to) return between(from, to, part.radiusMm * METRE, part.radiusMm * METRE);
  return new TubeGeometry(throughAll(places), places.length * 2, part.radiusMm * METRE, ROUND, false);
}

/** A line through all places: straight where two legs are long, round where an arc was sampled. */
function throughAll(places: readonly Vector3[]): CurvePath<Vector3> | CatmullRomCurve3 {
  const spans = places.slice(1).map((place, i) => place.distanceTo(places[i] ?? place));
  const even = Math.max(...spans) < 3 * Math.min(...spans);
  if (even) return new CatmullRomCurve3([...places], false, "centripetal");
  const path = new CurvePath<Vector3>();
  places.slice(1).forEach((place, i) => path.add(new LineCurve3(places[i] ?? place, place)));
  return path;
}

function between(from: Vector3, to: Vector3, fromRadius: number, toRadius: number): BufferGeometry {
  const along = to.clone().sub(from);
  const made = new CylinderGeometry(toRadius, fromRadius, along.length(), ROUND);
  const stand = new Object3D();
  stand.position.copy(from).addScaledVector(along, 0.5);
  stand.quaternion.setFromUnitVectors(new Vector3(0, 1, 0), along.normalize());
  stand.updateMatrix();
  return made.applyMatrix4(stand.matrix);
}
