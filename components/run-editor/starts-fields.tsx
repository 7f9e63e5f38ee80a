"use client";
import type { Point } from "@/iso";
import { CommitField } from "./commit-field";
import { readText } from "./length-reader";
import { pointWithStarts, START_KEYS, START_LABEL } from "./starts-entry";

/** What changes from this point on: a specification break, material, insulation, tracing. Folded until something does. */
export function StartsFields({ point, readOnly, onPoint }: { readonly point: Point; readonly readOnly: boolean; readonly onPoint: (point: Point) => void }) {
  return (
    <details open={point.starts !== undefined} className="mt-3 border-t border-hair pt-1">
      <summary className="min-h-9 cursor-pointer py-1 text-sm font-medium text-dye max-sm:min-h-11">From here on: specification, material, insulation, tracing</summary>
      <div className="grid items-end gap-3 pb-2 min-[480px]:grid-cols-2">
        {START_KEYS.map((key) => (
          <CommitField key={`${key}${point.starts?.[key] ?? ""}`} label={START_LABEL[key]} hint="empty = as before" readOnly={readOnly} text={point.starts?.[key] ?? ""} read={readText} onCommit={(text) => onPoint(pointWithStarts(point, { ...point.starts, [key]: text }))} />
        ))}
      </div>
    </details>
  );
}
