"use client";
import { lazy, Suspense } from "react";
import type { Model } from "@/iso";

const ShapeView = lazy(() => import("./shape-view").then(({ ShapeView: view }) => ({ default: view })));

/** The true-shape view; its code is fetched only when it is opened. */
export function ShapeDoor({ model, activePointId }: { readonly model: Model; readonly activePointId: string | null }) {
  return (
    <Suspense fallback={<p className="frame grid min-h-64 flex-1 place-items-center p-6 text-soft">Opening the true shape</p>}>
      <ShapeView model={model} activePointId={activePointId} />
    </Suspense>
  );
}
