/** A key to press, as on the keyboard. */
export function KeyHint({ keys }: { readonly keys: string }) {
  return (
    <kbd className="figure inline-block min-w-6 border border-rule border-b-2 bg-sheet px-1.5 text-center text-xs leading-5">
      {keys}
    </kbd>
  );
}
