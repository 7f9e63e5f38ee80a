/**
 * The events of a shop's log, typed one by one, and the sentence each is shown as. What an event holds is ids, and
 * the words a reader needs to know what it was about.
 */
import { z } from "zod";

const id = z.string().max(80);
const words = z.string().max(2_000);
const role = z.enum(["owner", "detailer", "inspector", "fitter"]);
const onRevision = { revisionId: id, sheetNumber: words, code: words };
const onLine = { lineId: id, number: words };

function event<Type extends string, Data extends z.ZodRawShape>(type: Type, data: Data) {
  return z.object({ type: z.literal(type), data: z.object(data) });
}

export const auditEventSchema = z.discriminatedUnion("type", [
  event("shop.created", { name: words }),
  event("shop.changed", { what: z.array(words) }),
  event("shop.logo", { sha256: id.nullable() }),
  event("certificate.kept", { certificateId: id, origin: z.enum(["made", "uploaded"]), subject: words, fingerprint: id, validTo: words }),
  event("take-out.word", { key: words, valueMm: z.number().nullable() }),
  event("person.invited", { invitationId: id, email: words, role }),
  event("person.invitation-withdrawn", { invitationId: id, email: words }),
  event("person.joined", { membershipId: id, personId: id, name: words, role }),
  event("person.role", { membershipId: id, name: words, from: role, to: role }),
  event("person.removed", { membershipId: id, name: words }),
  event("person.password", { personId: id }),
  event("session.started", { sessionId: id }),
  event("session.ended", { sessionId: id }),
  event("job.created", { jobId: id, number: words }),
  event("job.changed", { jobId: id, number: words, what: z.array(words) }),
  event("job.logo", { jobId: id, number: words, sha256: id.nullable() }),
  event("line.created", { ...onLine, jobId: id, copiedFrom: id.nullable() }),
  event("line.saved", { ...onLine, version: z.int(), sha256: id }),
  event("line.changed", { ...onLine, what: z.array(words) }),
  event("line.archived", { ...onLine, archived: z.boolean() }),
  event("survey.saved", { ...onLine, version: z.int(), sha256: id }),
  event("upload.added", { ...onLine, uploadId: id, name: words, sha256: id }),
  event("upload.removed", { ...onLine, uploadId: id, name: words }),
  event("revision.submitted", { ...onRevision, spoolId: id, contentSha256: id }),
  event("revision.signed", { ...onRevision, inputSha256: id, accepted: z.array(words), superseded: words.nullable() }),
  event("revision.returned", { ...onRevision, reason: words }),
  event("revision.held", { ...onRevision, reason: words }),
  event("revision.released", { ...onRevision, reason: words }),
  event("revision.voided", { ...onRevision, reason: words }),
  event("revision.as-built", { ...onRevision, remark: words }),
  event("sheet.stored", { ...onRevision, kind: words, sha256: id }),
  event("sheet.copied", { ...onRevision, kind: words, sha256: id, marked: words }),
  event("set.printed", { ...onRevision, parts: z.array(words), sha256: id, marked: words }),
  event("offcut.added", { offcutId: id, what: words }),
  event("offcut.gone", { offcutId: id, what: words, reason: words }),
  event("nest.asked", { nestId: id, jobId: id, title: words, sourceSha256: id }),
  event("nest.made", { nestId: id, title: words, bars: z.int(), proven: z.boolean() }),
  event("nest.stopped", { nestId: id, title: words, reason: words }),
  event("nest.cut", { nestId: id, title: words, lengths: z.int(), offcutsTaken: z.int(), offcutsReturned: z.int() }),
  event("package.asked", { packageId: id, jobId: id, title: words, count: z.int(), sourceSha256: id }),
  event("package.made", { packageId: id, title: words, count: z.int(), sha256: id }),
  event("package.stopped", { packageId: id, title: words, reason: words }),
  event("package.downloaded", { packageId: id, title: words, count: z.int(), sha256: id }),
  event("package.acknowledged", { packageId: id, title: words, receivedBy: words, receivedOn: words }),
  event("sheet.downloaded", { ...onRevision, kind: words, sha256: id }),
  event("copies.withdrawn", { copyIds: z.array(id), sheets: z.array(words) }),
  event("spool.measured", { ...onRevision, measurementId: id, verdict: words }),
  event("work.recorded", { ...onRevision, entryId: id, kind: words, mark: words }),
]);

export type AuditEvent = z.infer<typeof auditEventSchema>;
type DataOf<Type extends AuditEvent["type"]> = Extract<AuditEvent, { type: Type }>["data"];
type Sentences = { readonly [Type in AuditEvent["type"]]: (data: DataOf<Type>) => string };

const sheet = (data: { sheetNumber: string; code: string }) => `sheet ${data.sheetNumber} revision ${data.code}`;
const list = (what: readonly string[]) => what.join(", ") || "nothing";

