/**
 * Who may do what: the one table every wrapper, page and test reads. Pure. A refusal by another rule (never one's own
 * revision, the last owner) is stated where that rule lives.
 */
import type { Role, WorkKind } from "./api-types";

export const PERMISSIONS = {
  /** People, settings, title block, stock: everyone reads, the owner changes. */
  "shop.read": ["owner", "detailer", "inspector", "fitter"],
  "shop.change": ["owner"],
  /** The log names lines and spools that are not issued yet, so the bench does not read it. */
  "log.read": ["owner", "detailer", "inspector"],
  /** Everyone has a list of jobs; a fitter's holds issued spools only. */
  "jobs.list": ["owner", "detailer", "inspector", "fitter"],
  "lines.read": ["owner", "detailer", "inspector"],
  "lines.change": ["owner", "detailer"],
  "issued.read": ["owner", "detailer", "inspector", "fitter"],
  "sheets.print": ["owner", "detailer", "inspector", "fitter"],
  /** Copies out of use: fitters mark their own, which the command sees to. */
  "copies.withdraw": ["owner", "detailer", "inspector", "fitter"],
  "take-outs.change": ["owner"],
  /** Packages are prints of many sheets at once: whoever prints one sheet makes them. A fitter's hold issued sheets only. */
  "packages.make": ["owner", "detailer", "inspector", "fitter"],
  /** What was sent to a client and acknowledged is not the bench's to write. */
  "packages.receipt": ["owner", "detailer", "inspector"],
  "nests.read": ["owner", "detailer", "inspector", "fitter"],
  "nests.change": ["owner", "detailer"],
  "revisions.review": ["owner", "detailer", "inspector"],
  "revisions.submit": ["owner", "detailer"],
  "revisions.decide": ["owner", "inspector"],
  "revisions.hold": ["owner", "inspector"],
  "work.record": ["owner", "detailer", "inspector", "fitter"],
  /** Whoever holds the tape: readings of a line, and its photos. */
  "surveys.change": ["owner", "detailer", "inspector", "fitter"],
} as const satisfies Record<string, readonly Role[]>;

export type Permission = keyof typeof PERMISSIONS;

/** Whether a role has a permission. */
export function canDo(role: Role, permission: Permission): boolean {
  return (PERMISSIONS[permission] as readonly Role[]).includes(role);
}

const WORK: Readonly<Record<WorkKind, readonly Role[]>> = {
  cut: ["owner", "inspector", "fitter"],
  "fit-up": ["owner", "inspector", "fitter"],
  weld: ["owner", "inspector", "fitter"],
  visual: ["owner", "inspector"],
  actual: ["owner", "detailer", "inspector", "fitter"],
};

/** Whether a role may record this kind of work: the weld log is the inspector's, own entries the fitter's, bench actuals everyone's. */
export function canRecord(role: Role, kind: WorkKind): boolean {
  return WORK[kind].includes(role);
}

const REFUSALS: Readonly<Record<Permission, string>> = {
  "shop.read": "You do not belong to this shop.",
  "shop.change": "Only the owner changes people, settings and stock.",
  "log.read": "Fitters do not read the shop's log.",
  "jobs.list": "You do not belong to this shop.",
  "lines.read": "Fitters see issued sheets only.",
  "lines.change": "Only a detailer or the owner changes jobs, lines and runs.",
  "issued.read": "You do not belong to this shop.",
  "sheets.print": "You do not belong to this shop.",
  "copies.withdraw": "You do not belong to this shop.",
  "take-outs.change": "Only the owner confirms or replaces a take-out.",
  "packages.make": "You do not belong to this shop.",
  "packages.receipt": "Fitters do not note what a recipient acknowledged.",
  "nests.read": "You do not belong to this shop.",
  "nests.change": "Only a detailer or the owner makes cutting plans and locks them.",
  "revisions.review": "Fitters see issued sheets only.",
  "revisions.submit": "Only a detailer or the owner submits a revision.",
  "revisions.decide": "Only an inspector or the owner signs or returns a revision.",
  "revisions.hold": "Only an inspector or the owner holds, releases or voids a revision.",
  "work.record": "You do not belong to this shop.",
  "surveys.change": "You do not belong to this shop.",
};

/** The sentence a refused person reads. */
export function refusalOf(permission: Permission): string {
  return REFUSALS[permission];
}

const WORK_REFUSALS: Readonly<Record<WorkKind, string>> = {
  cut: "Detailers read the cut log; the bench and the inspector write it.",
  "fit-up": "Detailers read the fit-up log; the bench and the inspector write it.",
  weld: "Detailers read the weld log; the bench and the inspector write it.",
  visual: "Only an inspector or the owner records a visual examination.",
  actual: "You do not belong to this shop.",
};

/** The sentence someone reads who may not record this kind of work. */
export function workRefusalOf(kind: WorkKind): string {
  return WORK_REFUSALS[kind];
}
