/** A survey without a signal: kept at every change, joined with another hand's, asked about where both changed a row. */
import "fake-indexeddb/auto";
import { describe, expect, test } from "vitest";
import { emptySurvey, type SurveyDocument, type SurveyReading } from "@/iso";
import type { SurveyDetail } from "@/lib/rules/survey-api-types";
import { mergeSurveys } from "@/components/survey/survey-merge";
import { openSurveyStore, type SurveyStore } from "@/components/survey/survey-store";
import { SurveySync, type SendAnswer, type SyncView } from "@/components/survey/survey-sync";

function tape(id: string, first: string, to = "B"): SurveyReading {
  return { id, kind: "tape", from: "A", to, first: [first], again: [""], tool: "tape", tolerance: "", leftOut: false, note: "" };
}
const survey = (...readings: SurveyReading[]): SurveyDocument => ({ ...emptySurvey("imperial"), readings });

/** A server that holds one survey, can be cut off, and refuses a save from an older version. */
class Server {
  up = true;
  version = 1;
  loseAnswer = false;
  constructor(public document: SurveyDocument) {}

  detail(lineId: string): SurveyDetail {
    return { line: { id: lineId, number: "L-1", title: "" }, job: { id: "j", number: "J-1" }, version: this.version, document: this.document, odMm: 114.3, uploads: [], updatedAt: null, updatedBy: "Ida" };
  }
  other(document: SurveyDocument): void {
    this.document = document;
    this.version += 1;
  }
  send = async (document: SurveyDocument, version: number): Promise<SendAnswer> => {
    if (!this.up) return { kind: "offline" };
    if (JSON.stringify(document) === JSON.stringify(this.document)) return { kind: "saved", result: { version: this.version, savedAt: "t" } };
    if (version !== this.version) return { kind: "conflict", conflict: { message: "", code: "conflict", currentVersion: this.version, by: "Ida", at: "", document: this.document } };
    this.other(document);
    return this.loseAnswer ? { kind: "offline" } : { kind: "saved", result: { version: this.version, savedAt: "t" } };
  };
}

let line = 0;
async function opened(server: Server, store: SurveyStore | null, lineId = `line-${(line += 1)}`) {
  const views: SyncView[] = [];
  const kept = (await store?.read(lineId, "me")) ?? null;
  const sync = new SurveySync({ store, send: server.send, show: (view) => views.push(view), now: () => "2026-01-01" }, "me", server.detail(lineId), kept);
  return { sync, views, lineId };
}

describe("a survey without a signal", () => {
  test("is there after the tab was closed and after the battery died, and goes out when the signal returns", async () => {
    const store = await openSurveyStore();
    const server = new Server(survey(tape("r1", "37 1/2")));
    const first = await opened(server, store);
    server.up = false;
    for (const text of ["4", "4 1", "4 1/", "4 1/2"]) await first.sync.change(survey(tape("r1", "37 1/2"), tape("r2", text, "C")));
    await first.sync.sendNow();
    expect(first.sync.view().word.kind).toBe("kept");

    // The page is gone without a word; another opens on the same device.
    const again = await opened(server, await openSurveyStore(), first.lineId);
    expect(again.sync.view().document.readings.map((r) => r.first[0])).toEqual(["37 1/2", "4 1/2"]);
    server.up = true;
    await again.sync.sendNow();
    expect(again.sync.view().word).toEqual({ kind: "saved", at: "t" });
    expect(server.document.readings).toHaveLength(2);
    expect(server.version).toBe(2);
  });

  test("joins what another hand added meanwhile without asking", async () => {
    const store = await openSurveyStore();
    const server = new Server(survey(tape("r1", "37 1/2")));
    const { sync } = await opened(server, store);
    server.up = false;
    await sync.change(survey(tape("r1", "37 1/2"), tape("mine", "12", "C")));
    server.other(survey(tape("r1", "37 1/2"), tape("theirs", "15", "D")));
    server.up = true;
    await sync.sendNow();
    await sync.sendNow();
    expect(server.document.readings.map((r) => r.id).sort()).toEqual(["mine", "r1", "theirs"]);
    expect(sync.view().conflicts).toEqual([]);
  });

  test.each([["mine", "40"], ["theirs", "41"]] as const)("asks about a row both changed and saves the one chosen: %s", async (side, kept) => {
    const store = await openSurveyStore();
    const server = new Server(survey(tape("r1", "37 1/2"), tape("r2", "10", "C")));
    const { sync, lineId } = await opened(server, store);
    server.up = false;
    await sync.change(survey(tape("r1", "40"), tape("r2", "10", "C")));
    server.other(survey(tape("r1", "41"), tape("r2", "11", "C")));
    server.up = true;
    await sync.sendNow();
    expect(sync.view().word).toEqual({ kind: "conflict", by: "Ida" });
    const [conflict] = sync.view().conflicts;
    expect(conflict).toMatchObject({ id: "r1", mine: { first: ["40"] }, theirs: { first: ["41"] } });
    expect(server.document.readings[0]!.first).toEqual(["41"]);
    const { document } = sync.view();
    await sync.change({ ...document, note: "scaffold in the way" });

    // Closed before choosing: the question comes back, with both values.
    const again = await opened(server, await openSurveyStore(), lineId);
    await again.sync.meet(server.detail(lineId));
    expect(again.sync.view().conflicts).toMatchObject([{ id: "r1", mine: { first: ["40"] }, theirs: { first: ["41"] } }]);
    await again.sync.choose(again.sync.view().conflicts[0]!, side);
    expect(server.document.readings.map((r) => r.first[0])).toEqual([kept, "11"]);
    expect(again.sync.view().word.kind).toBe("saved");
    expect(server.document.note).toBe("scaffold in the way");
  });

  test("a save whose answer was lost is not a conflict with oneself", async () => {
    const server = new Server(survey(tape("r1", "37 1/2")));
    const { sync } = await opened(server, await openSurveyStore());
    server.loseAnswer = true;
    await sync.change(survey(tape("r1", "38")));
    await sync.sendNow();
    expect(sync.view().word.kind).toBe("kept");
    await sync.sendNow();
    expect(sync.view()).toMatchObject({ word: { kind: "saved" }, conflicts: [] });
  });

  test("says so when the browser keeps nothing", async () => {
    const server = new Server(survey());
    const { sync } = await opened(server, null);
    server.up = false;
    await sync.change(survey(tape("r1", "1")));
    expect(sync.view().word.kind).toBe("not-kept");
  });

  test("photos wait in the browser", async () => {
    const store = await openSurveyStore();
    await store.addPhoto({ id: "p1", lineId: "L", personId: "me", name: "face.jpg", type: "image/jpeg", bytes: new Uint8Array([1, 2, 3]).buffer, at: "t" });
    const [photo] = await (await openSurveyStore()).photos("L");
    expect([...new Uint8Array(photo!.bytes)]).toEqual([1, 2, 3]);
    await store.removePhoto("p1");
    expect(await store.photos("L")).toEqual([]);
  });
});

test("a row one side took away and the other changed is asked about; one both took away is gone", () => {
  const base = survey(tape("a", "1"), tape("b", "2"), tape("c", "3"));
  const merged = mergeSurveys(base, survey(tape("b", "2 1/2")), survey(tape("c", "3")));
  expect(merged.document.readings.map((r) => r.id)).toEqual(["b"]);
  expect(merged.conflicts).toMatchObject([{ id: "b", theirs: null }]);
});
