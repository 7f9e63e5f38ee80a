import { recordTakeOut } from "@/lib/commands/change-shop";
import { takeOutWords } from "@/lib/queries/take-out-words";
import { takeOutSchema } from "@/lib/rules/forms";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

export const GET = read("shop.read", { run: (viewer) => takeOutWords(viewer) });

export const POST = write("take-outs.change", {
  body: takeOutSchema,
  status: 201,
  run: (context, { body }) => recordTakeOut(context, body),
});
