/** Spools of lines with the state of their newest revision. */
import { QueryTypes } from "sequelize";
import type { SpoolRow } from "@/lib/rules/api-types";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import { getDb } from "@/lib/server/database";
import type { ShopMember } from "@/lib/server/scope";

const SPOOLS = `
SELECT s.id, s.line_id AS "lineId", s.letter, s.sheet_number AS "sheetNumber", r.state, r.hold, r.code
FROM spools s
LEFT JOIN LATERAL (
  SELECT state, hold, code FROM revisions r
  WHERE r.shop_id = s.shop_id AND r.spool_id = s.id AND (NOT $issuedOnly::boolean OR r.state IN ('for-fabrication', 'as-built'))
  ORDER BY r.ordinal DESC LIMIT 1
) r ON true
WHERE s.shop_id = $shopId AND s.line_id = ANY($lineIds::uuid[]) AND (NOT $issuedOnly::boolean OR r.state IS NOT NULL)
ORDER BY length(s.letter), s.letter`;

interface Row {
  readonly id: string;
  readonly lineId: string;
  readonly letter: string;
  readonly sheetNumber: number | null;
  readonly state: SpoolRow["state"] | null;
  readonly hold: boolean | null;
  readonly code: string | null;
}

/**
 * Spools by line id.
 * @param issuedOnly leaves out what was never issued, for those who see issued sheets only.
 */
export async function spoolRowsByLine({ shopId }: ShopMember, lineIds: readonly string[], issuedOnly: boolean): Promise<ReadonlyMap<string, SpoolRow[]>> {
  const rows = await getDb().query<Row>(SPOOLS, { bind: { shopId, lineIds, issuedOnly }, type: QueryTypes.SELECT });
  const byLine = new Map<string, SpoolRow[]>();
  for (const row of rows) {
    const spool: SpoolRow = {
      id: row.id,
      letter: row.letter,
      sheetNumber: row.sheetNumber === null ? null : sheetNumberText(row.sheetNumber),
      state: row.state ?? "draft",
      hold: row.hold ?? false,
      code: row.code,
    };
    byLine.set(row.lineId, [...(byLine.get(row.lineId) ?? []), spool]);
  }
  return byLine;
}
