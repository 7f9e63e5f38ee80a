"use client";
/** How the parts of the editor send actions: without the stamp, which the editor adds. */
import { createContext, useContext } from "react";
import { PointedStore } from "./pointed-store";
import type { EditorAction } from "./editor-types";

type WithoutStamp<A> = A extends { readonly stamp: unknown } ? Omit<A, "stamp"> : A;
export type EditorIntent = WithoutStamp<EditorAction>;
export type Send = (intent: EditorIntent) => void;

export interface EditorDoors {
  readonly send: Send;
  readonly openHelp: () => void;
  readonly readOnly: boolean;
  /** The block as tab-separated text; null while only one cell is picked out. */
  readonly blockText: () => string | null;
  /** What the pointer rests on. */
  readonly pointed: PointedStore;
}

export const EditorContext = createContext<EditorDoors>({ send: () => undefined, openHelp: () => undefined, readOnly: true, blockText: () => null, pointed: new PointedStore() });

export function useEditor(): EditorDoors {
  return useContext(EditorContext);
}
