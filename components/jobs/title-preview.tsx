"use client";
import { useDeferredValue, useMemo, useState } from "react";
import { composeSheet, emptyMarks, inkBounds, newRunDocument, type LineSettings, type PaperBox, type Point, type RunDocument, type SheetInput, type SheetPage, type SheetSize, type TitleBlock } from "@/iso";
import { measureText } from "@/fonts/widths";
import { DisplaySvg } from "@/components/sheet/display-svg";
import { ChoiceRow } from "@/components/ui/choice-row";
import { logoAddress } from "@/components/ui/logo-address";
import { Notice } from "@/components/ui/notice";

export interface TitlePreviewProps {
  readonly titleBlock: TitleBlock;
  /** A logo that is chosen but not sent yet; null = the one in use. */
  readonly chosenLogo: string | null;
  readonly size: SheetSize;
  readonly settings: LineSettings;
  /** A line of the job to draw it with; null = a made-up one. */
  readonly line: { readonly document: RunDocument; readonly spool: string } | null;
}

/** The first page as it would print with what is typed right now. */
export function TitlePreview({ titleBlock, chosenLogo, size, settings, line }: TitlePreviewProps) {
  const [part, setPart] = useState<"block" | "page">("block");
  const deferred = useDeferredValue(titleBlock);
  const logo = useMemo<TitleBlock["logo"]>(() => (chosenLogo ? { key: "chosen", type: "image/png" } : deferred.logo), [chosenLogo, deferred.logo]);
  const page = useMemo(() => firstPage({ ...deferred, logo }, size, settings, line), [deferred, logo, size, settings, line]);
  return (
    <div>
      <div className="mb-2 flex flex-wrap items-end justify-between gap-3">
        <h3>As it would print</h3>
        <ChoiceRow label="What to show" value={part} onChange={setPart} choices={[{ value: "block", label: "Title block" }, { value: "page", label: "Whole page" }]} />
      </div>
      <p className="mb-2 text-sm text-soft">{line ? `With line ${line.document.number} of this job, ` : "With a made-up line, "}as typed above, saved or not.</p>
      {page ? <PageSvg page={page} href={chosenLogo ?? (logo ? logoAddress(logo) : null)} whole={part === "page"} /> : <Notice tone="trouble">This page cannot be drawn on screen.</Notice>}
    </div>
  );
}

function PageSvg({ page, href, whole }: { readonly page: SheetPage; readonly href: string | null; readonly whole: boolean }) {
  const block = useMemo(() => blockBounds(page), [page]);
  const logo = page.logoBox;
  const box = whole ? `0 0 ${page.widthMm} ${page.heightMm}` : `${block.minX - AROUND} ${block.minY - AROUND} ${block.maxX - block.minX + 2 * AROUND} ${block.maxY - block.minY + 2 * AROUND}`;
  return (
    <div className="overflow-x-auto border border-ink bg-white" role="region" aria-label="Preview of the title block" tabIndex={0}>
      <svg viewBox={box} role="img" aria-label={whole ? "First page as it would print" : "Title block as it would print"} className="drawn block h-auto w-full min-w-[34rem] bg-white">
        <DisplaySvg items={page.items} />
        {logo && href ? <image href={href} x={logo.minX} y={logo.minY} width={logo.maxX - logo.minX} height={logo.maxY - logo.minY} preserveAspectRatio="xMidYMid meet" /> : null}
      </svg>
    </div>
  );
}

/** Shown round the title block, mm. */
const AROUND = 3;

/** A framed box higher than this share of the page is a column, no part of the title block. */
const HIGHEST = 0.6;

/** Where the title block stands: the framed boxes that are neither as wide as the paper's own frame nor a whole column. */
function blockBounds(page: SheetPage): PaperBox {
  const frames = page.items.filter((item) => item.layer === "frame").map((item) => inkBounds([item], measureText));
  const widest = Math.max(...frames.map((box) => box.maxX - box.minX));
  const parts = frames.filter((box) => box.maxX - box.minX < widest - 1 && box.maxY - box.minY < HIGHEST * page.heightMm);
  return parts.reduce((all, box) => ({ minX: Math.min(all.minX, box.minX), minY: Math.min(all.minY, box.minY), maxX: Math.max(all.maxX, box.maxX), maxY: Math.max(all.maxY, box.maxY) }), parts[0] ?? { minX: 0, minY: 0, maxX: page.widthMm, maxY: page.heightMm });
}

function firstPage(titleBlock: TitleBlock, size: SheetSize, settings: LineSettings, line: TitlePreviewProps["line"]): SheetPage | null {
  try {
    return composeSheet(previewInput(titleBlock, size, line ?? { document: madeUpLine(settings), spool: "A" }), measureText)[0] ?? null;
  } catch {
    return null;
  }
}

function previewInput(titleBlock: TitleBlock, size: SheetSize, { document, spool }: NonNullable<TitlePreviewProps["line"]>): SheetInput {
  return {
    version: 1, document, marks: emptyMarks(), takeOuts: [], spool, size, units: document.settings.units, titleBlock,
    revision: {
      sheetNumber: "0001", code: "A", state: "draft", hold: false, rows: [], drawnBy: "Drafter", checkedBy: "", issuedAt: "", statusUrl: "", auditHead: "", changedPointIds: [], accepted: [],
    },
  };
}

/** A flange, a corner and an open end. */
function madeUpLine(settings: LineSettings): RunDocument {
  const document = newRunDocument("LINE-1", settings);
  const mm = (value: number) => ({ text: `${value}mm`, mm: value });
  const point = (id: string, at: readonly [number, number, number], item: Point["item"]): Point => ({
    id, item, offset: { kind: "enu", e: mm(at[0]), n: mm(at[1]), u: mm(at[2]) }, places: {}, trimMm: null, note: "",
    provenance: { kind: "from-drawing", toleranceMm: null, by: null, at: null, second: null },
  });
  const points = [
    point("a", [0, 0, 0], { kind: "flange", flange: "weld-neck", ratingClass: null, boltHoles: "straddle", gasketSide: "after", goes: "nozzle", text: "N1" }),
    point("b", [1500, 0, 0], { kind: "none" }), point("c", [0, 0, 1200], { kind: "end", goes: "open", text: "" }),
  ];
  return { ...document, runs: [{ ...document.runs[0]!, points }] };
}
