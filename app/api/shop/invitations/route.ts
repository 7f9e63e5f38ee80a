import { invitePerson } from "@/lib/commands/invite-person";
import { invitationRows } from "@/lib/queries/account";
import { inviteSchema } from "@/lib/rules/forms";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

export const GET = read("shop.read", { run: invitationRows });

export const POST = write("shop.change", {
  body: inviteSchema,
  status: 201,
  run: (context, { body }) => invitePerson(context, body),
});
