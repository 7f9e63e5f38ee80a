/** A hand-made model and drawing: what composing needs, without building or drawing anything. Values are invented. */
import type { CutTerm, Drawing, Joint, Leg, LegendKey, Model, Piece, RevisionState, RunDocument, SheetInput, SheetSize, Spool } from "@/iso";
import { parseRunDocument } from "@/iso";

const INCH = 25.4;
const provenance = { kind: "measured", toleranceMm: null, by: null, at: null, second: null } as const;

/** A document with one run of so many points; only its settings matter here. */
export function stubDocument(notes: readonly string[] = []): RunDocument {
  const zero = { text: "0", mm: 0 };
  const parsed = parseRunDocument({
    version: 1, number: "4-CW-1207-A1", title: "Cooling water return", notes,
    settings: {
      units: "imperial", pipe: { nps: "4", schedule: "STD", material: "A106 Gr B", specification: "CS150" }, elbow: "LR", ratingClass: 150,
      allowances: { rootGapMm: 3.175, socketPullBackMm: 1.5875, gasketMm: 3.175, slipOnSettingMm: 6.35 },
      standardElbowWithinDeg: 3, minimumPupMm: null, fieldTrimMm: 152.4, faceIncludesGasket: false, shippingBoxMm: [12192, 2438, 2438],
      asEntered: { insulation: "none", pwht: "none", nde: "5 % RT", test: "hydro, see test pack 14", paint: "system B2" },
    },
    runs: [{ id: "main", from: null, points: [{ id: "p1", offset: { kind: "enu", e: zero, n: zero, u: zero } }] }],
  });
  if (!parsed.ok) throw new Error(parsed.messages.join(" "));
  return parsed.document;
}

const term = (kind: CutTerm["kind"], label: string, inches: number, unconfirmed = false): CutTerm => ({
  kind, label, valueMm: inches * INCH, componentId: null, source: null, unconfirmed,
});

function stubPiece(index: number): Piece {
  const span = 37.5 + index * 1.25;
  const terms = [
    term("centre-to-centre", "face to centre", span), term("take-out", "weld-neck hub", -3), term("take-out", "LR 90 take-out", -6, index === 1),
    term("root-gap", "root gap", -0.125), term("root-gap", "root gap", -0.125), ...(index === 2 ? [term("trim", "field trim", 6)] : []),
  ];
  return {
    key: `p${index}:1`, mark: `P${index}`, legId: `p${index}`, runId: "main", nps: "4", schedule: "STD", material: "A106 Gr B",
    odMm: 114.3, wallMm: 6.02, start: [0, 0, 0], end: [1000, 0, 0], direction: [1, 0, 0], terms,
    cutLengthMm: terms.reduce((sum, one) => sum + one.valueMm, 0),
    ends: [{ prep: "bevel", jointKey: null }, { prep: "bevel", jointKey: null }], weightKg: 10, weightSource: "B36.10M", spool: "A",
  };
}

function stubJoint(index: number, count: number): Joint {
  return {
    key: `p${index}:in`, pointId: `p${index}`, kind: "butt", place: index === count ? "field-fit" : index % 7 === 6 ? "field" : "shop", number: String(index),
    position: [0, 0, 0], direction: [1, 0, 0], a: null, b: null, nps: "4", mismatchRad: index === 3 ? 0.0208 : 0, gapMm: 3.175, spool: "A",
  };
}

const stubLeg = (index: number): Leg => ({
  id: `p${index}`, runId: "main", fromPointId: `p${index - 1}`, toPointId: `p${index}`, from: [0, 0, 0], to: [1000, 0, 0], lengthMm: 1000,
  direction: [1, 0, 0], nps: "4", provenance, unverified: index === 2,
});

