/** What jsdom lacks of a browser: the modal dialog. And a fetch whose answers a test writes. */
import { configure } from "@testing-library/react";
import { vi } from "vitest";

/** A busy machine may take seconds to answer a press; a failure still shows, only later. */
configure({ asyncUtilTimeout: 15_000 });

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