const SENTENCES: Sentences = {
  "shop.created": (d) => `Opened the shop ${d.name}.`,
  "shop.changed": (d) => `Changed the shop's settings: ${list(d.what)}.`,
  "shop.logo": (d) => (d.sha256 === null ? "Removed the shop's logo." : "Changed the shop's logo."),
  "certificate.kept": (d) => `${d.origin === "made" ? "Made" : "Uploaded"} the certificate ${d.subject}, good to ${d.validTo}, to sign sheets with.`,
  "take-out.word": (d) => (d.valueMm === null ? `Confirmed the take-out ${d.key} as tabulated.` : `Set the take-out ${d.key} to ${d.valueMm} mm as measured.`),
  "person.invited": (d) => `Invited ${d.email} as ${d.role}.`,
  "person.invitation-withdrawn": (d) => `Withdrew the invitation of ${d.email}.`,
  "person.joined": (d) => `${d.name} joined as ${d.role}.`,
  "person.role": (d) => `Changed the role of ${d.name} from ${d.from} to ${d.to}.`,
  "person.removed": (d) => `Removed ${d.name} from the shop.`,
  "person.password": () => "Set a new password by mailed link.",
  "session.started": () => "Signed in.",
  "session.ended": () => "Signed out.",
  "job.created": (d) => `Opened job ${d.number}.`,
  "job.changed": (d) => `Changed job ${d.number}: ${list(d.what)}.`,
  "job.logo": (d) => `${d.sha256 === null ? "Removed" : "Changed"} the logo of job ${d.number}.`,
  "line.created": (d) => (d.copiedFrom === null ? `Added line ${d.number}.` : `Added line ${d.number} as a copy.`),
  "line.saved": (d) => `Saved line ${d.number}, version ${d.version}.`,
  "line.changed": (d) => `Changed line ${d.number}: ${list(d.what)}.`,
  "line.archived": (d) => `${d.archived ? "Archived" : "Brought back"} line ${d.number}.`,
  "survey.saved": (d) => `Saved the survey of line ${d.number}, version ${d.version}.`,
  "upload.added": (d) => `Attached ${d.name} to line ${d.number}.`,
  "upload.removed": (d) => `Took ${d.name} off line ${d.number}.`,
  "revision.submitted": (d) => `Submitted ${sheet(d)} for review.`,
  "revision.signed": (d) => `Signed ${sheet(d)} for fabrication${d.superseded === null ? "" : `, superseding revision ${d.superseded}`}${d.accepted.length === 0 ? "" : `, accepting unverified dimensions at ${list(d.accepted)}`}.`,
  "revision.returned": (d) => `Returned ${sheet(d)}: ${d.reason}`,
  "revision.held": (d) => `Put ${sheet(d)} on hold: ${d.reason}`,
  "revision.released": (d) => `Released ${sheet(d)} from hold: ${d.reason}`,
  "revision.voided": (d) => `Voided ${sheet(d)}: ${d.reason}`,
  "revision.as-built": (d) => `Closed ${sheet(d)} as built: ${d.remark}`,
  "sheet.stored": (d) => `Stored the PDF of ${sheet(d)} (${d.kind}).`,
  "sheet.copied": (d) => `Printed a copy of ${sheet(d)}, marked ${d.marked}.`,
  "set.printed": (d) => `Printed ${d.parts.join(", ").toLowerCase()} of ${sheet(d)}, marked ${d.marked}.`,
  "offcut.added": (d) => `Put an offcut on the rack: ${d.what}.`,
  "offcut.gone": (d) => `Took an offcut off the rack: ${d.what}. ${d.reason}`,
  "package.asked": (d) => `Asked for package ${d.title}: ${d.count} ${d.count === 1 ? "sheet" : "sheets"}.`,
  "package.made": (d) => `Made package ${d.title}: ${d.count} ${d.count === 1 ? "sheet" : "sheets"}.`,
  "package.stopped": (d) => `Stopped package ${d.title}: ${d.reason}`,
  "package.downloaded": (d) => `Downloaded package ${d.title}: ${d.count} ${d.count === 1 ? "sheet" : "sheets"}.`,
  "package.acknowledged": (d) => `Noted that ${d.receivedBy} acknowledged package ${d.title} on ${d.receivedOn}.`,
  "nest.asked": (d) => `Asked for a cutting plan of ${d.title}.`,
  "nest.made": (d) => `Found a cutting plan of ${d.title}: ${d.bars} lengths${d.proven ? ", proven" : ""}.`,
  "nest.stopped": (d) => `Stopped the cutting plan of ${d.title}: ${d.reason}`,
  "nest.cut": (d) => `Locked the cutting plan of ${d.title}: ${d.lengths} lengths and ${d.offcutsTaken} offcuts taken, ${d.offcutsReturned} offcuts returned.`,
  "sheet.downloaded": (d) => `Downloaded the stored PDF of ${sheet(d)} (${d.kind}).`,
  "copies.withdrawn": (d) => `Marked ${d.copyIds.length === 1 ? "a copy" : `${d.copyIds.length} copies`} of ${list(d.sheets)} as withdrawn.`,
  "spool.measured": (d) => `Measured the spool of ${sheet(d)}: ${d.verdict === "none" ? "not judged" : d.verdict}.`,
  "work.recorded": (d) => `Recorded ${d.kind} of ${d.mark} on ${sheet(d)}.`,
};

/** The plain sentence of an event. */
export function auditSentence(entry: AuditEvent): string {
  const say = SENTENCES[entry.type] as (data: AuditEvent["data"]) => string;
  return say(entry.data);
}

/** The sentence of a stored event; one that no longer reads as an event says so instead of failing. */
export function auditSentenceOf(type: string, data: string): string {
  const parsed = auditEventSchema.safeParse({ type, data: parseJson(data) });
  return parsed.success ? auditSentence(parsed.data) : `An entry of kind ${type} that cannot be read.`;
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}
