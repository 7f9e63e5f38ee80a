import type { Role, Viewer } from "@/lib/rules/api-types";

export interface Place {
  readonly href: string;
  readonly label: string;
}

/** Paths that need no sign-in; they carry a bare head with the mark only. */
const PUBLIC = ["/sign-in", "/sign-up", "/invitation", "/reset", "/status"] as const;

export function isPublicPath(path: string): boolean {
  return PUBLIC.some((prefix) => path === prefix || path.startsWith(`${prefix}/`));
}

/** Places a viewer may go to, in order of use for the role; what a role may not see is not there. */
export function placesFor(viewer: Pick<Viewer, "role" | "demo">): readonly Place[] {
  const jobs = { href: "/jobs", label: "Jobs" };
  const bench = { href: "/bench", label: "Bench" };
  const shop = { href: "/shop", label: "Shop" };
  const outbox = viewer.demo ? [{ href: "/outbox", label: "Outbox" }] : [];
  return viewer.role === "fitter" ? [bench, jobs, shop, ...outbox] : [jobs, bench, shop, ...outbox];
}

/** Where a role starts its day. */
export function homeOf(role: Role): string {
  return role === "fitter" ? "/bench" : "/jobs";
}

/** The place a path belongs to: lines, spools, reviews, cutting plans and packages are parts of a job. */
export function placeOfPath(path: string): string {
  if (/^\/(lines|spools|review|nests|packages)(\/|$)/.test(path)) return "/jobs";
  return `/${path.split("/")[1] ?? ""}`;
}

export const ROLE_WORDS: Readonly<Record<Role, string>> = {
  owner: "Owner",
  detailer: "Detailer",
  inspector: "Inspector",
  fitter: "Fitter",
};
