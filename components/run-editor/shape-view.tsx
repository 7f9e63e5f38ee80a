"use client";
import { useEffect, useMemo, useRef, useState, type KeyboardEvent } from "react";
import type { Model } from "@/iso";
import { ShapeScene } from "./shape-scene";
import { shapeParts } from "./shape-parts";

export const NO_WEBGL = "This browser shows no 3D (WebGL is missing or switched off). The isometric and the sheet need none; try another browser to check the shape by eye.";

/** The true shape to turn about: by mouse, finger, arrow keys, plus, minus and 0. Closing it gives everything back. */
export function ShapeView({ model, activePointId }: { readonly model: Model; readonly activePointId: string | null }) {
  const frame = useRef<HTMLDivElement>(null);
  const scene = useRef<ShapeScene | null>(null);
  const [missing, setMissing] = useState(false);
  const parts = useMemo(() => shapeParts(model), [model]);
  useEffect(() => {
    const box = frame.current;
    if (!box) return;
    const canvas = document.createElement("canvas");
    canvas.className = "absolute inset-0 size-full touch-none";
    const made = openScene(canvas);
    if (!made) return queueMicrotask(() => setMissing(true));
    box.append(canvas);
    scene.current = made;
    const fitBox = (): void => made.resize(box.clientWidth, box.clientHeight, window.devicePixelRatio);
    fitBox();
    const watch = new ResizeObserver(fitBox);
    watch.observe(box);
    return () => {
      watch.disconnect();
      scene.current = null;
      made.close();
      canvas.remove();
    };
  }, []);
  useEffect(() => scene.current?.show(parts, activePointId), [parts, activePointId]);
  if (missing) return <p className="frame grid min-h-64 flex-1 place-items-center p-6 text-center">{NO_WEBGL}</p>;
  return (
    <section aria-label="True shape" className="flex min-h-0 min-w-0 flex-1 flex-col">
      <p className="pb-1.5 text-sm text-soft">True to size, to check the shape by eye. Drag to turn, two fingers or the wheel to move closer; flanges and valves are simple bodies.</p>
      <div
        ref={frame}
        tabIndex={0}
        role="img"
        aria-label={`True shape of line ${model.document.number}. The arrow keys turn it, plus and minus move closer and wider, 0 shows all.`}
        onKeyDown={(event) => scene.current && keyed(event, scene.current)}
        className="frame relative min-h-0 overflow-hidden max-lg:h-[min(88vw,65dvh)] lg:flex-1"
      />
      <div data-screen-only role="group" aria-label="Look" className="flex flex-wrap gap-1 pt-1.5">
        <LookKey label="Left" onPress={() => scene.current?.turn(-1, 0)} />
        <LookKey label="Right" onPress={() => scene.current?.turn(1, 0)} />
        <LookKey label="Higher" onPress={() => scene.current?.turn(0, 1)} />
        <LookKey label="Lower" onPress={() => scene.current?.turn(0, -1)} />
        <LookKey label="Closer" onPress={() => scene.current?.zoom(1)} />
        <LookKey label="Wider" onPress={() => scene.current?.zoom(-1)} />
        <LookKey label="Show all" onPress={() => scene.current?.fit()} />
      </div>
    </section>
  );
}

function LookKey({ label, onPress }: { readonly label: string; readonly onPress: () => void }) {
  return (
    <button type="button" onClick={onPress} className="min-h-9 border border-rule bg-sheet px-2.5 text-sm hover:border-dye max-sm:min-h-11">
      {label}
    </button>
  );
}

/** null where the browser gives no WebGL; asked for first, so that nothing is reported as broken. */
function openScene(canvas: HTMLCanvasElement): ShapeScene | null {
  try {
    if (!canvas.getContext("webgl2", { antialias: true })) return null;
    return new ShapeScene(canvas);
  } catch {
    return null;
  }
}

function keyed(event: KeyboardEvent, scene: ShapeScene): void {
  const does: Readonly<Record<string, () => void>> = {
    ArrowLeft: () => scene.turn(-1, 0), ArrowRight: () => scene.turn(1, 0), ArrowUp: () => scene.turn(0, 1), ArrowDown: () => scene.turn(0, -1),
    "+": () => scene.zoom(1), "=": () => scene.zoom(1), "-": () => scene.zoom(-1), "0": () => scene.fit(),
  };
  const act = does[event.key];
  if (!act) return;
  event.preventDefault();
  act();
}
