/** Asks for drawings one at a time; what was asked for meanwhile is drawn last, everything between is skipped. */
import { drawLine, type DrawAnswer, type DrawRequest } from "./draw-line";

export type DrawAsk = Omit<DrawRequest, "id">;

export class DrawingQueue {
  private worker: Worker | null = null;
  private busy = false;
  private next: DrawAsk | null = null;
  private serial = 0;
  private closed = false;
  private current: DrawAsk | null = null;

  /** @param report gets each drawing with what was asked for. */
  constructor(private readonly report: (ask: DrawAsk, answer: DrawAnswer) => void) {
    this.worker = startWorker();
    if (!this.worker) return;
    this.worker.onmessage = (event: MessageEvent<DrawAnswer>) => this.answered(event.data);
    // A browser that refuses the worker draws on the page instead.
    this.worker.onerror = () => {
      this.worker?.terminate();
      this.worker = null;
      if (this.current) this.drawHere(this.current);
    };
  }

  ask(ask: DrawAsk): void {
    if (this.busy) {
      this.next = ask;
      return;
    }
    this.busy = true;
    this.current = ask;
    this.serial += 1;
    if (this.worker) this.worker.postMessage({ id: this.serial, ...ask });
    else this.drawHere(ask);
  }

  private drawHere(ask: DrawAsk): void {
    setTimeout(() => this.answered({ id: this.serial, drawing: this.closed ? null : drawLine(ask.model, ask.room, ask.view) }), 0);
  }

  private answered(answer: DrawAnswer): void {
    const asked = this.current;
    if (this.closed || !asked) return;
    this.busy = false;
    this.report(asked, answer);
    const next = this.next;
    this.next = null;
    if (next) this.ask(next);
  }

  close(): void {
    this.closed = true;
    this.worker?.terminate();
    this.worker = null;
  }
}

function startWorker(): Worker | null {
  if (typeof Worker === "undefined") return null;
  try {
    return new Worker(new URL("./drawing-worker.ts", import.meta.url), { type: "module", name: "isometric" });
  } catch {
    return null;
  }
}
