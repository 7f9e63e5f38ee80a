/** Asks a worker one thing at a time; what was asked for meanwhile is done last, everything between is skipped. */
export interface QueueWork<Ask, Answer> {
  /** null where the browser has no workers. */
  readonly start: () => Worker | null;
  /** What is sent of an ask. */
  readonly sent: (ask: Ask) => unknown;
  /** The same work on the page, where there is no worker. */
  readonly here: (ask: Ask) => Answer;
  readonly report: (ask: Ask, answer: Answer) => void;
}

export class LatestQueue<Ask, Answer> {
  private worker: Worker | null;
  private next: Ask | null = null;
  private current: Ask | null = null;
  private closed = false;

  constructor(private readonly work: QueueWork<Ask, Answer>) {
    this.worker = work.start();
    if (!this.worker) return;
    this.worker.onmessage = (event: MessageEvent<Answer>) => this.answered(event.data);
    // A browser that refuses the worker works on the page instead.
    this.worker.onerror = () => {
      this.worker?.terminate();
      this.worker = null;
      if (this.current !== null) this.doHere(this.current);
    };
  }

  ask(ask: Ask): void {
    if (this.current !== null) {
      this.next = ask;
      return;
    }
    this.current = ask;
    if (this.worker) this.worker.postMessage(this.work.sent(ask));
    else this.doHere(ask);
  }

  private doHere(ask: Ask): void {
    setTimeout(() => {
      if (!this.closed) this.answered(this.work.here(ask));
    }, 0);
  }

  private answered(answer: Answer): void {
    const asked = this.current;
    if (this.closed || asked === null) return;
    this.current = null;
    this.work.report(asked, answer);
    const next = this.next;
    this.next = null;
    if (next !== null) this.ask(next);
  }

  close(): void {
    this.closed = true;
    this.worker?.terminate();
    this.worker = null;
  }
}

/** Runs a worker's start; null where it cannot be. */
export function workerOrNull(start: () => Worker): Worker | null {
  if (typeof Worker === "undefined") return null;
  try {
    return start();
  } catch {
    return null;
  }
}
