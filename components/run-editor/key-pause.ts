"use client";
/** Big changes of the page wait for a pause between keys: the echo of a key is never behind a new drawing. */

/** Nobody types so slowly within a word, ms. */
const PAUSE_MS = 220;
/** Longest a change is held back while somebody types on, ms. */
const MOST_HELD_MS = 10_000;

let lastKey = -Infinity;
let listening = false;

function listen(): void {
  if (listening) return;
  listening = true;
  window.addEventListener("keydown", () => (lastKey = performance.now()), { capture: true, passive: true });
}

/** Holds the newest change until the keys rest; older ones it replaces are dropped. */
export class KeyPause {
  private timer: ReturnType<typeof setTimeout> | null = null;
  private change: (() => void) | null = null;
  private since = 0;

  constructor() {
    listen();
  }

  hold(change: () => void): void {
    if (this.change === null) this.since = performance.now();
    this.change = change;
    this.look();
  }

  private look(): void {
    if (this.timer !== null) clearTimeout(this.timer);
    this.timer = null;
    const now = performance.now();
    const wait = Math.min(lastKey + PAUSE_MS - now, this.since + MOST_HELD_MS - now);
    if (wait > 0) {
      this.timer = setTimeout(() => this.look(), wait);
      return;
    }
    const { change } = this;
    this.change = null;
    change?.();
  }

  close(): void {
    if (this.timer !== null) clearTimeout(this.timer);
    this.timer = null;
    this.change = null;
  }
}
