/** The mark: a pipe seen end on with its four quarter lines. */
export function Mark({ className }: { readonly className?: string }) {
  return (
    <svg aria-hidden viewBox="0 0 32 32" className={className} fill="none" stroke="currentColor">
      <circle cx="16" cy="16" r="10" strokeWidth="2.6" />
      <path d="M16 1v8M16 23v8M1 16h8M23 16h8" strokeWidth="2.6" />
    </svg>
  );
}
