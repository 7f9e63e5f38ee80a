/** What the title strip says, as labelled fields in reading order. Values are as entered; nothing is judged here. */
import { formatWeight } from "../units/format";
import type { UnitSystem } from "../run/document";
import type { SheetInput } from "./sheet-types";
import { npsInches, sizeText, type SheetFacts } from "./sheet-facts";
import { titleOrder, type TitleKey } from "./title-order";

export interface Field {
  readonly label: string;
  readonly value: string;
  /** Lines it may take before it is cut and shown whole among the notes. */
  readonly maxLines: number;
}

/** A heading above the fields that follow it. */
export interface FieldHeading {
  readonly heading: string;
  /** How many of them stay in one column with it. */
  readonly keeps: number;
}

export type TitleEntry = Field | FieldHeading;

const field = (label: string, value: string, maxLines = 2): Field => ({ label, value: value.trim() === "" ? "-" : value, maxLines });

/** Everything a title block carries, in the shop's order; RECORD is the head of the audit chain the sheet was issued under. */
export function titleEntries(facts: SheetFacts): TitleEntry[] {
  const parts = titleParts(facts);
  const { order } = facts.input.titleBlock;
  return order === undefined ? Object.values(parts).flat() : titleOrder(order).flatMap((key) => parts[key] ?? []);
}

/** By key, in the usual order. */
function titleParts(facts: SheetFacts): Partial<Record<TitleKey, readonly TitleEntry[]>> {
  const { titleBlock, revision } = facts.input;
  const own = titleBlock.fields.slice(0, 6).map(({ label, value }, i) => [`own-${i + 1}`, [field(label.toUpperCase(), value)]] as const);
  return {
    client: [field("CLIENT", titleBlock.client)],
    project: [field("PROJECT", titleBlock.project)],
    job: [field("JOB NO.", titleBlock.jobNumber)],
    area: [field("AREA", titleBlock.area)],
    ...Object.fromEntries(own),
    ...lineFields(facts),
    "as-entered": asEnteredFields(facts),
    ...sheetFields(facts),
    drawn: [field("DRAWN", revision.drawnBy)],
    "sign-off": signOff(revision),
    record: revision.auditHead === "" ? [] : [field("RECORD", revision.auditHead.slice(0, 12))],
  };
}

function asEnteredFields(facts: SheetFacts): TitleEntry[] {
  const { insulation, pwht, nde, test, paint } = facts.model.document.settings.asEntered;
  return [
    { heading: "AS ENTERED, PER OWNER'S SPECIFICATION", keeps: 5 },
    field("INSULATION", insulation), field("PWHT", pwht), field("NDE", nde), field("TEST", test), field("PAINT", paint),
  ];
}

/** Who checked it and when; on a signed sheet the sign-off: name, role, revision and time under one heading. No seal, no stamp. */
function signOff(revision: SheetInput["revision"]): TitleEntry[] {
  const issued = issuedText(revision.issuedAt);
  if (revision.checkedRole === undefined) return [field("CHECKED", revision.checkedBy), field("ISSUED", issued)];
  return [
    { heading: SIGN_OFF, keeps: 3 },
    field("SIGNED BY", revision.checkedBy),
    field("ROLE", revision.checkedRole),
    field("REV, TIME", `${revision.code}, ${issued}`),
  ];
}

const SIGN_OFF = "CHECKED AND SIGNED";

/** What the strip of a small first page carries; the rest follows as a table on the next page. */
export function stripEntries(facts: SheetFacts): TitleEntry[] {
  return titleEntries(facts).filter((entry) => ("label" in entry ? IN_STRIP.has(entry.label) : entry.heading === SIGN_OFF));
}

/** What the strip leaves for the table of data. */
export function restEntries(facts: SheetFacts): Field[] {
  return titleEntries(facts).flatMap((entry) => ("label" in entry && !IN_STRIP.has(entry.label) ? [entry] : []));
}

const IN_STRIP = new Set(["CLIENT", "PROJECT", "JOB NO.", "LINE", "SPOOL", "SIZE", "SCHEDULE", "MATERIAL", "UNITS", "SCALE", "NORTH", "DRAWN", "CHECKED", "SIGNED BY", "ROLE", "REV, TIME", "ISSUED", "RECORD"]);

