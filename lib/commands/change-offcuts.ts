/** Offcuts put on the rack by hand, or taken off it. A row is never changed: a wrong one is taken off and entered again. */
import type { OffcutNewForm } from "@/lib/rules/nest-forms";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { Offcut } from "@/models";
import { offcutWord } from "./change-nests";

export async function addOffcut(context: CommandContext, form: OffcutNewForm): Promise<{ id: string }> {
  const { viewer, tx, now } = context;
  const offcut = await inShop(viewer).add(Offcut, { ...form, addedBy: viewer.personId, addedAt: now }, tx);
  context.audit({ type: "offcut.added", data: { offcutId: offcut.id, what: offcutWord(offcut) } });
  return { id: offcut.id };
}

/** @throws Refusal 404; 409 when it is off the rack. */
export async function removeOffcut(context: CommandContext, offcutId: string): Promise<void> {
  const { viewer, tx, now } = context;
  const offcut = await inShop(viewer).locked(Offcut, offcutId, tx);
  if (offcut.goneAt !== null) throw refuseConflict("This offcut is off the rack already.");
  await offcut.update({ goneAt: now, goneBy: viewer.personId, goneWhy: "Taken off by hand." }, { transaction: tx });
  context.audit({ type: "offcut.gone", data: { offcutId, what: offcutWord(offcut), reason: "Taken off by hand." } });
}
