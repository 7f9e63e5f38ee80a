/** Threads that prepare packages: started when there is work, kept warm a while for the next, ended when there is none. */
import { availableParallelism } from "node:os";
import path from "node:path";
import { Worker } from "node:worker_threads";
import { settings } from "@/lib/server/settings";
import type { PackageTask, PackageWork } from "@/lib/commands/prepare-package";
import type { ThreadAnswer, ThreadQuestion } from "./package-thread";

/** The thread begins at a plain file outside the bundle, which brings in lib/jobs/package-thread.ts. */
const THREAD = ["scripts", "package-thread.mjs"] as const;
/** More threads than this wait for the store rather than for a processor. */
const MOST_BY_DEFAULT = 4;
/** A thread without work is ended after so long, ms. */
const IDLE_MS = 30_000;
/** One task takes seconds; a thread that is at one for longer is stuck, ms. */
const LONGEST_TASK_MS = 300_000;
/** What a thread's own objects may take, MB: a sheet or a whole package's pages, and little that is about to go. */
const LIMITS = { maxOldGenerationSizeMb: 64, maxYoungGenerationSizeMb: 2 } as const;

interface Waiting {
  readonly task: PackageTask;
  readonly transfer: readonly ArrayBuffer[];
  readonly resolve: (work: PackageWork) => void;
  readonly reject: (error: Error) => void;
}

/** How many threads this process prepares packages with. */
export function threadCount(): number {
  return settings().PACKAGE_THREADS ?? Math.min(MOST_BY_DEFAULT, availableParallelism());
}

/** A fixed number of threads, each at one task at a time. */
export class PackageThreads {
  /** How many there are at most. */
  readonly most: number;
  readonly #queue: Waiting[] = [];
  readonly #idle: PackageThread[] = [];
  readonly #all = new Set<PackageThread>();

  constructor(most: number) {
    this.most = most;
  }

  /** Does a task in the next thread that is free. The buffers are handed over, not copied. @throws what the task does, or when its thread ends. */
  run(task: PackageTask, transfer: readonly ArrayBuffer[] = []): Promise<PackageWork> {
    return new Promise((resolve, reject) => {
      this.#queue.push({ task, transfer, resolve, reject });
      this.#next();
    });
  }

  /** Ends all threads; what they were at is refused. */
  async end(): Promise<void> {
    for (const { reject } of this.#queue.splice(0)) reject(new Error("The threads were ended."));
    await Promise.all([...this.#all].map((thread) => thread.end()));
  }

  /** Ends the threads that have nothing to do but one: what follows is one thread's work, and the others' memory is wanted for it. */
  async keepOne(): Promise<void> {
    await Promise.all(this.#idle.splice(1).map((thread) => thread.end()));
  }

  #next(): void {
    while (this.#queue.length > 0) {
      const thread = this.#idle.pop() ?? (this.#all.size < this.most ? this.#start() : null);
      if (thread === null) return;
      const { task, transfer, resolve, reject } = this.#queue.shift()!;
      thread.work(task, transfer).then(resolve, reject).finally(() => {
        if (this.#all.has(thread)) this.#idle.push(thread);
        this.#next();
      });
    }
  }

  #start(): PackageThread {
    const thread: PackageThread = new PackageThread(() => {
      this.#all.delete(thread);
      const at = this.#idle.indexOf(thread);
      if (at >= 0) this.#idle.splice(at, 1);
    });
    this.#all.add(thread);
    return thread;
  }
}

class PackageThread {
  readonly #worker: Worker;
  #open: { readonly resolve: (work: PackageWork) => void; readonly reject: (error: Error) => void } | null = null;
  #timer: NodeJS.Timeout | null = null;
  #asked = 0;

  constructor(gone: () => void) {
    const file = path.join(/* turbopackIgnore: true */ process.cwd(), ...THREAD);
    this.#worker = new Worker(/* turbopackIgnore: true */ file, { execArgv: [], resourceLimits: LIMITS });
    this.#worker.on("message", (answer: ThreadAnswer) => this.#answered(answer));
    this.#worker.on("error", (error) => this.#refuse(error instanceof Error ? error : new Error(String(error))));
    this.#worker.on("exit", () => {
      if (this.#timer !== null) clearTimeout(this.#timer);
      gone();
      this.#refuse(new Error("A thread ended before its task."));
    });
  }

  work(task: PackageTask, transfer: readonly ArrayBuffer[]): Promise<PackageWork> {
    this.#worker.ref();
    this.#within(LONGEST_TASK_MS);
    this.#asked += 1;
    this.#worker.postMessage({ id: this.#asked, task } satisfies ThreadQuestion, [...transfer]);
    return new Promise((resolve, reject) => {
      this.#open = { resolve, reject };
    });
  }

  async end(): Promise<void> {
    await this.#worker.terminate();
  }

  #answered(answer: ThreadAnswer): void {
    const open = this.#open;
    this.#open = null;
    // A process with nothing else to do need not wait for idle threads.
    this.#worker.unref();
    this.#within(IDLE_MS);
    if ("problem" in answer) open?.reject(new Error(answer.problem));
    else open?.resolve({ bytes: answer.bytes, pages: answer.pages });
  }

  #refuse(error: Error): void {
    const open = this.#open;
    this.#open = null;
    open?.reject(error);
  }

  #within(ms: number): void {
    if (this.#timer !== null) clearTimeout(this.#timer);
    this.#timer = setTimeout(() => void this.#worker.terminate(), ms).unref();
  }
}

const shared = globalThis as typeof globalThis & { quarterlinePackageThreads?: PackageThreads };

/** The process's threads. */
export function packageThreads(): PackageThreads {
  shared.quarterlinePackageThreads ??= new PackageThreads(threadCount());
  return shared.quarterlinePackageThreads;
}
