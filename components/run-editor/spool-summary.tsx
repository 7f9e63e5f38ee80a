"use client";
import Link from "next/link";
import { memo } from "react";
import { formatLength, formatWeight, type Model } from "@/iso";
import type { SpoolRow } from "@/lib/rules/api-types";
import { StateWord } from "@/components/ui/state-word";
import { countText } from "@/components/ui/format";

/** Each spool with what it holds, its weight and outer box, and its sheet where it has one. */
export const SpoolSummary = memo(function SpoolSummary({ model, spools }: { readonly model: Model; readonly spools: readonly SpoolRow[] }) {
  const { units } = model.document.settings;
  if (model.spools.length === 0) return <p className="py-2 text-soft">No spool yet.</p>;
  return (
    <>
      <ul className="divide-y divide-hair border-y border-hair">
        {model.spools.map((spool) => {
          const known = spools.find((row) => row.letter === spool.letter);
          return (
            <li key={spool.letter} className="flex flex-wrap items-baseline gap-x-4 gap-y-1 py-2">
              <span className="figure font-medium">{known ? <Link className="inked" href={`/spools/${known.id}`}>Spool {spool.letter}</Link> : `Spool ${spool.letter}`}</span>
              {known ? <StateWord state={known.state} hold={known.hold} /> : null}
              <span className="text-sm text-soft">
                {countText(spool.pieceKeys.length, "piece")}, {countText(weldCount(model, spool.letter), "weld")}
              </span>
              <span className="figure ml-auto text-sm">
                {formatWeight(spool.weightKg, units)}
                {spool.unweighed > 0 ? `, ${countText(spool.unweighed, "part")} without a weight` : ""}
              </span>
              <span className="figure w-full text-xs text-soft">box {spool.boxMm.map((side) => formatLength(side, units)).join(" × ")}</span>
            </li>
          );
        })}
      </ul>
      <p className="py-1 text-xs text-soft">Weight is an empty estimate; the centre of gravity lies off-centre.</p>
    </>
  );
});

function weldCount(model: Model, letter: string): number {
  return model.joints.filter((joint) => joint.spool === letter && joint.number !== null).length;
}
