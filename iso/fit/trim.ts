/** Where a field-fit weld would help most, and how much pipe to leave on for it. */
import type { UnitSystem } from "../run/settings-schema";
import { FIT_STEP_SLACK } from "../geometry/tolerances";
import { INCH_MM } from "../units/length";
import type { ChainStep } from "./chain";
import { fitSources, placedJoints, type PlacedJoint } from "./errors";
import type { FitInput, FitTrim } from "./fit-types";
import { chancesOf, type Chances } from "./probability";
import { shareJoints, type JointRole } from "./share";
import { covarianceOf, factorOf } from "./twist";

/** A trim that brings the chance this near to the best it can is as good, where the chosen value is out of reach. */
const NEAR_ENOUGH = 0.005;

/** Every joint a pipe can be left long at: those that reach the target first, least trim first; then by what they can reach. */
export function fitTrims(input: FitInput, steps: readonly ChainStep[]): FitTrim[] {
  const joints = placedJoints(steps);
  const trims = joints.filter(({ joint }) => joint.trimmable).flatMap((placed) => trimAt(input, steps, joints, placed) ?? []);
  return trims.sort((a, b) => Number(b.reached) - Number(a.reached) || (a.reached ? a.trimMm - b.trimMm : b.atMost - a.atMost) || b.probability - a.probability);
}

/** Roles of the field joints: both ends and, where there is one, the joint with the trim. */
export function jointRoles(joints: readonly PlacedJoint[], fitUp: FitInput["fitUp"], trimmed: string | null): { readonly placed: PlacedJoint; readonly role: JointRole }[] {
  const last = joints.length - 1;
  return joints.flatMap((placed, at): { placed: PlacedJoint; role: JointRole }[] => {
    if (placed.joint.id === trimmed) return [{ placed, role: "trimmed" }];
    if (at !== 0 && at !== last) return [];
    const set = fitUp === "set-true" && (at === 0 || trimmed !== null);
    return [{ placed, role: set ? "set" : "fitted" }];
  });
}

function trimAt(input: FitInput, steps: readonly ChainStep[], joints: readonly PlacedJoint[], placed: PlacedJoint): FitTrim | null {
  const chances = trimChances(input, steps, joints, placed.joint.id);
  if (!chances) return null;
  const { trimNeeded, points, probability: atMost } = chances;
  const reached = atMost >= input.target;
  const wanted = Math.ceil((reached ? input.target : Math.max(atMost - NEAR_ENOUGH, 0)) * points) - 1;
  const least = trimNeeded[Math.min(Math.max(wanted, 0), trimNeeded.length - 1)] ?? 0;
  const step = trimStepMm(input.units);
  const trimMm = Math.max(Math.ceil(least / step - FIT_STEP_SLACK), 0) * step;
  return { jointId: placed.joint.id, joint: placed.joint.name, trimMm, probability: withTrim(chances, trimMm), atMost, reached };
}

function trimChances(input: FitInput, steps: readonly ChainStep[], joints: readonly PlacedJoint[], trimmed: string): Chances | null {
  const roles = jointRoles(joints, input.fitUp, trimmed);
  const shared = shareJoints(roles, input.settings.limits, input.odMm, input.end.position);
  const fitted = new Set(roles.filter(({ role }) => role !== "set").map(({ placed }) => placed.joint.id));
  const columns = fitSources(input, steps, fitted).flatMap((source) => source.columns);
  return shared && chancesOf(shared, factorOf(covarianceOf(columns)), input.odMm);
}

/** Chance with a given trim at one joint; null where no field-fit weld can be. */
export function chanceWithTrim(input: FitInput, steps: readonly ChainStep[], jointId: string, trimMm: number): number | null {
  const chances = trimChances(input, steps, placedJoints(steps), jointId);
  return chances && withTrim(chances, trimMm);
}

function withTrim({ trimNeeded, points }: Chances, trimMm: number): number {
  let count = 0;
  while (count < trimNeeded.length && trimNeeded[count]! <= trimMm) count += 1;
  return count / points;
}

/** A trim is left on in eighths of an inch, or in fives of millimetres. */
export function trimStepMm(units: UnitSystem): number {
  return units === "metric" ? 5 : INCH_MM / 8;
}
