"use client";
import { useEffect, useState, type ReactNode } from "react";
import { createPortal } from "react-dom";

/** Content that exists for the printer only: while `printing` it is all that the page prints. */
export function PrintPart({
  printing,
  onPrinted,
  children,
}: {
  readonly printing: boolean;
  readonly onPrinted: () => void;
  readonly children: ReactNode;
}) {
  const [host, setHost] = useState<HTMLElement | null>(null);
  useEffect(() => {
    if (!printing) return;
    const made = document.createElement("div");
    made.dataset.printPart = "";
    document.body.append(made);
    document.documentElement.dataset.printing = "part";
    setHost(made);
    return () => {
      delete document.documentElement.dataset.printing;
      made.remove();
      setHost(null);
    };
  }, [printing]);
  useEffect(() => {
    if (!host) return;
    window.addEventListener("afterprint", onPrinted, { once: true });
    const timer = setTimeout(() => window.print(), 100);
    return () => {
      clearTimeout(timer);
      window.removeEventListener("afterprint", onPrinted);
    };
  }, [host, onPrinted]);
  return host ? createPortal(children, host) : null;
}
