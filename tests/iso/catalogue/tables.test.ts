/**
 * The tables against themselves and against rules of their standards: inch against millimetre columns, sizes in order,
 * relations between tables, sources. What breaks a rule is listed with its reason; a listed exception that no longer
 * breaks it fails.
 */
import { describe, expect, it } from "vitest";
import {
  capKey, capKeyFor, catalogueKeys, catalogueValue, catalogueWords, crossRunKey, elbowKey, flangeHubKey, isWeightKey, keyWords, missingKeys, NPS_SIZES, pipeOdMm,
  pipeSize, pipeWall, returnKey, schedulesFor, socketKey, teeRunKey, threadEngagementKey, threadedKey, weightKeys, type Nps,
} from "@/iso";
import { catalogueEntries } from "../../../iso/catalogue/entries";
import { REDUCER_ROWS } from "../../../iso/catalogue/b16-9-reducers";
import { TEE_ROWS } from "../../../iso/catalogue/b16-9-tees";
import { FLANGE_ROWS } from "../../../iso/catalogue/b16-5-flanges";

const IN = 25.4;
const inches = (key: string) => {
  const value = catalogueValue(key, "imperial", []);
  return value === null ? null : value.mm / IN;
};
const sizesWith = (keyOf: (nps: Nps) => string) => NPS_SIZES.filter((nps) => inches(keyOf(nps)) !== null);

describe("inch and millimetre columns", () => {
  /** Columns of B16.9, B16.11 and B16.10 are rounded to whole or half millimetres, each by its own hand. */
  const LISTED: Readonly<Record<string, string>> = {
    "valve:gate:300:3:flanged": "11 1/8 in is 282.6, printed 282 (B16.10 rounds down here)",
    "valve:ball:300:3:flanged": "as the gate valve",
    "valve:ball-short:300:3:flanged": "as the gate valve",
    "valve:gate:150:3:butt": "as the gate valve of class 300",
    "valve:gate:300:3:butt": "as the raised-face column",
    "valve:ball:300:3:butt": "as the raised-face column",
    "valve:ball-short:300:3:butt": "as the raised-face column",
    ...Object.fromEntries(["th-90:2000:1/2", "tee:2000:1/2", "cross:2000:1/2", "th-45:2000:1", "th-45:3000:3/4", "th-45:6000:1/2"].map((rest) =>
      [`threaded:${rest}`, "1 1/8 in is 28.6, printed 28 (B16.11, from memory)"])),
  };

  it("agree to half a millimetre, exceptions listed", () => {
    const off = [...catalogueEntries().values()].filter((e) => e.inches !== null && e.mm !== null && Math.abs(e.inches * IN - e.mm) > 0.51).map((e) => e.key);
    expect(off.sort()).toEqual(Object.keys(LISTED).sort());
  });

  it("agree to the table's tenth for diameters (B36.10M), NPS 18 and 24 rounded to whole millimetres", () => {
    for (const nps of NPS_SIZES) {
      const size = pipeSize(nps)!;
      expect(Math.abs(size.odInchMm - size.odMetricMm), nps).toBeLessThan(["18", "22", "24"].includes(nps) ? 0.41 : 0.06);
    }
  });

  it("agree to 0.05 mm for walls, every size and schedule", () => {
    for (const nps of NPS_SIZES) for (const schedule of schedulesFor(nps)) {
      expect(Math.abs(pipeWall(nps, schedule, "imperial")!.wallMm - pipeWall(nps, schedule, "metric")!.wallMm), `${nps} ${schedule}`).toBeLessThan(0.05);
    }
  });
});

