/** On small paper the strip has no room for everything: the rest of the title block as a table. */
import type { SheetFacts } from "./sheet-facts";
import { restEntries } from "./title-fields";
import type { Table } from "./table";

export function dataTable(facts: SheetFacts): Table {
  return {
    title: "LINE AND SPOOL DATA",
    lead: ["Insulation, PWHT, NDE, test and paint as entered, per owner's specification."],
    columns: [{ head: "", share: 0, minMm: 27 }, { head: "", share: 1, minMm: 40 }],
    rows: restEntries(facts).map(({ label, value }) => ({ cells: [label, [{ text: value, face: "bold" as const }]] })),
    foot: [],
  };
}
