/** A review as the server sends it, small and whole; the sheet input is a real document with one pipe. */
import type { ReviewDetail, RevisionSummary, SpoolDetail } from "@/lib/rules/api-types";
import { defaultLineSettings } from "@/lib/rules/default-settings";
import type { RevisionState, SheetInput } from "@/iso";

export function sheetInput(state: RevisionState, code: string): SheetInput {
  return {
    version: 1,
    document: {
      version: 1,
      number: "4-CW-101",
      title: "",
      settings: defaultLineSettings("imperial"),
      view: null,
      runs: [{ id: "m", name: "", from: null, pipe: null, points: [] }],
      notes: [],
    },
    marks: { version: 1, sticky: true, welds: {}, pieces: {}, spools: {}, voided: [] },
    takeOuts: [],
    spool: "A",
    size: "letter",
    units: "imperial",
    titleBlock: {
      shopName: "Shop",
      client: "",
      project: "",
      jobNumber: "J-1",
      area: "",
      fields: [],
      logo: null,
    },
    revision: {
      sheetNumber: "S-0001",
      code,
      state,
      hold: false,
      rows: [],
      drawnBy: "",
      checkedBy: "",
      issuedAt: "2026-01-01T00:00:00Z",
      statusUrl: "",
      auditHead: "",
      changedPointIds: [],
      accepted: [],
    },
  };
}

export function revision(state: RevisionState, more: Partial<RevisionSummary> = {}): RevisionSummary {
  return {
    id: "r2",
    spoolId: "s1",
    code: "B",
    state,
    hold: false,
    description: "Valve moved",
    submittedBy: "Miles Okafor",
    submittedAt: "2026-01-02T10:00:00Z",
    signedBy: null,
    signedAt: null,
    returnReason: null,
    holdReason: null,
    sheets: [{ id: "p1", kind: "review", sha256: "ab".repeat(32), bytes: 2048, at: "2026-01-02T10:00:00Z" }],
    statusPath: "/status/token",
    ...more,
  };
}

export function reviewDetail(more: Partial<ReviewDetail> = {}): ReviewDetail {
  return {
    revision: revision("for-review"),
    spool: { id: "s1", letter: "A", sheetNumber: "S-0001" },
    line: { id: "l1", number: "4-CW-101" },
    job: { id: "j1", number: "J-1" },
    input: sheetInput("for-review", "B"),
    before: sheetInput("for-fabrication", "A"),
    changes: [],
    unverified: [],
    impact: [],
    can: { sign: true, return: true, hold: true, void: true },
    why: null,
    ...more,
  };
}

export function spoolDetail(more: Partial<SpoolDetail> = {}): SpoolDetail {
  return {
    id: "s1",
    letter: "A",
    sheetNumber: null,
    line: { id: "l1", number: "4-CW-101", title: "" },
    job: { id: "j1", number: "J-1", title: "Tie-in" },
    revisions: [],
    draft: sheetInput("draft", "A"),
    live: null,
    work: [],
    can: { submit: true, sign: false, hold: false, log: false },
    why: { submit: null, sign: null },
    ...more,
  };
}
