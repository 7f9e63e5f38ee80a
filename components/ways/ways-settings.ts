/** What a shop has and wants when it closes: kept in this browser, for all lines. Read back with care. Pure but for the store handed in. */
import { z } from "zod";
import { parseLength, STOCK_ANGLES, type KeepOut, type UnitSystem, type Vec3 } from "@/iso";

export const KEEP_OUT_KINDS = ["above", "below", "east", "west", "north", "south", "sphere", "box"] as const;

/** A space to keep clear of as typed. */
export interface KeepOutForm {
  readonly kind: (typeof KEEP_OUT_KINDS)[number];
  readonly name: string;
  /** Elevation or coordinate of a plane; centre of a sphere; a corner of a box. */
  readonly a: string;
  /** Radius of a sphere; the other corner of a box. */
  readonly b: string;
  readonly clear: string;
}

export const waysSettingsSchema = z.object({
  angles: z.array(z.union([z.literal(90), z.literal(60), z.literal(45), z.literal(30), z.literal(22.5)])).max(STOCK_ANGLES.length),
  radii: z.array(z.enum(["LR", "SR"])).min(1).max(2),
  trimMaxDeg: z.number().finite().min(0).max(90),
  /** As typed; "" = the line's, else 1.5 OD. */
  minimumPup: z.string().max(40),
  preference: z.enum(["fewest-welds", "least-trimmed", "shortest", "standard-first"]),
});
export type WaysSettings = z.infer<typeof waysSettingsSchema>;

export const FIRST_SETTINGS: WaysSettings = { angles: [90, 45], radii: ["LR"], trimMaxDeg: 90, minimumPup: "", preference: "standard-first" };

const KEY = "quarterline.ways";

export function readSettings(store: Pick<Storage, "getItem"> | null): WaysSettings {
  try {
    const parsed = waysSettingsSchema.safeParse(JSON.parse(store?.getItem(KEY) ?? "null"));
    return parsed.success ? parsed.data : FIRST_SETTINGS;
  } catch {
    return FIRST_SETTINGS;
  }
}

/** A full or forbidden store loses the memory, never the work. */
export function writeSettings(store: Pick<Storage, "setItem"> | null, settings: WaysSettings): void {
  try {
    store?.setItem(KEY, JSON.stringify(settings));
  } catch {
    return;
  }
}

export const EMPTY_KEEP_OUT: KeepOutForm = { kind: "below", name: "", a: "", b: "", clear: "" };

const PLANES: Readonly<Record<Exclude<KeepOutForm["kind"], "sphere" | "box">, { readonly axis: 0 | 1 | 2; readonly free: 1 | -1 }>> = {
  above: { axis: 2, free: -1 }, below: { axis: 2, free: 1 }, east: { axis: 0, free: -1 }, west: { axis: 0, free: 1 }, north: { axis: 1, free: -1 }, south: { axis: 1, free: 1 },
};

/** A keep-out as typed, or one sentence per wrong field. */
export function readKeepOut(form: KeepOutForm, units: UnitSystem, number: number): { readonly ok: true; readonly keepOut: KeepOut } | { readonly ok: false; readonly messages: Readonly<Partial<Record<"a" | "b" | "clear", string>>> } {
  const messages: Partial<Record<"a" | "b" | "clear", string>> = {};
  const length = (field: "a" | "b" | "clear", text: string): number => {
    const parsed = parseLength(text, units);
    if (!parsed.ok) messages[field] = parsed.message;
    return parsed.ok ? parsed.mm : 0;
  };
  const place = (field: "a" | "b", text: string): Vec3 => {
    const parts = text.split(/[,;]/).map((part) => part.trim());
    if (parts.length === 3) return parts.map((part) => length(field, part)) as unknown as Vec3;
    messages[field] = "Give east, north and up, with commas between.";
    return [0, 0, 0];
  };
  const clearMm = form.clear.trim() === "" ? 0 : length("clear", form.clear);
  if (clearMm < 0) messages.clear = "A clearance is not under zero.";
  const name = form.name.trim() || `keep-out ${number}`;
  const keepOut = keepOutOf(form, { name, clearMm }, length, place);
  if (keepOut.kind === "sphere" && keepOut.radiusMm < 0) messages.b ??= "A radius is not under zero.";
  return Object.keys(messages).length > 0 ? { ok: false, messages } : { ok: true, keepOut };
}

function keepOutOf(form: KeepOutForm, base: { name: string; clearMm: number }, length: (field: "a" | "b", text: string) => number, place: (field: "a" | "b", text: string) => Vec3): KeepOut {
  if (form.kind === "sphere") return { kind: "sphere", ...base, centre: place("a", form.a), radiusMm: length("b", form.b) };
  if (form.kind === "box") return { kind: "box", ...base, low: place("a", form.a), high: place("b", form.b) };
  const { axis, free } = PLANES[form.kind];
  const at = length("a", form.a);
  const along = (size: number) => [0, 1, 2].map((i) => (i === axis ? size : 0)) as unknown as Vec3;
  return { kind: "plane", ...base, point: along(at), normal: along(free) };
}

