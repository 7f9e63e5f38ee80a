/** Runs in a worker thread of its own: does one task after another, bytes in and bytes out. */
import { parentPort } from "node:worker_threads";
import { workPackage, type PackageTask } from "@/lib/commands/prepare-package";

export interface ThreadQuestion {
  readonly id: number;
  readonly task: PackageTask;
}
export type ThreadAnswer = { readonly id: number } & ({ readonly bytes: Uint8Array; readonly pages: number } | { readonly problem: string });

/** Answers questions until the thread is ended. */
export function serveThread(): void {
  parentPort?.on("message", ({ id, task }: ThreadQuestion) => {
    workPackage(task).then(
      ({ bytes, pages }) => {
        const own = bytes.byteLength === bytes.buffer.byteLength ? bytes : bytes.slice();
        parentPort?.postMessage({ id, bytes: own, pages } satisfies ThreadAnswer, [own.buffer as ArrayBuffer]);
      },
      (error: unknown) => parentPort?.postMessage({ id, problem: error instanceof Error ? error.message : String(error) } satisfies ThreadAnswer),
    );
  });
}
