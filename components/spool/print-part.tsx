"use client";
import { useEffect, useState, type ReactNode } from "react";
import { createPortal } from "react-dom";

/** Time for the browser to set the content before it is asked to print, ms. */
const SETTLE_MS = 100;

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
  const [host] = useState(makeHost);
  useEffect(() => {
    if (!printing || !host) return;
    document.body.append(host);
    document.documentElement.dataset.printing = "part";
    window.addEventListener("afterprint", onPrinted, { once: true });
    const timer = setTimeout(() => window.print(), SETTLE_MS);
    return () => {
      clearTimeout(timer);
      window.removeEventListener("afterprint", onPrinted);
      delete document.documentElement.dataset.printing;
      host.remove();
    };
  }, [printing, host, onPrinted]);
  return printing && host ? createPortal(children, host) : null;
}

/** null on the server, which prints nothing. */
function makeHost(): HTMLElement | null {
  if (typeof document === "undefined") return null;
  const host = document.createElement("div");
  host.dataset.printPart = "";
  return host;
}
