/** Lists an item is picked from, shared by its fields. */
import type { RatingClass } from "@/iso";

export type Option = { readonly value: string; readonly label: string };
export const AXES: readonly Option[] = [
  { value: "E", label: "east" }, { value: "W", label: "west" }, { value: "N", label: "north" },
  { value: "S", label: "south" }, { value: "U", label: "up" }, { value: "D", label: "down" },
];
export const CLASSES: readonly Option[] = [{ value: "", label: "the line's" }, ...["150", "300", "600", "900", "1500"].map((value) => ({ value, label: `class ${value}` }))];

export function ratingOf(value: string): RatingClass | null {
  return value === "" ? null : (Number(value) as RatingClass);
}
