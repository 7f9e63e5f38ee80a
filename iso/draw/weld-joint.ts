/** Which joints are welds with a dot and a number: neither bolted, nor threaded, nor a support's attachment. */
import type { Joint } from "../run/model-types";

export function isWeldJoint(joint: Joint): boolean {
  return joint.kind !== "bolted" && joint.kind !== "attachment" && joint.kind !== "threaded";
}
