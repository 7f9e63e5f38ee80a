/** Cutting plans as pages show them, and offcuts on the rack. Who sees issued sheets only sees plans of issued sheets only. */
import { inShop, type ShopMember } from "@/lib/server/scope";
import { refuseNotFound } from "@/lib/server/errors";
import type { SessionViewer } from "@/lib/server/session";
import type { NestDetail, NestResult, NestRow, NestSource, OffcutRow } from "@/lib/rules/nest-plans";
import { Job, Nest, Offcut } from "@/models";
import { seesIssuedOnly } from "./jobs";
import { nestChanges } from "./nest-source";
import { peopleNames } from "./people-names";

/** The job's plans, the newest first. @throws Refusal 404. */
export async function nestRows(viewer: SessionViewer, jobId: string): Promise<NestRow[]> {
  await inShop(viewer).one(Job, jobId);
  const nests = await inShop(viewer).all(Nest, { jobId }, null, { order: [["askedAt", "DESC"]], limit: 200 });
  const shown = nests.filter((nest) => maySee(viewer, sourceOf(nest)));
  const name = await peopleNames(shown.map((nest) => nest.askedBy));
  return shown.map((nest) => rowOf(nest, name(nest.askedBy)));
}

/** @throws Refusal 404, also for a plan with drafts in it to who sees issued sheets only. */
export async function nestDetail(viewer: SessionViewer, nestId: string): Promise<NestDetail> {
  const nest = await inShop(viewer).one(Nest, nestId);
  const source = sourceOf(nest);
  if (!maySee(viewer, source)) throw refuseNotFound();
  const job = await inShop(viewer).one(Job, nest.jobId);
  const name = await peopleNames([nest.askedBy, nest.cutBy]);
  const result = resultOf(nest);
  return {
    ...rowOf(nest, name(nest.askedBy)), jobId: job.id, jobNumber: job.number, source, result,
    progress: nest.progress === "" ? null : (JSON.parse(nest.progress) as NestDetail["progress"]),
    cutBy: nest.cutBy === null ? "" : name(nest.cutBy), cutAt: nest.cutAt?.toISOString() ?? null,
    stale: nest.state === "done" ? await nestChanges(viewer, source, stockUsed(result)) : [],
  };
}

export function sourceOf(nest: Pick<Nest, "source">): NestSource {
  return JSON.parse(nest.source) as NestSource;
}

export function resultOf(nest: Pick<Nest, "result">): NestResult | null {
  return nest.result === null ? null : (JSON.parse(nest.result) as NestResult);
}

/** How many of each stock a plan takes. */
export function stockUsed(result: NestResult | null): ReadonlyMap<string, number> {
  const used = new Map<string, number>();
  for (const group of result?.groups ?? []) for (const bar of group.bars) used.set(bar.stockId, (used.get(bar.stockId) ?? 0) + 1);
  return used;
}

function maySee(viewer: SessionViewer, source: NestSource): boolean {
  return !seesIssuedOnly(viewer) || source.spools.every((spool) => spool.revisionId !== null);
}

function rowOf(nest: Nest, askedBy: string): NestRow {
  const pieces = sourceOf(nest).groups.reduce((sum, group) => sum + group.pieces.length, 0);
  return { id: nest.id, title: nest.title, state: nest.state, askedBy, askedAt: nest.askedAt.toISOString(), pieces };
}


/** Offcuts on the rack, by size, the longest first. */
export async function offcutRows(member: ShopMember): Promise<OffcutRow[]> {
  const rows = await inShop(member).all(Offcut, { goneAt: null }, null, { order: [["nps", "ASC"], ["lengthMm", "DESC"], ["id", "ASC"]] });
  const name = await peopleNames(rows.map((row) => row.addedBy));
  return rows.map(({ id, nps, schedule, material, lengthMm, heat, addedBy, addedAt }) => ({ id, nps, schedule, material, lengthMm, heat, addedBy: name(addedBy), addedAt: addedAt.toISOString() }));
}
