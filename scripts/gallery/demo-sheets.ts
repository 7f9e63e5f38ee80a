/** The sheets of the demo lines without a database: each spool of each line as the demo shop would issue it. */
import { buildModel, emptyMarks, nextMarks, type RevisionState, type RunDocument, type SheetInput, type SheetSize, type TakeOutWord } from "@/iso";
import { DEMO_PEOPLE, DEMO_SHOP_NAME } from "@/lib/rules/demo-people";
import * as lines from "../demo/lines";

/** A spool of a demo line. */
export interface DemoSpool {
  /** The line's name in scripts/demo/lines.ts, with the spool's letter where there are more. */
  readonly name: string;
  readonly document: RunDocument;
  readonly spool: string;
}

const nameOf = (role: string): string => DEMO_PEOPLE.find((person) => person.role === role)?.name ?? "";
const DRAWN_BY = nameOf("detailer");
const CHECKED_BY = nameOf("inspector");

/** Every demo line by its name. */
export const demoDocuments: Readonly<Record<string, RunDocument>> = Object.fromEntries(
  Object.entries(lines).map(([name, line]) => [name, typeof line === "function" ? line() : line]),
);

/** The demo shop measured one of each fitting whose take-out is from memory and confirmed it. */
function confirmedTakeOuts(document: RunDocument): TakeOutWord[] {
  const keys = buildModel(document, emptyMarks(), []).components.map((component) => component.unconfirmedKey);
  return [...new Set(keys.filter((key): key is string => key !== null))].map((key) => ({ key, valueMm: null, by: nameOf("owner"), at: "2026-11-10T14:00:00Z" }));
}

/** Every spool of every demo line. */
export function demoSpools(): DemoSpool[] {
  return Object.entries(demoDocuments).flatMap(([name, document]) => {
    const { spools } = buildModel(document, emptyMarks(), confirmedTakeOuts(document));
    return spools.map(({ letter }) => ({ name: spools.length > 1 ? `${name}-${letter}` : name, document, spool: letter }));
  });
}

/** The frozen value a demo spool's sheet is made from, at a size and in a state; the code and number are made up. */
export function demoSheetInput({ document, spool, name }: DemoSpool, size: SheetSize, state: RevisionState): SheetInput {
  const takeOuts = confirmedTakeOuts(document);
  const number = Object.keys(demoDocuments).findIndex((one) => name.startsWith(one)) + 1;
  const isDraft = state === "draft";
  const row = { code: "A", description: "Issued for fabrication", date: "2026-11-16", by: DRAWN_BY, checked: CHECKED_BY, approved: CHECKED_BY };
  return {
    version: 1, document, takeOuts, spool, size,
    marks: nextMarks(document, emptyMarks(), takeOuts),
    units: document.settings.units,
    titleBlock: {
      shopName: DEMO_SHOP_NAME, client: "Gull Rock Cannery", project: "Chilled water tie-ins", jobNumber: "2614", area: "Chiller house",
      fields: [{ label: "SHOP ORDER", value: "CB-2614" }], logo: { key: "demo-logo", type: "image/svg+xml" },
    },
    revision: {
      sheetNumber: isDraft ? "" : String(number).padStart(4, "0"), code: isDraft ? "" : "A", state, hold: false,
      rows: state === "for-fabrication" || state === "as-built" ? [row] : [],
      drawnBy: DRAWN_BY, checkedBy: isDraft ? "" : CHECKED_BY, issuedAt: "2026-11-16T15:20:00Z",
      statusUrl: isDraft ? "" : `https://sheets.copperbay.example/status/demo-sheet-${String(number).padStart(8, "0")}`,
      auditHead: isDraft ? "" : "4b1d09c7a2f35e68", changedPointIds: [], accepted: [],
    },
  };
}
