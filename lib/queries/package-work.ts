/** What a part of a package is made from: the stored sheets' bytes, and for made pages their frozen inputs. */
import { Op } from "sequelize";
import type { SheetInput, SheetSetExtras } from "@/iso";
import type { PackageSource } from "@/lib/rules/packages";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { getObject, objectKey } from "@/lib/server/storage";
import { RevisionInput } from "@/models";
import { stockPlaces } from "./stock-places";
import { workEntries } from "./work-entries";

/** Sheets from `from` to before `to`, in order. @throws when one is missing from the store or does not match its hash. */
export async function sheetWorks(member: ShopMember, source: PackageSource, from: number, to: number) {
  const sheets = source.sheets.slice(from, to);
  const inputs = source.extras.length === 0 ? [] : await inShop(member).all(RevisionInput, { revisionId: { [Op.in]: sheets.map((sheet) => sheet.revisionId) } });
  const logos = new Map<string, Uint8Array | null>();
  return Promise.all(sheets.map(async (packed, index) => {
    const { revisionId, spoolId, kind } = packed;
    const stored = await getObject(packed.objectKey);
    if (stored === null) throw new Error("A stored sheet is missing from the object store.");
    const input = inputs.find((one) => one.revisionId === revisionId && one.kind === kind)?.input;
    const set = input === undefined ? null : { input, extras: await extrasOf(member, source, spoolId), logo: await logoOf(member, input, logos) };
    return { ordinal: from + index, packed, stored: owned(stored), set };
  }));
}

/** What the shop had recorded when the package was asked for: stock of locked plans, and work. */
async function extrasOf(member: ShopMember, { printedAt }: PackageSource, spoolId: string): Promise<SheetSetExtras> {
  const entries = (await workEntries(member, spoolId)).filter((entry) => entry.at <= printedAt);
  return { stock: await stockPlaces(member, spoolId), work: { entries, readAt: printedAt } };
}

/** Bytes with a buffer of their own, to be handed over to a thread. */
function owned(bytes: Uint8Array): Uint8Array {
  return bytes.byteLength === bytes.buffer.byteLength ? bytes : bytes.slice();
}

async function logoOf({ shopId }: ShopMember, input: string, known: Map<string, Uint8Array | null>): Promise<Uint8Array | null> {
  const { logo } = (JSON.parse(input) as SheetInput).titleBlock;
  if (logo === null) return null;
  if (!known.has(logo.key)) known.set(logo.key, await getObject(objectKey(shopId, logo.key)));
  return known.get(logo.key) ?? null;
}
