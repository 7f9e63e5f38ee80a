import { z } from "zod";
import { takePackage } from "@/lib/commands/change-packages";
import { packageToTake } from "@/lib/queries/package-file";
import { idSchema } from "@/lib/rules/write-bodies";
import { runCommand } from "@/lib/server/command";
import { read } from "@/lib/server/read";
import { openPackage, packageHead } from "@/lib/server/package-answer";

const params = z.object({ packageId: idSchema });
/** One whose sheets are not all current is handed out for the record only, when asked for as such. */
const query = z.object({ outdated: z.literal("1").optional() });

/**
 * The package as a stream. Every sheet in it counts as printed by whoever takes it, or any part of it. Asked by HEAD, which
 * is answered here too, it tells size and name, and nothing counts as taken.
 */
export const GET = read("packages.make", {
  params,
  query,
  run: async (viewer, { params, query, request }) => {
    const found = await packageToTake(viewer, params.packageId, query.outdated === "1");
    if (request.method === "HEAD") return packageHead(found);
    return openPackage(found, request, (isBeginning) => runCommand(viewer, "logged", (context) => takePackage(context, found.one, isBeginning)));
  },
});
