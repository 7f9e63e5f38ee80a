/** A comparison of two revisions as PDF, made when asked for. Nothing is kept of it: it follows from two frozen inputs. */
import { measureText } from "@/fonts/widths";
import { compareSideOf, compareSideWords, composeComparePages } from "@/iso";
import { compareInputs } from "@/lib/queries/compare-inputs";
import { compareRows } from "@/lib/rules/compare-rows";
import type { CompareAsked } from "@/lib/rules/compare-types";
import { plainName } from "@/lib/rules/exchange/file-names";
import type { SessionViewer } from "@/lib/server/session";
import { getObject, objectKey } from "@/lib/server/storage";
import { paintSheet } from "@/pdf/paint-sheet";

/** @throws Refusal as compareInputs does. */
export async function renderCompare(viewer: SessionViewer, spoolId: string, asked: CompareAsked, now: Date): Promise<{ readonly name: string; readonly bytes: Uint8Array }> {
  const { before, after } = await compareInputs(viewer, spoolId, asked, now);
  const rows = compareRows(before, after);
  const [from, to] = [before, after].map((input) => (input.revision.state === "draft" ? "DRAFT" : `rev ${input.revision.code}`)) as [string, string];
  const { logo } = after.titleBlock;
  const bytes = await paintSheet({
    pages: composeComparePages(before, after, { rows }, measureText),
    issuedAt: after.revision.issuedAt,
    title: `${after.document.number} spool ${after.spool}, ${from} compared with ${to}`,
    subject: `Comparison of ${compareSideWords(compareSideOf(before))} with ${compareSideWords(compareSideOf(after))}, for information only`,
    logo: logo === null ? null : await getObject(objectKey(viewer.shopId, logo.key)),
    author: after.titleBlock.shopName,
    keywords: after.revision.auditHead,
  });
  return { name: `${plainName(`${after.document.number}-spool-${after.spool}-comparison-${from}-${to}`)}.pdf`, bytes };
}
