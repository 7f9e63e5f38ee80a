/** A package that may be taken, and under which name. */
import { outdatedText } from "@/lib/rules/packages";
import { canDo } from "@/lib/rules/permissions";
import { refuseConflict, refuseForbidden, refuseNotFound } from "@/lib/server/errors";
import type { SessionViewer } from "@/lib/server/session";
import type { Package } from "@/models";
import { outdatedCounts, packageFileName, packageSource, visiblePackage } from "./package-rows";

export interface FoundPackage {
  readonly one: Package;
  readonly objectKey: string;
  readonly bytes: number;
  readonly sha256: string;
  readonly fileName: string;
  readonly type: string;
}

/**
 * @param asRecord also one whose sheets are not all current, which looks current on paper: for those who review, never the bench.
 * @throws Refusal 404; 409 while it is not ready, or not current; 403 for a fitter who wants one that is not.
 */
export async function packageToTake(viewer: SessionViewer, packageId: string, asRecord: boolean): Promise<FoundPackage> {
  const one = await visiblePackage(viewer, packageId);
  const { state, objectKey, bytes, sha256 } = one;
  if (state !== "ready") throw refuseConflict("This package is not ready.");
  if (objectKey === null || bytes === null || sha256 === null) throw refuseNotFound();
  const source = packageSource(one);
  const outdated = (await outdatedCounts(viewer, [packageId])).get(packageId) ?? 0;
  if (outdated > 0) {
    if (!asRecord) throw refuseConflict(`${outdatedText(outdated, source.sheets.length)} Make the package again.`);
    if (!canDo(viewer.role, "revisions.review")) throw refuseForbidden("The bench takes current sheets only. Make the package again.");
  }
  return { one, objectKey, bytes, sha256, fileName: packageFileName(source), type: source.form === "pdf" ? "application/pdf" : "application/zip" };
}
