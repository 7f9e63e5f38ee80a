/** Runs the search of three elbows in a worker: one at a time, with news, and ended when asked. */
import type { WaysInput } from "@/iso";
import type { WaySearchNews, WaySearchRequest } from "./way-messages";

export interface WaySearchWork {
  /** null where the browser has no workers. */
  readonly start: () => Worker | null;
  /** The same search on the page, where there is no worker. */
  readonly here: (request: WaySearchRequest, tell: (news: WaySearchNews) => void) => void;
  readonly report: (news: WaySearchNews) => void;
}

/** A cancelled search reports nothing more: its worker is ended, and a late word of an earlier search is not passed on. */
export class WaySearch {
  private worker: Worker | null = null;
  private serial = 0;

  constructor(private readonly work: WaySearchWork) {}

  ask(input: WaysInput): void {
    this.cancel();
    const request = { id: this.serial, input };
    const tell = (news: WaySearchNews): void => {
      if (news.id !== this.serial) return;
      this.work.report(news);
      if (news.finished) this.end();
    };
    this.worker = this.work.start();
    if (!this.worker) return this.doHere(request, tell);
    this.worker.onmessage = (event: MessageEvent<WaySearchNews>) => tell(event.data);
    // A browser that refuses the worker searches on the page instead.
    this.worker.onerror = () => {
      this.end();
      this.doHere(request, tell);
    };
    this.worker.postMessage(request);
  }

  private doHere(request: WaySearchRequest, tell: (news: WaySearchNews) => void): void {
    setTimeout(() => {
      if (request.id === this.serial) this.work.here(request, tell);
    }, 0);
  }

  private end(): void {
    this.worker?.terminate();
    this.worker = null;
  }

  /** Stops what is being searched; what was told so far stands. */
  cancel(): void {
    this.serial += 1;
    this.end();
  }
}
