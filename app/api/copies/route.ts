import { ownWithdrawals } from "@/lib/queries/copies-out";
import { read } from "@/lib/server/read";

/** Copies in the viewer's own name that have to come back. */
export const GET = read("issued.read", { run: (viewer) => ownWithdrawals(viewer) });
