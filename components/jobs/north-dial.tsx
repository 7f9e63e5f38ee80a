/** Plant north against true north, drawn so that a slip of sign is seen. True north points up the page. */
export function NorthDial({ degrees }: { readonly degrees: number }) {
  const turn = Number.isFinite(degrees) ? degrees : 0;
  return (
    <svg viewBox="0 0 120 84" role="img" aria-label={`Plant north lies ${turn} degrees clockwise from true north`} className="h-21 w-30 self-end" fill="none" stroke="currentColor">
      <path d="M44 78V10M44 10l-4 9M44 10l4 9" strokeDasharray="3 2" className="text-soft" />
      <text x="52" y="14" className="fill-soft text-[9px]" stroke="none">
        true N
      </text>
      <g transform={`rotate(${turn} 44 50)`} className="text-dye" strokeWidth="2.4">
        <path d="M44 76V18M44 18l-6 11M44 18l6 11" />
      </g>
      <text x="64" y="76" className="fill-dye text-[11px] font-bold" stroke="none">
        PLANT N
      </text>
    </svg>
  );
}
