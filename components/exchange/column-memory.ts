/** How files with the same heads were matched before, kept in this browser. */
import { POINT_COLUMNS, type ColumnMatch } from "@/lib/rules/exchange/point-columns";
import { FILE_UNITS, type FileUnit } from "@/lib/rules/exchange/read-length";

export interface Remembered {
  readonly match: ColumnMatch;
  readonly unit: FileUnit;
  readonly form: "offset" | "absolute";
}

const KEY = "quarterline.columns";
/** Kinds of files remembered; the oldest goes first. */
const MOST = 20;

type Store = readonly (readonly [string, Remembered])[];

function stored(): Store {
  try {
    const value: unknown = JSON.parse(localStorage.getItem(KEY) ?? "[]");
    return Array.isArray(value) ? value.filter((entry): entry is [string, Remembered] => Array.isArray(entry) && typeof entry[0] === "string" && isRemembered(entry[1])) : [];
  } catch {
    return [];
  }
}

function isRemembered(value: unknown): value is Remembered {
  if (typeof value !== "object" || value === null) return false;
  const { match, unit, form } = value as Partial<Remembered>;
  const known = (key: unknown): boolean => key === null || POINT_COLUMNS.some((column) => column.key === key);
  return Array.isArray(match) && match.every(known) && FILE_UNITS.some((each) => each.value === unit) && (form === "offset" || form === "absolute");
}

export function recallColumns(key: string): Remembered | null {
  return stored().find(([each]) => each === key)?.[1] ?? null;
}

export function rememberColumns(key: string, remembered: Remembered): void {
  try {
    localStorage.setItem(KEY, JSON.stringify([[key, remembered], ...stored().filter(([each]) => each !== key)].slice(0, MOST)));
  } catch {
    // Without a store the next file is matched by its heads again.
  }
}
