"use client";
/** What the pointer rests on, kept beside React's state so that moving it renders nothing but what shows it. */
import { useSyncExternalStore } from "react";

export class PointedStore {
  private pointId: string | null = null;
  private readonly listeners = new Set<() => void>();

  readonly now = (): string | null => this.pointId;

  set(pointId: string | null): void {
    if (pointId === this.pointId) return;
    this.pointId = pointId;
    this.listeners.forEach((tell) => tell());
  }

  readonly listen = (tell: () => void): (() => void) => {
    this.listeners.add(tell);
    return () => this.listeners.delete(tell);
  };
}

/** Point of the row or cut the pointer rests on; null elsewhere. */
export function usePointed(store: PointedStore): string | null {
  return useSyncExternalStore(store.listen, store.now, () => null);
}

/** Id of the row's point an event came from; null for an empty row. */
export function pointUnder(target: EventTarget | null): string | null {
  const row = target instanceof Element ? target.closest("[data-row]")?.getAttribute("data-row") : null;
  return row && row !== "new" ? row : null;
}
