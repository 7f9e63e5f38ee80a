import { z } from "zod";
import { logoFile } from "@/lib/queries/stored-files";
import { read } from "@/lib/server/read";

const params = z.object({ key: z.string().regex(/^[0-9a-f]{64}$/) });

export const GET = read("shop.read", { params, run: (viewer, { params }) => logoFile(viewer, params.key) });
