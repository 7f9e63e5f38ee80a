/** Looks for packages whose worker fell silent, and puts them back into the queue. Any number of processes may look. */
import { requeueSilentPackages } from "@/lib/commands/finish-package";
import { log } from "@/lib/server/log";
import { settings } from "@/lib/server/settings";

/** Looks in the time a worker is believed without a word. */
const LOOKS_IN_SILENCE = 2;

const shared = globalThis as typeof globalThis & { quarterlinePackageWatch?: NodeJS.Timeout };

/** Begins to look. Safe to call twice. */
export function watchPackages(): void {
  shared.quarterlinePackageWatch ??= setInterval(() => void look(), (settings().PACKAGE_SILENCE_S * 1000) / LOOKS_IN_SILENCE).unref();
}

async function look(): Promise<void> {
  try {
    const found = await requeueSilentPackages();
    if (found > 0) log.warn({ found }, "packages whose worker fell silent were put back into the queue");
  } catch (error) {
    log.debug({ error }, "packages could not be looked at");
  }
}
