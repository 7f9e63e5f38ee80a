/** An empty line with the defaults of a common shop, and the stamp an action carries. */
import type { LineSettings, RunDocument } from "@/iso";
import { emptyMarks, INCH_MM } from "@/iso";
import type { LineDetail } from "@/lib/rules/api-types";
import type { Stamp } from "@/components/run-editor/editor-types";

export const SETTINGS: LineSettings = {
  units: "imperial",
  pipe: { nps: "4", schedule: "STD", material: "ASTM A106 Gr. B", specification: "" },
  elbow: "LR",
  ratingClass: 150,
  allowances: { rootGapMm: INCH_MM / 8, socketPullBackMm: INCH_MM / 16, gasketMm: INCH_MM / 8, slipOnSettingMm: INCH_MM / 8 },
  standardElbowWithinDeg: 3,
  minimumPupMm: null,
  fieldTrimMm: 6 * INCH_MM,
  faceIncludesGasket: false,
  shippingBoxMm: [12_192, 2_438.4, 2_438.4],
  asEntered: { insulation: "", pwht: "", nde: "", test: "", paint: "" },
};

export function emptyDocument(): RunDocument {
  return {
    version: 1, number: "4-CW-101", title: "", settings: SETTINGS, view: null, notes: [],
    runs: [{ id: "main", name: "", from: null, pipe: null, points: [] }],
  };
}

let serial = 0;
export function testStamp(): Stamp {
  serial += 1;
  const ids = Array.from({ length: 8 }, (_, n) => `p${serial}x${n}`);
  return { by: "R. Tanaka", at: "2026-03-02", ids, branchId: `b${serial}` };
}

/** An empty line as the server hands it out. */
export function lineDetail(change: Partial<LineDetail> = {}): LineDetail {
  return {
    id: "line-1", job: { id: "job-1", number: "J-100", title: "Cooling water" }, version: 1,
    document: emptyDocument(), marks: emptyMarks(), takeOuts: [],
    titleBlock: { shopName: "Shop", client: "", project: "", jobNumber: "J-100", area: "", fields: [], logo: null },
    sheetSize: "tabloid", spools: [], uploads: [], updatedAt: "2026-03-01T08:00:00Z", updatedBy: "R. Tanaka", editable: true,
    ...change,
  };
}
