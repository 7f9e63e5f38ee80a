"use client";
import { useMemo, useState } from "react";
import { compareSideOf, compareSideWords, type CompareRow, type SheetInput } from "@/iso";
import { ChoiceRow } from "@/components/ui/choice-row";
import { EmptyState } from "@/components/ui/empty-state";
import { countText } from "@/components/ui/format";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { fitViewport, type Viewport } from "@/components/run-editor/viewport";
import { compareRows } from "@/lib/rules/compare-rows";
import { CompareDrawing } from "./compare-drawing";
import { boundsOf, compareViews, type CompareViews } from "./compare-views";
import { DifferenceList } from "./difference-list";
import { OverlayKey } from "./overlay-key";

type Way = "overlay" | "beside";

/** A chosen pair: its drawings beside the list, each finding the other. */
export function ComparedPair({ before, after }: { readonly before: SheetInput; readonly after: SheetInput }) {
  const rows = useMemo(() => compareRows(before, after), [before, after]);
  const views = useMemo(() => compareViews(before, after, rows), [before, after, rows]);
  const [way, setWay] = useState<Way>("overlay");
  const [current, setCurrent] = useState<number | null>(null);
  const [pointed, setPointed] = useState<number | null>(null);
  const picks = { rows, current, pointed, onCurrent: setCurrent, onPointed: setPointed };
  return (
    <div className="grid gap-x-8 gap-y-6 xl:grid-cols-[minmax(0,2.2fr)_minmax(20rem,1fr)]">
      <div className="min-w-0">
        <div className="mb-2" data-screen-only>
          <ChoiceRow label="How to compare" value={way} onChange={setWay} choices={[{ value: "overlay", label: "Overlay" }, { value: "beside", label: "Side by side" }]} />
        </div>
        {views === null ? (
          <Notice tone="trouble">These two cannot be drawn on screen. The list and the stored PDFs still stand.</Notice>
        ) : way === "overlay" ? (
          <Overlay views={views} picks={picks} />
        ) : (
          <Beside views={views} picks={picks} labels={[sideLabel(before), sideLabel(after)]} />
        )}
        <p className="mt-2 text-sm text-soft">For information only. Cut, fit and weld from the sheet in force, never from a comparison. Not to scale.</p>
      </div>
      <Section title="Differences" className="min-w-0" aside={<span className="text-soft">{countText(rows.length, "difference")}</span>}>
        {rows.length === 0 ? (
          <EmptyState title="Nothing differs">Points, pieces, welds, materials, settings and notes are the same in both.</EmptyState>
        ) : (
          <DifferenceList {...picks} />
        )}
      </Section>
    </div>
  );
}

function sideLabel(input: SheetInput): string {
  const words = compareSideWords(compareSideOf(input));
  return words.charAt(0).toUpperCase() + words.slice(1);
}

interface Picks {
  readonly rows: readonly CompareRow[];
  readonly current: number | null;
  readonly pointed: number | null;
  readonly onCurrent: (no: number | null) => void;
  readonly onPointed: (no: number | null) => void;
}

function Overlay({ views: { overlay }, picks }: { readonly views: CompareViews; readonly picks: Picks }) {
  const fitted = useMemo(() => fitViewport(overlay.bounds), [overlay]);
  const [look, setLook] = useState<Viewport | null>(null);
  return (
    <>
      <CompareDrawing {...picks} drawing={overlay} side="both" label="Overlay of both revisions" shown={look ?? fitted} close={look !== null} onLook={setLook} className="h-[62dvh] min-h-72 max-sm:h-[46dvh]" />
      <OverlayKey />
    </>
  );
}

function Beside({ views: { before, after }, picks, labels }: { readonly views: CompareViews; readonly picks: Picks; readonly labels: readonly [string, string] }) {
  const fitted = useMemo(() => fitViewport(boundsOf([before, after])), [before, after]);
  const [look, setLook] = useState<Viewport | null>(null);
  const shared = { ...picks, shown: look ?? fitted, close: look !== null, onLook: setLook, className: "h-[58dvh] min-h-72 max-md:h-[44dvh]" };
  return (
    <div className="grid gap-3 md:grid-cols-2">
      <figure className="min-w-0">
        <figcaption className="mb-1 font-medium">{labels[0]}</figcaption>
        <CompareDrawing {...shared} drawing={before} side="before" label={`Drawing of ${labels[0]}`} />
      </figure>
      <figure className="min-w-0">
        <figcaption className="mb-1 font-medium">{labels[1]}</figcaption>
        <CompareDrawing {...shared} drawing={after} side="after" label={`Drawing of ${labels[1]}`} />
      </figure>
      <p className="text-sm text-soft md:col-span-2">Clouds stand round what differs. Both drawings move together.</p>
    </div>
  );
}
