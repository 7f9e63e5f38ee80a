"use client";
import type { ReactNode } from "react";
import { buttonClass } from "@/components/ui/button";
import type { LineDetail } from "@/lib/rules/api-types";

const LISTS = [
  { what: "materials", name: "Materials" }, { what: "cuts", name: "Cut list" }, { what: "welds", name: "Weld list" },
] as const;

export type Of = "issued" | "draft";

/** One link to a file; the browser saves it. */
export function FileLink({ href, label, about }: { readonly href: string; readonly label: string; readonly about: string }) {
  return (
    <a className={buttonClass()} href={href} download aria-label={`${about} as ${label}`}>
      {label}
    </a>
  );
}

/** What a file holds, and the forms it comes in. */
export function FileRow({ name, children }: { readonly name: ReactNode; readonly children: ReactNode }) {
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-hair py-2">
      <span className="font-medium">{name}</span>
      <span className="flex flex-wrap gap-2">{children}</span>
    </li>
  );
}

/** The lists of a place that hands them out. */
export function ListRows({ path, of, scope }: { readonly path: string; readonly of: Of; readonly scope: string }) {
  return LISTS.map(({ what, name }) => (
    <FileRow key={what} name={name}>
      {(["csv", "xlsx"] as const).map((as) => (
        <FileLink key={as} href={`${path}?what=${what}&as=${as}&of=${of}`} label={as.toUpperCase()} about={`${name} ${scope}`} />
      ))}
    </FileRow>
  ));
}

/** Files of a whole line: its points, and the lists of all its spools. */
export function LineFiles({ line }: { readonly line: LineDetail }) {
  const path = `/api/lines/${line.id}/export`;
  const issued = line.spools.some((spool) => spool.state === "for-fabrication" || spool.state === "as-built");
  return (
    <>
      <p className="mb-4 text-soft">Files hold what is saved of the line. A draft says DRAFT in its name and in every row.</p>
      <ul>
        <FileRow name="Points, to be brought in again">
          <FileLink href={`${path}?what=points&as=csv`} label="CSV" about="Points" />
        </FileRow>
      </ul>
      <h3 className="mt-6 mb-1 font-bold">All spools as they are now (DRAFT)</h3>
      <ul>
        <ListRows path={path} of="draft" scope="of all spools as they are now" />
      </ul>
      {issued ? (
        <>
          <h3 className="mt-6 mb-1 font-bold">Issued spools</h3>
          <ul>
            <ListRows path={path} of="issued" scope="of all issued spools" />
          </ul>
        </>
      ) : null}
    </>
  );
}
