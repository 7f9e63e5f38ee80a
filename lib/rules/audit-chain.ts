/**
 * The chain of a shop's log: each entry's hash covers its own words and the hash before it, so that a changed, added
 * or missing entry breaks every hash after it; a cut tail shows against a head noted elsewhere. Pure: the hash
 * function is handed in (SHA-256, lower-case hex, of UTF-8 text).
 */
export interface ChainEntry {
  readonly shopId: string;
  readonly seq: number;
  /** ISO time with milliseconds. */
  readonly at: string;
  readonly actor: string | null;
  readonly type: string;
  /** JSON as stored, byte for byte. */
  readonly data: string;
  readonly prevHash: string;
}

export interface ChainHead {
  readonly seq: number;
  readonly hash: string;
}

/** What the first entry names as the hash before it. */
export const CHAIN_START = "0".repeat(64);

/** The text that is hashed: a JSON list, so that no two different entries give the same text. */
export function chainText(entry: ChainEntry): string {
  return JSON.stringify([1, entry.shopId, entry.seq, entry.at, entry.actor, entry.type, entry.data, entry.prevHash]);
}

/**
 * Where a chain breaks, as a sentence; null when it is whole. `entries` from the first on, in order; `known` are heads
 * noted elsewhere (in sheets, mails, the server's log): each must still be in the chain.
 */
export function chainBreak(
  entries: readonly (ChainEntry & { readonly hash: string })[],
  known: readonly ChainHead[],
  sha256: (text: string) => string,
): string | null {
  let prevHash = CHAIN_START;
  const hashes = new Map<number, string>();
  for (const [index, entry] of entries.entries()) {
    if (entry.seq !== index + 1) return `Entry ${index + 1} is missing from the log.`;
    if (entry.prevHash !== prevHash) return `Entry ${entry.seq} does not follow from the entry before it.`;
    if (entry.hash !== sha256(chainText(entry))) return `Entry ${entry.seq} was changed after it was written.`;
    hashes.set(entry.seq, entry.hash);
    prevHash = entry.hash;
  }
  return knownBreak(entries.length, hashes, known);
}

function knownBreak(length: number, hashes: ReadonlyMap<number, string>, known: readonly ChainHead[]): string | null {
  const latest = known.reduce((most, head) => Math.max(most, head.seq), 0);
  if (latest > length) return `The log ends at entry ${length}, but entry ${latest} was noted elsewhere: its newest entries were removed.`;
  const other = known.find((head) => hashes.get(head.seq) !== head.hash);
  return other === undefined ? null : `Entry ${other.seq} is not the one noted elsewhere: the log was rewritten.`;
}
