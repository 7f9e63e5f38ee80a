"use client";
import type { SheetSize } from "@/iso";
import { buttonClass } from "@/components/ui/button";

export interface BenchLinksProps {
  readonly spoolId: string;
  readonly issued: boolean;
  /** null takes the size of the issued sheet. */
  readonly size: SheetSize | null;
  /** Large targets, for gloves. */
  readonly big?: boolean;
}

const KINDS = [
  { kind: "layout", label: "Bench pages", about: "Turns laid out with their marks, and check dimensions (PDF)" },
  { kind: "templates", label: "Templates", about: "True-scale wrap-around templates; print at 100 % (PDF)" },
] as const;

/** The papers a fitter lays out from: bench pages and templates, issued or as they would be now. */
export function BenchLinks({ spoolId, issued, size, big }: BenchLinksProps) {
  return KINDS.map(({ kind, label, about }) => (
    <a
      key={kind}
      className={buttonClass("plain", big ?? false)}
      href={`/api/spools/${spoolId}/bench?kind=${kind}&of=${issued ? "issued" : "draft"}${size ? `&size=${size}` : ""}`}
      target="_blank"
      rel="noreferrer"
      title={about}
    >
      {label}
    </a>
  ));
}
