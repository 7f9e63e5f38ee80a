"use client";
import clsx from "clsx";
import { useMemo, useState } from "react";
import { composeSheet, type MeasureText, type SheetInput, type SheetPage } from "@/iso";
import { measureText } from "@/fonts/widths";
import { ChoiceRow } from "@/components/ui/choice-row";
import { logoAddress } from "@/components/ui/logo-address";
import { Notice } from "@/components/ui/notice";
import { DisplaySvg } from "./display-svg";

export interface SheetPreviewProps {
  readonly input: SheetInput;
  /** Makes the pages; absent = the spool sheet's. */
  readonly pagesOf?: (input: SheetInput, measure: MeasureText) => readonly SheetPage[];
  /** What the sheet is, for a reader who cannot see it. */
  readonly label: string;
}

type Zoom = "fit" | "near" | "close";
const WIDTHS: Readonly<Record<Zoom, string>> = {
  fit: "w-full",
  near: "w-[170%] min-w-[52rem]",
  close: "w-[280%] min-w-[84rem]",
};

/**
 * The sheet as it prints, drawn in the browser by the same core as the PDF: pages to turn, three sizes, and a frame to
 * move it about in. Keyboard: the frame takes focus and the arrow keys scroll it.
 */
export function SheetPreview({ input, label, pagesOf = composeSheet }: SheetPreviewProps) {
  const composed = useMemo(() => compose(input, pagesOf), [input, pagesOf]);
  const [pageNumber, setPageNumber] = useState(0);
  const [zoom, setZoom] = useState<Zoom>("fit");
  if (!composed)
    return <Notice tone="trouble">This sheet cannot be drawn on screen. Open its PDF instead.</Notice>;
  const page = composed[Math.min(pageNumber, composed.length - 1)];
  if (!page) return <Notice>There is nothing on this sheet yet.</Notice>;
  return (
    <div>
      <div className="mb-2 flex flex-wrap items-end justify-between gap-3" data-screen-only>
        <Pages pages={composed} value={pageNumber} onChange={setPageNumber} />
        <ChoiceRow
          label="Size on screen"
          value={zoom}
          onChange={setZoom}
          choices={[
            { value: "fit", label: "Fit" },
            { value: "near", label: "Larger" },
            { value: "close", label: "Largest" },
          ]}
        />
      </div>
      <div
        role="region"
        aria-label={`${label}, ${page.name}`}
        tabIndex={0}
        className={clsx(
          "overflow-auto border border-ink bg-white print:max-h-none print:overflow-visible print:border-0",
          zoom !== "fit" && "max-h-[85dvh]",
        )}
      >
        <div className={clsx(WIDTHS[zoom], "print:w-full print:min-w-0")}>
          <PageSvg page={page} label={`${label}, ${page.name}`} logo={input.titleBlock.logo} />
        </div>
      </div>
    </div>
  );
}

function Pages({
  pages,
  value,
  onChange,
}: {
  readonly pages: readonly SheetPage[];
  readonly value: number;
  readonly onChange: (page: number) => void;
}) {
  if (pages.length < 2) return <span className="text-sm text-soft">1 page</span>;
  return (
    <ChoiceRow
      label="Page"
      value={String(value)}
      onChange={(page) => onChange(Number(page))}
      choices={pages.map((page, n) => ({ value: String(n), label: page.name }))}
    />
  );
}

function PageSvg({
  page,
  label,
  logo,
}: {
  readonly page: SheetPage;
  readonly label: string;
  readonly logo: SheetInput["titleBlock"]["logo"];
}) {
  const box = page.logoBox;
  return (
    <svg
      viewBox={`0 0 ${page.widthMm} ${page.heightMm}`}
      role="img"
      aria-label={label}
      className="drawn block h-auto w-full bg-white"
    >
      <DisplaySvg items={page.items} />
      {box && logo ? (
        <image
          href={logoAddress(logo)}
          x={box.minX}
          y={box.minY}
          width={box.maxX - box.minX}
          height={box.maxY - box.minY}
          preserveAspectRatio="xMidYMid meet"
        />
      ) : null}
    </svg>
  );
}

/** null when the core cannot compose it; the frozen PDF is still there then. */
function compose(input: SheetInput, pagesOf: NonNullable<SheetPreviewProps["pagesOf"]>): readonly SheetPage[] | null {
  try {
    return pagesOf(input, measureText);
  } catch {
    return null;
  }
}
