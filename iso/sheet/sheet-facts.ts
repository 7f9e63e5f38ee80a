/** What a spool's sheet talks about, picked from the model once: every table reads from here. */
import { pipeOdMm } from "../catalogue/pipe";
import type { Nps } from "../run/document";
import type { Component, Joint, Leg, Model, Piece, Spool } from "../run/model-types";
import type { SheetInput } from "./sheet-types";

/** How pages are printed: re-laid in a smaller frame, never shrunk, so that lettering keeps its height. */
export interface PrintWish {
  /** Margin on every side at least, mm. */
  readonly leastMarginMm: number;
  /** Said under the foot's caution: who printed it when. */
  readonly foot: readonly string[];
}

export interface SheetFacts {
  readonly input: SheetInput;
  readonly model: Model;
  /** null when the line has no spool of that letter (yet): the sheet then says so. */
  readonly spool: Spool | null;
  readonly components: readonly Component[];
  readonly pieces: readonly Piece[];
  /** Numbered welds of the spool, and field welds that tie it in, along flow. */
  readonly welds: readonly Joint[];
  readonly legs: readonly Leg[];
  /** How its pages are printed; absent = usual margins, nothing said of printing. */
  readonly print?: PrintWish;
}

export function sheetFacts(input: SheetInput, model: Model): SheetFacts {
  const spool = model.spools.find((candidate) => candidate.letter === input.spool) ?? null;
  const componentIds = new Set(spool?.componentIds ?? []);
  const pieceKeys = new Set(spool?.pieceKeys ?? []);
  const jointKeys = new Set(spool?.jointKeys ?? []);
  const touches = (id: string | null) => id !== null && (componentIds.has(id) || pieceKeys.has(id));
  const pieces = model.pieces.filter((piece) => pieceKeys.has(piece.key));
  const legIds = new Set(pieces.map((piece) => piece.legId));
  return {
    input, model, spool, pieces,
    components: model.components.filter((component) => componentIds.has(component.id)),
    welds: model.joints.filter((joint) => joint.number !== null && (jointKeys.has(joint.key) || touches(joint.a) || touches(joint.b))),
    legs: model.legs.filter((leg) => legIds.has(leg.id)),
  };
}

/** Outside diameter for a size, mm: of a piece of this spool, else of the pipe table; null when neither knows it. */
export function outsideDiameterMm(facts: SheetFacts, nps: Nps): number | null {
  return facts.pieces.find((piece) => piece.nps === nps)?.odMm ?? pipeOdMm(nps, facts.input.units);
}

/** "NPS 4 STD" on an imperial line, "DN 100 SCH 40" on a metric one. */
export function sizeText(nps: Nps, schedule: string | null, units: SheetInput["units"]): string {
  const size = units === "metric" ? `DN ${DN[nps]}` : `NPS ${nps}`;
  return schedule ? `${size} ${/^\d/.test(schedule) ? `SCH ${schedule}` : schedule}` : size;
}

/** Nominal diameters of ASME B36.10M (from memory). */
const DN: Readonly<Record<Nps, string>> = {
  "1/2": "15", "3/4": "20", "1": "25", "1-1/4": "32", "1-1/2": "40", "2": "50", "2-1/2": "65", "3": "80", "3-1/2": "90", "4": "100",
  "5": "125", "6": "150", "8": "200", "10": "250", "12": "300", "14": "350", "16": "400", "18": "450", "20": "500", "22": "550", "24": "600",
};

/** Nominal size as a number of inches, for rules that go by size. */
export function npsInches(nps: Nps): number {
  return nps.split("-").reduce((sum, part) => {
    const [top, bottom] = part.split("/").map(Number);
    return sum + (bottom ? top! / bottom : top!);
  }, 0);
}
