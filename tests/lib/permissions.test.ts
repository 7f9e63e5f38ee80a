/** The role table, row by row, as the shop's rules state it. */
import { describe, expect, test } from "vitest";
import type { Role, WorkKind } from "@/lib/rules/api-types";
import { canDo, canRecord, PERMISSIONS, refusalOf, workRefusalOf, type Permission } from "@/lib/rules/permissions";

const ROLES: readonly Role[] = ["owner", "detailer", "inspector", "fitter"];

/** y = may, n = may not; owner, detailer, inspector, fitter. */
const TABLE: readonly (readonly [Permission, string])[] = [
  ["shop.change", "ynnn"],
  ["shop.read", "yyyy"],
  ["take-outs.change", "ynnn"],
  ["copies.withdraw", "yyyy"],
  ["packages.make", "yyyy"],
  ["packages.receipt", "yyyn"],
  ["nests.read", "yyyy"],
  ["nests.change", "yynn"],
  ["log.read", "yyyn"],
  ["lines.change", "yynn"],
  ["lines.read", "yyyn"],
  ["jobs.list", "yyyy"],
  ["issued.read", "yyyy"],
  ["revisions.submit", "yynn"],
  ["revisions.review", "yyyn"],
  ["revisions.decide", "ynyn"],
  ["revisions.hold", "ynyn"],
  ["work.record", "yyyy"],
  ["surveys.change", "yyyy"],
  ["sheets.print", "yyyy"],
];

const WORK: readonly (readonly [WorkKind, string])[] = [
  ["cut", "ynyy"],
  ["fit-up", "ynyy"],
  ["weld", "ynyy"],
  ["visual", "ynyn"],
  ["actual", "yyyy"],
];

describe("permissions", () => {
  test("the table has a row for every permission", () => {
    expect(TABLE.map(([permission]) => permission).sort()).toEqual(Object.keys(PERMISSIONS).sort());
  });

  test.each(TABLE)("%s", (permission, row) => {
    expect(ROLES.map((role) => (canDo(role, permission) ? "y" : "n")).join("")).toBe(row);
    expect(refusalOf(permission)).toMatch(/^[A-Z].+\.$/);
  });

  test.each(WORK)("recording %s", (kind, row) => {
    expect(ROLES.map((role) => (canRecord(role, kind) ? "y" : "n")).join("")).toBe(row);
    expect(workRefusalOf(kind)).toMatch(/^[A-Z].+\.$/);
  });
});
