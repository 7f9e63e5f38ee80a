/** What every cell's reader answers: the value with its echo, or one sentence that says what to type. */
export type EntryResult<T> =
  | { readonly ok: true; readonly value: T; readonly understood: string }
  | { readonly ok: false; readonly message: string };

export function understood<T>(value: T, words: string): EntryResult<T> {
  return { ok: true, value, understood: words };
}

export function refused(message: string): { readonly ok: false; readonly message: string } {
  return { ok: false, message };
}
