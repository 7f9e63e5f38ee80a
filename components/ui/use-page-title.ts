"use client";
import { useEffect } from "react";

/** Puts what the page shows into the window's title, once it is known: tabs of ten lines are told apart. */
export function usePageTitle(text: string): void {
  useEffect(() => {
    document.title = `${text} - Quarterline`;
  }, [text]);
}
