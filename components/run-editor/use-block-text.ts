"use client";
import { useCallback, useLayoutEffect, useRef } from "react";
import { blockText, isBlock } from "./block";
import { shownText } from "./drafts";
import type { EditorState } from "./editor-types";

/** A steady reader of the block as it stands; null while only one cell is picked out. */
export function useBlockText(state: EditorState): () => string | null {
  const latest = useRef(state);
  useLayoutEffect(() => {
    latest.current = state;
  }, [state]);
  return useCallback(() => {
    const now = latest.current;
    return isBlock(now) ? blockText(now, (target) => shownText(now, target)) : null;
  }, []);
}
