"use client";
import clsx from "clsx";
import { memo, useMemo } from "react";
import { endKeys, jointKeys, legendPicture, LEGEND_WORDS, partKeys, type LegendKey, type Model } from "@/iso";
import { DrawingItems } from "./drawing-items";

/** Pixels a millimetre of a picture takes; pictures reach so far from their middle, mm. */
const PX_PER_MM = 3;
const REACH_MM = 5.5;

export interface LegendStripProps {
  readonly legend: readonly LegendKey[];
  readonly model: Model;
  readonly pointId: string | null;
}

/** The marks this drawing uses, in words; those of the current row stand out and come first. */
export const LegendStrip = memo(function LegendStrip({ legend, model, pointId }: LegendStripProps) {
  const here = useMemo(() => legendAt(model, pointId), [model, pointId]);
  const sorted = useMemo(() => [...legend.filter((key) => here.has(key)), ...legend.filter((key) => !here.has(key))], [legend, here]);
  return (
    <ul aria-label="Legend" tabIndex={0} className="flex max-h-20 flex-wrap gap-x-3 overflow-y-auto pt-1.5 text-xs text-soft max-lg:max-h-28">
      {sorted.map((key) => (
        <li key={key} data-legend-here={here.has(key) || undefined} className={clsx("inline-flex items-center gap-1", here.has(key) && "font-medium text-dye")}>
          <Picture name={key} />
          {LEGEND_WORDS[key]}
        </li>
      ))}
    </ul>
  );
});

const Picture = memo(function Picture({ name }: { readonly name: LegendKey }) {
  const items = useMemo(() => legendPicture(name, [0, 0]), [name]);
  return (
    <svg aria-hidden viewBox={`${-REACH_MM} ${-REACH_MM} ${2 * REACH_MM} ${2 * REACH_MM}`} width={REACH_MM * PX_PER_MM * 1.3} height={REACH_MM * PX_PER_MM * 1.3}>
      <DrawingItems items={items} />
    </svg>
  );
});

/** Keys of what stands at a point and of the leg that ends there. */
export function legendAt(model: Model, pointId: string | null): ReadonlySet<LegendKey> {
  if (pointId === null) return new Set();
  const item = model.document.runs.flatMap((run) => run.points).find((point) => point.id === pointId)?.item ?? null;
  const leg = model.legs.find((each) => each.id === pointId);
  return new Set<LegendKey>([
    ...jointKeys(model.joints.filter((joint) => joint.pointId === pointId)),
    ...partKeys(model.components.filter((component) => component.pointId === pointId), () => item),
    ...endKeys(item ? [item] : []),
    ...(leg?.unverified ? (["unverified"] as const) : []),
    ...(model.pieces.some((piece) => piece.legId === pointId) ? (["cut-piece"] as const) : []),
  ]);
}
