"use client";
import { formatLength, type UnitSystem } from "@/iso";
import { countText } from "@/components/ui/format";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { Table, type Column } from "@/components/ui/table";
import { amountText } from "@/lib/rules/nest-plans";
import { pieceWord, type PlanBar, type PlanGroup } from "@/lib/rules/nest-table";
import { BarPicture } from "./bar-picture";

/** The lengths of one kind of pipe: picture of each, then the same as a table, then totals. */
export function PlanGroupView({ plan }: { readonly plan: PlanGroup }) {
  const { units } = plan.group;
  const longest = plan.bars.reduce((most, bar) => Math.max(most, bar.lengthMm), 1);
  return (
    <Section title={plan.title}>
      {plan.unplaced.length > 0 ? (
        <Notice tone="trouble" word="Not planned" className="mb-4">
          {plan.unplaced.map(({ mark, reason }) => `${mark}: ${reason}`).join(" · ")}
        </Notice>
      ) : null}
      {plan.bars.length > 0 ? (
        <>
          <ol className="space-y-4 overflow-x-auto pb-2">
            {plan.bars.map((bar) => (
              <li key={bar.key}>
                <p className="mb-1">
                  <strong className="figure">{bar.number}</strong> {barWord(bar, units)}
                </p>
                <BarPicture bar={bar} longestMm={longest} units={units} label={`${barWord(bar, units)}: ${cutsWord(bar, units)}`} />
              </li>
            ))}
          </ol>
          <p className="mt-2 text-sm text-soft">Black strokes are saw cuts; hatched is trim and scrap; a white end goes back to the rack.</p>
          <div className="mt-5">
            <Table caption={`Cuts from ${plan.title}`} columns={columns(units)} rows={plan.bars} rowKey={(bar) => bar.key} />
          </div>
          <Totals plan={plan} />
        </>
      ) : null}
    </Section>
  );
}

export function barWord(bar: PlanBar, units: UnitSystem): string {
  return `${bar.offcut ? "Offcut" : "Full length"} of ${formatLength(bar.lengthMm, units)}, ${bar.heat ? `heat ${bar.heat}` : "heat not known"}`;
}

function cutsWord(bar: PlanBar, units: UnitSystem): string {
  return bar.pieces.map(({ piece, lengthMm }) => `${pieceWord(piece)} ${formatLength(lengthMm, units)}`).join(", ");
}

function columns(units: UnitSystem): readonly Column<PlanBar>[] {
  return [
    { key: "number", head: "No.", figure: true, cell: (bar) => bar.number },
    { key: "stock", head: "Stock", cell: (bar) => barWord(bar, units) },
    {
      key: "cuts", head: "Cut in this order",
      cell: (bar) => (
        <ul>
          {bar.pieces.map(({ piece, lengthMm }) => (
            <li key={piece.id}>
              {piece.line} <strong>{piece.mark}</strong> <span className="figure whitespace-nowrap">{formatLength(lengthMm, units)}</span>
            </li>
          ))}
        </ul>
      ),
    },
    { key: "rest", head: "Rest", cell: (bar) => <><span className="figure whitespace-nowrap">{formatLength(bar.restMm, units)}</span> {bar.returned ? "back to the rack" : "scrap"}</> },
  ];
}

function Totals({ plan }: { readonly plan: PlanGroup }) {
  const { units } = plan.group;
  const fullLengths = plan.bars.filter((bar) => !bar.offcut).length;
  const offcuts = plan.bars.length - fullLengths;
  const cost = plan.costed ? `Stock taken less offcuts returned costs ${amountText(plan.cost)}.` : `No costs are entered: metres of new pipe count instead, ${amountText(plan.cost)} here.`;
  return (
    <p className="mt-4">
      {countText(fullLengths, "full length")} and {countText(offcuts, "offcut")} taken, {formatLength(plan.takenMm, units)} in all; {formatLength(plan.cutMm, units)} become pieces and{" "}
      {formatLength(plan.returnedMm, units)} go back. {cost} {plan.word}
    </p>
  );
}
