/** What the panel calls things. */
import type { FitCondition, FitMismatch, Vec3 } from "@/iso";

export const CONDITION_WORDS: Readonly<Record<FitCondition, string>> = {
  gap: "gap", "hi-lo": "high-low", opening: "faces parallel", rotation: "bolt holes",
};

/** A face whose axis stands nearer to plumb than this has no level and no upright. */
const PLUMB = 0.99;

/** Names of the mismatches at a face that points along an axis. */
export function mismatchWords(what: FitMismatch["what"], axis: Vec3, flanged: boolean): string {
  const riser = Math.abs(axis[2]) > PLUMB;
  switch (what) {
    case "gap":
      return "Gap, along the pipe";
    case "hi-lo-level":
      return `High-low, ${riser ? "east-west" : "level"}`;
    case "hi-lo-up":
      return `High-low, ${riser ? "north-south" : "upright"}`;
    case "opening-level":
      return `Faces open, ${riser ? "east to west" : "side to side"}`;
    case "opening-up":
      return `Faces open, ${riser ? "north to south" : "top to bottom"}`;
    case "rotation":
      return flanged ? "Rotation, at the bolt circle" : "Rotation, on the outside";
  }
}

/** The chance in a word. */
export function likelihood(probability: number): string {
  if (probability >= 0.95) return "As good as sure";
  if (probability >= 0.8) return "Likely";
  if (probability >= 0.5) return "May fit, may not";
  if (probability >= 0.2) return "Rather not";
  return "Unlikely";
}