describe("a bigger size is never smaller", () => {
  const LISTED: Readonly<Record<string, string>> = {
    "flange-hub:weld-neck:900:3": "class 900 takes class 1500's dimensions to NPS 2-1/2 (B16.5)",
    "flange-hub:slip-on:900:3": "as the weld-neck", "flange-hub:threaded:900:3": "as the weld-neck", "flange-hub:lap-joint:900:3": "as the weld-neck",
    "flange-thickness:900:3": "as the weld-neck",
    ...Object.fromEntries(["tee-branch", "cross-branch"].flatMap((kind) => ["1", "3/4"].map((b) => [`${kind}:2:${b}`, "reducing tees of NPS 1-1/2 keep M = C = 2 1/4; those of NPS 2 do not (B16.9)"]))),
    ...Object.fromEntries(["gate", "globe", "check", "ball"].flatMap((v) => ["flanged", "butt"].map((ends) => [`valve:${v}:900:3:${ends}`, "class 900 takes class 1500's lengths to NPS 2-1/2 (B16.10)"]))),
  };

  it("in every table by size, exceptions listed", () => {
    const families = new Map<string, { key: string; order: number; value: number }[]>();
    for (const e of catalogueEntries().values()) {
      const parts = e.key.split(":");
      const at = parts.findIndex((part, i) => i > 0 && NPS_SIZES.includes(part as Nps) && !(parts[0] === "outlet" && i === 2));
      const family = parts.map((part, i) => (i === at ? "*" : part)).join(":");
      families.set(family, [...(families.get(family) ?? []), { key: e.key, order: NPS_SIZES.indexOf(parts[at] as Nps), value: e.inches ?? e.mm! / IN }]);
    }
    const broken = [...families.values()].flatMap((rows) => {
      const sorted = [...rows].sort((a, b) => a.order - b.order);
      return sorted.filter((row, i) => i > 0 && row.value < sorted[i - 1]!.value - 1e-9).map((row) => row.key);
    });
    expect(broken.sort()).toEqual(Object.keys(LISTED).sort());
  });

  it("nor a higher class of flange thinner, nor its stud shorter, nor its bolt circle smaller, size by size (B16.5)", () => {
    for (const nps of NPS_SIZES) {
      const rows = FLANGE_ROWS.filter((r) => r.nps === nps).sort((a, b) => a.ratingClass - b.ratingClass);
      rows.slice(1).forEach((row, i) => {
        for (const field of ["thicknessIn", "weldNeckIn", "outsideIn", "boltCircleIn", "studIn", "holeIn"] as const) expect(row[field], `${row.ratingClass} ${nps} ${field}`).toBeGreaterThanOrEqual(rows[i]![field]);
      });
    }
  });
});

describe("relations", () => {
  it("O of a return is twice A, and K is A + OD/2 to a sixteenth (B16.9)", () => {
    for (const radius of ["LR", "SR"] as const) for (const nps of sizesWith((n) => returnKey(radius, "centres", n))) {
      const a = inches(elbowKey(radius === "LR" ? "lr-90" : "sr-90", nps))!;
      expect(inches(returnKey(radius, "centres", nps)), `${radius} ${nps}`).toBeCloseTo(2 * a, 9);
      expect(Math.abs(inches(returnKey(radius, "back", nps))! - a - pipeOdMm(nps, "imperial")! / IN / 2), `${radius} ${nps}`).toBeLessThan(0.0626);
    }
  });

  it("LR 45 is A·tan 22.5° to 5/64 in, but for NPS 1 and under, where it is tabulated by itself (B16.9)", () => {
    for (const nps of sizesWith((n) => elbowKey("lr-45", n))) {
      const off = Math.abs(inches(elbowKey("lr-45", nps))! - inches(elbowKey("lr-90", nps))! * Math.tan(Math.PI / 8));
      if (["1/2", "3/4", "1", "1-1/4"].includes(nps)) expect(off).toBeLessThan(0.26);
      else expect(off, nps).toBeLessThan(0.22);
    }
  });

  it("a straight tee's C is not under half its OD plus 1/2 in, and not over its LR 90 (B16.9; NPS 1/2 and 3/4 tees are under the 90's A)", () => {
    for (const nps of sizesWith((n) => teeRunKey(n))) {
      const c = inches(teeRunKey(nps))!;
      expect(c, nps).toBeGreaterThan(pipeOdMm(nps, "imperial")! / IN / 2 + 0.4);
      expect(c, nps).toBeLessThanOrEqual(inches(elbowKey("lr-90", nps))!);
      expect(inches(crossRunKey(nps))).toBe(c);
    }
  });

  it("the run of a reducing tee is the straight tee's C, and its branch is never longer (B16.9)", () => {
    for (const r of TEE_ROWS) {
      expect(r.runIn, `${r.run} x ${r.branch}`).toBe(TEE_ROWS.find((t) => t.run === r.run && t.branch === r.run)!.runIn);
      expect(r.branchIn, `${r.run} x ${r.branch}`).toBeLessThanOrEqual(r.runIn);
    }
  });

  it("reducers of one large end have one length, but for the smallest sizes (B16.9)", () => {
    for (const large of NPS_SIZES) expect(new Set(REDUCER_ROWS.filter((r) => r.large === large).map((r) => r.inches)).size, large).toBeLessThanOrEqual(1);
  });

  it("no pair or size stands twice in a table", () => {
    for (const pairs of [TEE_ROWS.map((r) => `${r.run}:${r.branch}`), REDUCER_ROWS.map((r) => `${r.large}:${r.small}`), FLANGE_ROWS.map((r) => `${r.ratingClass}:${r.nps}`)]) {
      expect(new Set(pairs).size).toBe(pairs.length);
    }
  });

  it("thread engagement agrees to 1/24 in with the rounded normal engagement of trade handbooks (from memory)", () => {
    const handbook: Partial<Record<Nps, number>> = { "1/2": 1 / 2, "3/4": 9 / 16, "1": 11 / 16, "1-1/4": 11 / 16, "1-1/2": 11 / 16, "2": 3 / 4, "2-1/2": 15 / 16, "3": 1, "4": 9 / 8, "6": 21 / 16 };
    for (const [nps, normal] of Object.entries(handbook)) expect(Math.abs(inches(threadEngagementKey(nps as Nps))! - normal), nps).toBeLessThan(0.11);
  });

  it("a threaded fitting of one class is the next class's one size down, as B16.11 builds them (bands of forging)", () => {
    for (const [small, large] of [["1/2", "3/4"], ["3/4", "1"], ["1", "1-1/4"], ["1-1/4", "1-1/2"]] as const) {
      expect(inches(threadedKey("th-90", 6000, small))).toBe(inches(threadedKey("th-90", 3000, large)));
      expect(inches(threadedKey("th-90", 3000, small))).toBe(inches(threadedKey("th-90", 2000, large)));
      expect(inches(socketKey("sw-45", 6000, small))).toBe(inches(socketKey("sw-45", 3000, large)));
    }
  });

  it("takes the longer cap over the limiting wall only (B16.9: XS is within it, 160 is not)", () => {
    const wall = (schedule: string) => pipeWall("6", schedule, "imperial")!.wallMm;
    expect([capKeyFor("6", wall("XS")), capKeyFor("6", wall("160")), capKeyFor("6", null)]).toEqual([capKey("6"), capKey("6", true), capKey("6")]);
    expect(inches(capKey("6", true))).toBeCloseTo(4, 9);
  });
});

