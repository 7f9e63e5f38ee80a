import { z } from "zod";
import { auditPage } from "@/lib/queries/audit-page";
import { read } from "@/lib/server/read";

const query = z.object({ before: z.coerce.number().int().min(1).max(Number.MAX_SAFE_INTEGER).optional() });

export const GET = read("log.read", { query, run: (viewer, { query }) => auditPage(viewer, query.before ?? null) });
