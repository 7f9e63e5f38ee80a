/** The chain of the log, against changes of every kind. */
import { createHash } from "node:crypto";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { chainBreak, chainText, CHAIN_START, type ChainEntry } from "@/lib/rules/audit-chain";
import { auditEventSchema, auditSentence, auditSentenceOf } from "@/lib/rules/audit-events";

const sha256 = (text: string) => createHash("sha256").update(text, "utf8").digest("hex");
type Row = ChainEntry & { hash: string };

function chainOf(words: readonly string[]): Row[] {
  let prevHash = CHAIN_START;
  return words.map((word, index) => {
    const entry = { shopId: "s", seq: index + 1, at: `2026-01-01T00:00:0${index % 10}.000Z`, actor: index % 2 ? "p" : null, type: "shop.changed", data: JSON.stringify({ what: [word] }), prevHash };
    const hash = sha256(chainText(entry));
    prevHash = hash;
    return { ...entry, hash };
  });
}

const headOf = (rows: readonly Row[]) => ({ seq: rows.length, hash: rows[rows.length - 1]!.hash });

describe("the log's chain", () => {
  test("a whole chain has no break, nor has an empty one", () => {
    const rows = chainOf(["a", "b", "c"]);
    expect(chainBreak(rows, [headOf(rows)], sha256)).toBeNull();
    expect(chainBreak([], [], sha256)).toBeNull();
  });

  test("any change of any field of any entry is found, also when its own hash is made to fit", () => {
    const change = fc.record({ at: fc.nat(4), field: fc.constantFrom("at", "actor", "type", "data", "shopId"), refit: fc.boolean() });
    fc.assert(
      fc.property(change, ({ at, field, refit }) => {
        const rows = chainOf(["a", "b", "c", "d", "e"]);
        const noted = headOf(rows);
        const row = { ...rows[at]!, [field]: "changed" };
        rows[at] = refit ? { ...row, hash: sha256(chainText(row)) } : row;
        expect(chainBreak(rows, [noted], sha256)).not.toBeNull();
      }),
      { seed: 20261201, numRuns: 200 },
    );
  });

  test("a missing entry, two swapped ones and an added one are found", () => {
    const rows = chainOf(["a", "b", "c"]);
    expect(chainBreak([rows[0]!, rows[2]!], [], sha256)).toBe("Entry 2 is missing from the log.");
    expect(chainBreak([rows[1]!, rows[0]!, rows[2]!], [], sha256)).toMatch(/missing/);
    expect(chainBreak([...rows, { ...rows[2]!, seq: 4 }], [], sha256)).toMatch(/Entry 4 does not follow/);
  });

  test("a cut tail is whole by itself and shows only against a head noted elsewhere", () => {
    const rows = chainOf(["a", "b", "c"]);
    const cut = rows.slice(0, 1);
    expect(chainBreak(cut, [], sha256)).toBeNull();
    expect(chainBreak(cut, [headOf(rows)], sha256)).toMatch(/its newest entries were removed/);
  });

  test("a log written anew from the start shows against a head noted elsewhere", () => {
    const noted = headOf(chainOf(["a", "b"]));
    expect(chainBreak(chainOf(["a", "other", "c"]), [noted], sha256)).toMatch(/rewritten/);
  });

  test("no two entries give the same text, wherever a quote or comma stands", () => {
    const entry = { shopId: "s", seq: 1, at: "t", actor: null, type: "x", data: "{}", prevHash: CHAIN_START };
    expect(chainText({ ...entry, type: 'x","{}' })).not.toBe(chainText({ ...entry, data: '","{}{}' }));
  });
});

describe("events in words", () => {
  const SAMPLES: Record<string, unknown> = {
    name: "N", what: ["name"], sha256: "h", key: "k", valueMm: null, invitationId: "i", email: "e@x.example", role: "fitter", membershipId: "m", personId: "p",
    from: "fitter", to: "owner", sessionId: "s", jobId: "j", number: "1", lineId: "l", copiedFrom: null, version: 2, archived: true, uploadId: "u", revisionId: "r",
    sheetNumber: "0001", code: "A", spoolId: "sp", inputSha256: "h", contentSha256: "h", accepted: ["a"], superseded: null, reason: "why", remark: "done", kind: "review", marked: "COPY", entryId: "w", mark: "P1",
    certificateId: "c", origin: "made", subject: "CN", fingerprint: "f", validTo: "2030", offcutId: "o", nestId: "n", title: "T", sourceSha256: "h",
    packageId: "pk", count: 3, receivedBy: "Cannery", receivedOn: "2026-12-01",
    parts: ["Cut map"], measurementId: "ms", verdict: "go",
    bars: 3, proven: true, lengths: 3, offcutsTaken: 1, offcutsReturned: 1, copyIds: ["c"], sheets: ["0001 A"],
  };
  /** One word with another shape in some events. */
  const OWN: Record<string, Record<string, unknown>> = { "offcut.added": { what: "NPS 4" }, "offcut.gone": { what: "NPS 4" } };

  test("every event has a plain sentence without a stray word", () => {
    for (const option of auditEventSchema.options) {
      const data = Object.fromEntries(Object.keys(option.shape.data.shape).map((key) => [key, OWN[option.shape.type.value]?.[key] ?? SAMPLES[key]]));
      const event = auditEventSchema.parse({ type: option.shape.type.value, data });
      expect(auditSentence(event)).toMatch(/^[A-Z].*[.?!a-z]$/);
      expect(auditSentence(event)).not.toMatch(/undefined|null|\[object/);
    }
  });

  test("a stored event that does not read says so", () => {
    expect(auditSentenceOf("shop.created", "{")).toMatch(/cannot be read/);
    expect(auditSentenceOf("never.heard", "{}")).toMatch(/cannot be read/);
    expect(auditSentenceOf("shop.created", '{"name":"Bent Arm"}')).toBe("Opened the shop Bent Arm.");
  });
});
