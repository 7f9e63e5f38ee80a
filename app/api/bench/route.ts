import { benchRows } from "@/lib/queries/bench-rows";
import { read } from "@/lib/server/read";

export const GET = read("issued.read", { run: (viewer) => benchRows(viewer) });