/** What a following page repeats. */
export function shortEntries(facts: SheetFacts): TitleEntry[] {
  const { titleBlock, revision } = facts.input;
  return [
    field("SHOP", titleBlock.shopName, 1),
    field("CLIENT", titleBlock.client, 1),
    field("JOB NO.", titleBlock.jobNumber, 1),
    field("LINE", facts.model.document.number, 1),
    field("SPOOL", facts.input.spool, 1),
    field("SIZE", sizesOf(facts), 1),
    field("MATERIAL", facts.model.document.settings.pipe.material, 1),
    field("DRAWN", revision.drawnBy, 1),
    field("ISSUED", issuedText(revision.issuedAt), 2),
  ];
}

function lineFields(facts: SheetFacts): Partial<Record<TitleKey, readonly Field[]>> {
  const { pipe } = facts.model.document.settings;
  const schedules = [...new Set(facts.pieces.map((piece) => piece.schedule))];
  const materials = [...new Set(facts.pieces.map((piece) => piece.material))];
  const { title } = facts.model.document;
  return {
    line: [field("LINE", facts.model.document.number)],
    title: title.trim() === "" ? [] : [field("TITLE", title)],
    spool: [field("SPOOL", facts.spool ? facts.input.spool : `${facts.input.spool} (not in this line)`)],
    size: [field("SIZE", sizesOf(facts))],
    schedule: [field("SCHEDULE", (schedules.length > 0 ? schedules : [pipe.schedule]).join(", "))],
    material: [field("MATERIAL", (materials.length > 0 ? materials : [pipe.material]).join(", "))],
    spec: pipe.specification.trim() === "" ? [] : [field("SPEC", pipe.specification)],
    units: [field("UNITS", facts.input.units === "metric" ? "millimetres" : "feet and inches")],
    scale: [field("SCALE", "NTS")],
    north: [field("NORTH", northText(facts.input.titleBlock.plantNorthDeg))],
  };
}

function sheetFields(facts: SheetFacts): Partial<Record<TitleKey, readonly Field[]>> {
  const includes = facts.model.document.settings.faceIncludesGasket;
  return {
    faces: [field("FACES", `dimensions to faces ${includes ? "include" : "leave out"} the gasket`)],
    tolerance: [field("TOLERANCE", toleranceText(facts))],
    weight: [field("WEIGHT", weightText(facts), 3)],
  };
}

function sizesOf(facts: SheetFacts): string {
  const sizes = [...new Set([...facts.pieces.map((piece) => piece.nps), ...facts.components.map((component) => component.nps)])];
  const all = sizes.length > 0 ? sizes : [facts.model.document.settings.pipe.nps];
  return [...all].sort((a, b) => npsInches(b) - npsInches(a)).map((nps) => sizeText(nps, null, facts.input.units)).join(", ");
}

/** Fabrication tolerance by the largest size on the sheet: linear dimensions, not cumulative, shop work only (PFI ES-3). */
function toleranceText(facts: SheetFacts): string {
  const largest = Math.max(...[...facts.pieces, ...facts.components].map((part) => npsInches(part.nps)), npsInches(facts.model.document.settings.pipe.nps));
  return `${toleranceOf(largest, facts.input.units)}, shop work, not cumulative`;
}

function toleranceOf(inches: number, units: UnitSystem): string {
  if (inches <= 10) return units === "metric" ? "±3 mm" : "±1/8 in";
  return units === "metric" ? "±5 mm" : "±3/16 in";
}

function weightText(facts: SheetFacts): string {
  if (!facts.spool) return "not known";
  const missing = facts.spool.unweighed > 0 ? `; ${facts.spool.unweighed} part${facts.spool.unweighed === 1 ? "" : "s"} not weighed` : "";
  return `${formatWeight(facts.spool.weightKg, facts.input.units)} empty estimate${missing}; centre of gravity off-centre`;
}

/** "2025-03-14 15:20 UTC" from an ISO time in UTC; anything else is printed as it came. */
export function issuedText(iso: string): string {
  const match = /^(\d{4}-\d{2}-\d{2})T(\d{2}:\d{2})(?::\d{2}(?:\.\d+)?)?Z$/.exec(iso);
  return match ? `${match[1]} ${match[2]} UTC` : iso;
}

/** Where plant north lies, as the job says; the arrow on the drawing shows plant north. */
function northText(plantNorthDeg: number | undefined): string {
  return plantNorthDeg ? `PLANT N ${plantNorthDeg}° clockwise of true N` : "PLANT N, see arrow";
}
