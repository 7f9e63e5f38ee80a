/** Plant north against true north, drawn so that a slip of sign is seen. True north points up the page. */
export function NorthDial({ degrees }: { readonly degrees: number }) {
  const turn = Number.isFinite(degrees) ? degrees : 0;
  return (
    <svg
      viewBox="0 0 150 96"
      role="img"
      aria-label={`Plant north lies ${turn} degrees clockwise from true north`}
      className="h-24 w-38 self-end"
      fill="none"
      stroke="currentColor"
    >
      <circle cx="48" cy="50" r="38" className="text-hair" />
      <path d="M48 96V4M48 4l-4 8M48 4l4 8" strokeDasharray="4 3" className="text-soft" />
      <text x="58" y="10" className="fill-soft text-[11px]" stroke="none">
        true N
      </text>
      <g transform={`rotate(${turn} 48 50)`} className="text-dye" strokeWidth="2.6">
        <path d="M48 84V16M48 16l-7 12M48 16l7 12" />
      </g>
      <text x="92" y="56" className="fill-dye text-[12px] font-bold" stroke="none">
        PLANT N
      </text>
    </svg>
  );
}
