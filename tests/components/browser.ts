/** What jsdom lacks of a browser: the modal dialog. And a fetch whose answers a test writes. */
import { vi } from "vitest";

export function prepareDialogs(): void {
  HTMLDialogElement.prototype.showModal = function showModal() {
    this.open = true;
  };
  HTMLDialogElement.prototype.close = function close() {
    this.open = false;
    this.dispatchEvent(new Event("close"));
  };
}

export interface Sent {
  readonly method: string;
  readonly path: string;
  readonly body: unknown;
}

/** Answers every request with one status and body; what was sent is kept in order. */
export function answerWith(status: number, body: unknown): Sent[] {
  const sent: Sent[] = [];
  vi.stubGlobal("fetch", async (path: string, init?: RequestInit) => {
    sent.push({
      method: init?.method ?? "GET",
      path,
      body: typeof init?.body === "string" ? JSON.parse(init.body) : null,
    });
    return new Response(JSON.stringify(body), { status, headers: { "content-type": "application/json" } });
  });
  return sent;
}
