/**
 * The opposite hand of a line: mirrored about a vertical plane, so that what went east goes west (or north, south).
 * Offsets, typed directions, stems, flat sides, returns and bolt turns follow; ids stay, so that the marks do too, unless
 * new ones are asked for.
 */
import type { Item, Point, RunDocument, View } from "./document";
import { axisSigned, offsetSigned, type AxisSigns } from "./entry-words";
import { documentCopy } from "./edit";
import type { MarksRegister } from "./model-types";

/** `about` names the axis that changes its sense: "E" swaps east and west, "N" swaps north and south. */
export type MirrorAxis = "E" | "N";

const SIGNS: Readonly<Record<MirrorAxis, AxisSigns>> = { E: [-1, 1, 1], N: [1, -1, 1] };
/** The corner the reader looks from is mirrored too, so that both hands are drawn as mirror pictures. */
const VIEWS: Readonly<Record<MirrorAxis, Readonly<Record<View, View>>>> = { E: { 1: 2, 2: 1, 3: 4, 4: 3 }, N: { 1: 4, 4: 1, 2: 3, 3: 2 } };
const TITLE_LENGTH = 120;

/**
 * The opposite hand of a document, its title saying so. `idFor` gives every run and point a new id (a line of its own
 * beside the first); without it ids stay.
 */
export function documentMirror(document: RunDocument, about: MirrorAxis, idFor?: (oldId: string) => string): RunDocument {
  const signs = SIGNS[about];
  const runs = document.runs.map((run) => ({ ...run, points: run.points.map((p) => mirrorPoint(p, signs, document)) }));
  const title = `OPPOSITE HAND OF ${document.number}`.slice(0, TITLE_LENGTH);
  const view = document.view === null ? null : VIEWS[about][document.view];
  const mirrored = { ...document, title, view, runs };
  return idFor ? documentCopy(mirrored, document.number, idFor) : mirrored;
}

function mirrorPoint(point: Point, signs: AxisSigns, document: RunDocument): Point {
  return { ...point, offset: offsetSigned(point.offset, signs, document.settings.units), item: mirrorItem(point.item, signs) };
}

function mirrorItem(item: Item, signs: AxisSigns): Item {
  switch (item.kind) {
    case "return":
      return { ...item, toward: axisSigned(item.toward, signs) };
    case "reducer":
      return item.flat === null ? item : { ...item, flat: axisSigned(item.flat, signs) };
    case "valve":
      return item.stem === null ? item : { ...item, stem: axisSigned(item.stem, signs) };
    case "flange": {
      if (item.boltHoles === "straddle") return item;
      const { turnDeg, from } = item.boltHoles;
      return { ...item, boltHoles: { turnDeg: turnDeg === 0 ? 0 : 360 - turnDeg, from: axisSigned(from, signs) } };
    }
    default:
      return item;
  }
}

/** The marks of a line for a copy of it whose ids were renamed by the same `idFor`. */
export function marksRename(register: MarksRegister, idFor: (oldId: string) => string): MarksRegister {
  const key = (old: string): string => {
    const id = /^[A-Za-z0-9_-]+/.exec(old)?.[0] ?? "";
    return id === "" ? old : idFor(id) + old.slice(id.length);
  };
  const keys = <T>(record: Readonly<Record<string, T>>): Record<string, T> => Object.fromEntries(Object.entries(record).map(([k, v]) => [key(k), v]));
  const lists = (record: Readonly<Record<string, readonly string[]>>) => Object.fromEntries(Object.entries(record).map(([k, v]) => [key(k), v.map(key)]));
  return {
    ...register, welds: keys(register.welds), pieces: keys(register.pieces), spools: keys(register.spools),
    ...(register.pieceJoints ? { pieceJoints: lists(register.pieceJoints) } : {}), ...(register.spoolParts ? { spoolParts: lists(register.spoolParts) } : {}),
    voided: register.voided.map((v) => ({ ...v, key: key(v.key) })),
  };
}
