import type { Joint } from "@/iso";
import { formatAngleDeg } from "@/iso";
import type { ReactNode } from "react";
import { Table, type Column } from "@/components/ui/table";
import type { SpoolFacts } from "./spool-facts";

const KINDS: Readonly<Record<Joint["kind"], string>> = {
  butt: "butt",
  socket: "socket",
  "slip-on": "slip-on",
  branch: "branch",
  mitre: "miter",
  threaded: "threaded",
  attachment: "attachment",
  bolted: "bolted",
};
const PLACES: Readonly<Record<Joint["place"], string>> = {
  shop: "Shop",
  field: "Field (FW)",
  "field-fit": "Field fit (FFW)",
};

/** Mismatch at a weld that needs the engineer's word, radians (3 degrees; common practice). */
const MISMATCH_LIMIT_RAD = (3 * Math.PI) / 180;
/** Below this a weld counts as square, radians: what prints as 0.0 degrees. */
const SQUARE_RAD = 0.000_9;

/** The welds of the spool by number. */
export function WeldTable({
  facts,
  done,
}: {
  readonly facts: SpoolFacts;
  readonly done: (weld: Joint) => ReactNode;
}) {
  const columns: readonly Column<Joint>[] = [
    { key: "number", head: "Weld", cell: (weld) => <strong className="figure">{weld.number}</strong> },
    { key: "kind", head: "Type", cell: (weld) => <WeldKind weld={weld} /> },
    {
      key: "between",
      head: "Between",
      cell: (weld) => `${facts.nameOf(weld.a)} and ${facts.nameOf(weld.b)}`,
    },
    { key: "done", head: "Log", cell: done },
  ];
  return <Table caption="Welds" columns={columns} rows={facts.welds} rowKey={(weld) => weld.key} />;
}

function WeldKind({ weld }: { readonly weld: Joint }) {
  const off = weld.mismatchRad >= SQUARE_RAD;
  return (
    <span>
      {PLACES[weld.place]}, {KINDS[weld.kind]},{" "}
      <span className="whitespace-nowrap">NPS {weld.nps}</span>
      {off ? <span className="block text-sm">Mismatch {formatAngleDeg(weld.mismatchRad, 1)}</span> : null}
      {weld.mismatchRad > MISMATCH_LIMIT_RAD ? (
        <span className="block text-sm font-medium text-caution">Engineer&apos;s permission</span>
      ) : null}
    </span>
  );
}
