import { addOffcut } from "@/lib/commands/change-offcuts";
import { offcutRows } from "@/lib/queries/nest-rows";
import { offcutNewSchema } from "@/lib/rules/nest-forms";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

export const GET = read("shop.read", { run: (viewer) => offcutRows(viewer) });

export const POST = write("shop.change", { body: offcutNewSchema, status: 201, run: (context, { body }) => addOffcut(context, body) });