describe("names and gaps", () => {
  it("has words for every key, in a table or not, each key its own", () => {
    const all = [...catalogueKeys(), ...missingKeys(), ...weightKeys()];
    expect(new Set(all).size).toBe(all.length);
    const words = all.map(catalogueWords);
    for (const [i, said] of words.entries()) expect(said, all[i]).toMatch(/NPS \d/);
    expect(words.filter((said) => /undefined|null|:/.test(said))).toEqual([]);
    expect(new Set(words).size).toBe(words.length);
    expect(keyWords("none:of:these")).toBeNull();
  });

  it("says missing for what no table has: SR 45s, unions, socket-weld valves; NPS 22 flanges (B16.5 leaves it out)", () => {
    const missing = new Set(missingKeys());
    for (const key of [elbowKey("sr-45", "6"), socketKey("union", 3000, "1"), threadedKey("union", 3000, "1"), "valve:gate:150:1:socket", flangeHubKey("weld-neck", 150, "22")]) {
      expect(missing.has(key), key).toBe(true);
      expect(catalogueValue(key, "imperial", [])).toBeNull();
    }
    for (const key of missing) expect(catalogueEntries().has(key)).toBe(false);
    expect(weightKeys().every(isWeightKey)).toBe(true);
  });

  it("takes the shop's own measure for a missing one, with who said it", () => {
    const key = elbowKey("sr-45", "6");
    expect(catalogueValue(key, "imperial", [{ key, valueMm: 63.1, by: "D. Okafor", at: "2026-03-02" }])).toMatchObject({ mm: 63.1, unverified: false, source: "measured by the shop (D. Okafor)" });
  });

  it("names a standard in every source, and says from memory exactly where it is", () => {
    for (const e of catalogueEntries().values()) {
      expect(e.source, e.key).toMatch(/^(ASME B|MSS SP-|API )/);
      expect(e.source.includes("from memory"), e.key).toBe(e.fromMemory === "yes");
    }
  });
});
