"use client";
import { useCallback, useReducer } from "react";
import type { RunDocument } from "@/iso";
import type { Send } from "./editor-context";
import { freshId } from "./editor-ids";
import { editorReducer, initialState } from "./editor-state";
import type { EditorAction, EditorState, Stamp } from "./editor-types";

/** Ids that come with an ordinary action; a paste brings one per line. */
const IDS_PER_ACTION = 6;

/** Who, when, and fresh ids, for one action. */
export function makeStamp(by: string, lines = 0): Stamp {
  const ids = Array.from({ length: IDS_PER_ACTION + lines }, () => freshId("p"));
  return { by, at: new Date().toISOString().slice(0, 10), ids, branchId: freshId("r") };
}

/** The editor's state with a sender that stamps each action. */
export function useEditorState(document: RunDocument, by: string, editable: boolean): readonly [EditorState, Send] {
  const [state, dispatch] = useReducer(editorReducer, document, (first) => initialState(first, makeStamp(by), editable));
  const send = useCallback<Send>(
    (intent) => {
      const lines = intent.type === "paste" ? intent.text.split("\n").length : 0;
      dispatch({ ...intent, stamp: makeStamp(by, lines) } as EditorAction);
    },
    [by],
  );
  return [state, send];
}
