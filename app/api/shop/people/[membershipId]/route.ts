import { z } from "zod";
import { changeRole, removePerson } from "@/lib/commands/change-people";
import { memberSchema } from "@/lib/rules/forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

const params = z.object({ membershipId: idSchema });

export const PATCH = write("shop.change", {
  params,
  body: memberSchema,
  run: (context, { params, body }) => changeRole(context, params.membershipId, body.role),
});

export const DELETE = write("shop.change", {
  params,
  run: (context, { params }) => removePerson(context, params.membershipId),
});
