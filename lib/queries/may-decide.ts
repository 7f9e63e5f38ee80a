/** Whether somebody may sign or return a revision: never one's own. Used by pages to explain and by commands to refuse. */
import type { Transaction } from "sequelize";
import type { Role } from "@/lib/rules/api-types";
import { canDo } from "@/lib/rules/permissions";
import { signRefusal } from "@/lib/rules/revision-rules";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { Membership, type Revision } from "@/models";
import { touchedBy } from "./revision-facts";
import { takeOutTouches } from "./take-out-touches";

/** Why this person may not sign or return `revision`, as a sentence; null when they may. */
export async function decideRefusal(
  viewer: ShopMember & { readonly personId: string; readonly role: Role },
  lineId: string,
  revisions: readonly Revision[],
  revision: Revision,
  tx: Transaction | null = null,
): Promise<string | null> {
  const before = revisions.filter((r) => r.ordinal < revision.ordinal);
  const members = await inShop(viewer).all(Membership, { removedAt: null }, tx);
  return signRefusal({
    role: viewer.role,
    personId: viewer.personId,
    state: revision.state,
    hold: revision.hold,
    submittedById: revision.submittedBy,
    touchedByIds: [
      ...(await touchedBy(viewer, lineId, before, revision.lineVersion, tx)),
      ...(await takeOutTouches(viewer, revision, before, tx)),
    ],
    othersWhoMaySign: members.filter((m) => m.personId !== viewer.personId && canDo(m.role, "revisions.decide")).length,
  });
}
