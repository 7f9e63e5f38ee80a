/** Saves a line's survey, when nobody saved another since it was read. The first save makes it. */
import { parseSurveyDocument } from "@/iso";
import { storedSurvey } from "@/lib/queries/survey-detail";
import type { SaveLineResult } from "@/lib/rules/api-types";
import type { SaveSurveyConflict } from "@/lib/rules/survey-api-types";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict, refuseInvalid } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { sha256Text } from "@/lib/server/tokens";
import { Line, Person, Survey } from "@/models";
import { assertNotArchived } from "./save-line";

/** @throws Refusal 404; 400 when it is no survey; 409 SaveSurveyConflict with the newer one, which stays as it is. */
export async function saveSurvey(context: CommandContext, lineId: string, sent: { readonly version: number; readonly document: unknown }): Promise<SaveLineResult> {
  const { viewer, tx, now } = context;
  const shop = inShop(viewer);
  const line = await shop.locked(Line, lineId, tx);
  const document = parseSurveyDocument(sent.document);
  if (document === null) throw refuseInvalid("This is not a survey as this site keeps it.", { document: "This is not a survey as this site keeps it." });
  assertNotArchived(line);
  const stored = await shop.first(Survey, { lineId }, tx);
  const text = JSON.stringify(document);
  // The same text again is a save whose answer was lost on the way, not another hand.
  if (stored && stored.document === text) {
    context.unchanged();
    return { version: stored.version, savedAt: stored.updatedAt.toISOString() };
  }
  if ((stored?.version ?? 0) !== sent.version) throw await conflictOf(stored, context);
  const version = sent.version + 1;
  const values = { document: text, version, updatedAt: now, updatedBy: viewer.personId };
  if (stored) await stored.update(values, { transaction: tx });
  else await shop.add(Survey, { lineId, ...values }, tx);
  context.audit({ type: "survey.saved", data: { lineId, number: line.number, version, sha256: sha256Text(text) } });
  return { version, savedAt: now.toISOString() };
}

async function conflictOf(stored: Survey | null, { tx }: CommandContext) {
  if (stored === null) return refuseConflict("The survey this was based on is no longer there. Load the page again.");
  const person = await Person.findOne({ where: { id: stored.updatedBy }, transaction: tx });
  const by = person?.name ?? "Somebody";
  const body: Omit<SaveSurveyConflict, "message" | "code" | "fields"> = { currentVersion: stored.version, by, at: stored.updatedAt.toISOString(), document: storedSurvey(stored) };
  return refuseConflict(`${by} saved this survey in the meantime. Nothing was saved over it.`, { ...body });
}
