import { openShop } from "@/lib/commands/open-shop";
import { signUpSchema } from "@/lib/rules/forms";
import { addressOf } from "@/lib/server/request-facts";
import { askingLimit, countTry } from "@/lib/server/throttle";
import { writePublic } from "@/lib/server/write";

export const POST = writePublic({
  body: signUpSchema,
  status: 201,
  before: (_viewer, { request }) => countTry([askingLimit("sign-up", addressOf(request.headers))], new Date()),
  run: async (context, { body }) => {
    await openShop(context, body);
    return { ok: true };
  },
});