/** A model with so many pieces and two welds for each. */
export function stubModel(pieceCount: number, document: RunDocument = stubDocument()): Model {
  const pieces = Array.from({ length: pieceCount }, (_, index) => stubPiece(index + 1));
  const joints = Array.from({ length: pieceCount * 2 }, (_, index) => stubJoint(index + 1, pieceCount * 2));
  const names = ["Pipe, seamless, BE", "Elbow 90 LR, BW", "Flange weld neck RF, class 150", "Gasket, spiral wound, class 150", "Gate valve, flanged RF, class 150, handwheel operated"];
  const spool: Spool = {
    letter: "A", anchor: "p1", componentIds: [], pieceKeys: pieces.map((piece) => piece.key), jointKeys: joints.map((joint) => joint.key),
    materials: names.map((description, index) => ({
      item: index + 1, quantity: index === 0 ? 3211.5 : index, unit: index === 0 ? "mm" : "ea", size: "NPS 4 STD", description,
      material: index === 0 ? "A106 Gr B" : "A234 WPB", weightKg: null, source: "B16.9", refs: [],
    })),
    weightKg: 96.4, unweighed: 1, centreOfGravity: [0, 0, 0], boxMm: [1000, 500, 2000], content: "",
  };
  return { document, nodes: [], legs: pieces.map((_, index) => stubLeg(index + 1)), components: [], joints, pieces, spools: [spool], problems: [] };
}

const LEGEND: readonly LegendKey[] = [
  "shop-weld", "field-weld", "field-fit-weld", "material-item", "weld-number", "cut-piece", "spool", "flow", "support", "revision", "reference-dimension", "unverified",
];

/** A drawing that only inks the corners of its room. */
export function stubDraw({ widthMm, heightMm }: { readonly widthMm: number; readonly heightMm: number }): readonly Drawing[] {
  const corner = (x: number, y: number, dx: number, dy: number) => [
    { type: "line", layer: "pipe", ref: null, from: [x, y], to: [x + dx, y], widthMm: 0.7, ink: "ink" } as const,
    { type: "line", layer: "pipe", ref: null, from: [x, y], to: [x, y + dy], widthMm: 0.7, ink: "ink" } as const,
  ];
  return [{
    view: 1, widthMm, heightMm, legend: LEGEND, shown: [], bounds: { minX: 0, minY: 0, maxX: widthMm, maxY: heightMm },
    report: { labels: 0, clean: 0, overlaps: 0, touches: 0, meanLeaderMm: 0, p95LeaderMm: 0 },
    items: [...corner(0, 0, 9, 9), ...corner(widthMm, 0, -9, 9), ...corner(0, heightMm, 9, -9), ...corner(widthMm, heightMm, -9, -9)],
  }];
}

/** A sheet input round a document, in any state. */
export function stubInput(size: SheetSize, state: RevisionState, document: RunDocument = stubDocument()): SheetInput {
  const rows = ["A", "B", "C"].map((code, index) => ({
    code, description: index === 0 ? "For review" : "Face to face corrected after survey", date: `2025-0${index + 2}-14`, by: "R. Castell", checked: "M. Oduya", approved: "M. Oduya",
  }));
  return {
    version: 1, document, marks: { version: 1, sticky: true, welds: {}, pieces: {}, spools: {}, voided: [{ kind: "weld", mark: "7", key: "gone:in" }] },
    takeOuts: [], spool: "A", size, units: document.settings.units,
    titleBlock: {
      shopName: "Halyard Pipe & Spool", client: "Brightwater Dairy Cooperative", project: "Evaporator 2 cooling water", jobNumber: "25-041", area: "Unit 12, pipe rack east",
      fields: [{ label: "PO no.", value: "88-10422" }, { label: "Test pack", value: "TP-14" }], logo: null,
    },
    revision: {
      sheetNumber: "HPS-0147", code: "C", state, hold: false, rows, drawnBy: "R. Castell", checkedBy: "M. Oduya", issuedAt: "2025-04-14T15:20:00Z",
      statusUrl: "https://sheets.halyard.example/status/9fK2mQx7Rb4TzWc1Yh8LpA", auditHead: "3f9a1c77d2e84b06a5c1f0e9b7d86a42c3f9a1c77d2e84b06a5c1f0e9b7d86a4",
      changedPointIds: [], accepted: [{ pointId: "p2", by: "M. Oduya" }],
    },
  };
}
