"use client";
import { useEffect } from "react";
import type { Send } from "./editor-context";

/** Undo and redo outside the grid's cells and other fields, which have their own. */
export function useUndoKeys(send: Send, enabled: boolean): void {
  useEffect(() => {
    if (!enabled) return;
    const onKey = (event: KeyboardEvent): void => {
      if (!(event.ctrlKey || event.metaKey) || event.defaultPrevented) return;
      const target = event.target as Element | null;
      if (target?.closest("input, textarea, select, dialog")) return;
      const key = event.key.toLowerCase();
      if (key !== "z" && key !== "y") return;
      event.preventDefault();
      send({ type: key === "y" || event.shiftKey ? "redo" : "undo" });
    };
    window.addEventListener("keydown", onKey);
    return () => window.removeEventListener("keydown", onKey);
  }, [send, enabled]);
}
