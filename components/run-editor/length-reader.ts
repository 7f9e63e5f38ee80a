/** Readers for the detail strip's fields: a length that may be left empty, a free text, a number of degrees. */
import { parseLength, type UnitSystem } from "@/iso";
import { refused, understood, type EntryResult } from "./entry-result";

/** A length not under zero, in mm; null for an empty field. */
export function readOptionalLength(units: UnitSystem): (text: string) => EntryResult<number | null> {
  return (text) => {
    if (text.trim() === "") return understood(null, "");
    const length = parseLength(text, units);
    if (!length.ok) return refused(length.message);
    return length.mm < 0 ? refused("Type a length that is not under zero.") : understood(length.mm, length.understood);
  };
}

const TEXT_LIMIT = 120;

export function readText(text: string): EntryResult<string> {
  return text.length > TEXT_LIMIT ? refused(`At most ${TEXT_LIMIT} characters; this has ${text.length}.`) : understood(text.trim(), "");
}

/** Degrees clockwise, 0 to 360. */
export function readDegrees(text: string): EntryResult<number> {
  const value = Number(text.replace(/[°\s]/g, ""));
  const ok = text.trim() !== "" && Number.isFinite(value) && value >= 0 && value <= 360;
  return ok ? understood(value, "") : refused("Type degrees from 0 to 360, clockwise.");
}
