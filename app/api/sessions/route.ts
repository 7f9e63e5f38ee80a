import { sessionRows } from "@/lib/queries/account";
import { read } from "@/lib/server/read";

export const GET = read("shop.read", { run: sessionRows });
