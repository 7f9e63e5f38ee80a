import type { ReactNode } from "react";
import { Mark } from "@/components/ui/mark";

/** The pages before the door: one narrow sheet with the mark at its head and, beside it, what the product is for. */
export function AuthFrame({
  title,
  lead,
  children,
  aside,
}: {
  readonly title: string;
  readonly lead?: ReactNode;
  readonly children: ReactNode;
  readonly aside?: ReactNode;
}) {
  return (
    <div className="mx-auto grid max-w-5xl gap-8 py-4 lg:grid-cols-[minmax(0,28rem)_minmax(0,1fr)] lg:py-10">
      <section className="frame p-6 sm:p-8">
        <h1>{title}</h1>
        <div className="mt-1 mb-5 text-soft">{lead}</div>
        {children}
      </section>
      <div className="lg:pt-8">{aside ?? <WhatItIs />}</div>
    </div>
  );
}

function WhatItIs() {
  return (
    <div>
      <Mark className="mb-4 size-20 text-dye" />
      <p className="max-w-prose text-lg">
        From field dimensions to the sheet a spool is cut, fitted, welded and signed from: isometric, cut list
        with its arithmetic, weld numbers that stick.
      </p>
      <ReadFirst />
    </div>
  );
}

/** The caution of first use. */
export function ReadFirst() {
  return (
    <p className="mt-4 max-w-prose border-l-4 border-caution bg-caution-tint px-4 py-3">
      <strong className="mr-2">Read first.</strong>
      Quarterline is a layout and records aid. Code, WPS, design and acceptance come from the engineer, the
      owner and local law. Verify by tape before cutting.
    </p>
  );
}
