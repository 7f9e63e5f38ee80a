"use client";
import { formatLength, type SurveyFinding, type SurveyResult, type UnitSystem } from "@/iso";
import { ButtonLink } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";

const TONES: Readonly<Record<SurveyFinding["tone"], { tone: "trouble" | "caution" | "note"; word: string }>> = {
  wrong: { tone: "trouble", word: "Measure again" },
  caution: { tone: "caution", word: "Caution" },
  note: { tone: "note", word: "Note" },
};
/** Findings that ask for something else than another measurement. */
const ENTRY_CODES = ["not-read", "same-mark", "zero-length", "end", "ends-clash", "unit-slip", "loose", "mirror"];

/**
 * What the readings come to: remarks first, then marks with how well each is known.
 * @param lineId line to close between its ends; null for those who do not see it.
 */
export function ResultPanel({ result, units, lineId }: { readonly result: SurveyResult; readonly units: UnitSystem; readonly lineId: string | null }) {
  const { adjustment } = result;
  const within = (mm: number) => `± ${formatLength(mm, units)}`;
  return (
    <section aria-label="Result">
      <h2 className="mb-2">Result</h2>
      {adjustment ? (
        <p className="mb-2">
          {adjustment.redundancy > 0
            ? `${adjustment.redundancy} ${adjustment.redundancy === 1 ? "reading" : "readings"} more than needed; ${adjustment.fits ? "all fit within their tolerances." : "they do not fit within their tolerances."}`
            : "No reading more than needed: a slip would not show. Measure something twice, or one way more."}
        </p>
      ) : (
        <p className="text-soft">The marks stand here once something was read.</p>
      )}
      <div className="space-y-2">
        {result.findings.map((finding) => (
          <Notice key={`${finding.code}${finding.sentence}`} tone={TONES[finding.tone].tone} word={finding.tone === "wrong" && ENTRY_CODES.includes(finding.code) ? "Look again" : TONES[finding.tone].word}>
            {finding.sentence}
          </Notice>
        ))}
      </div>
      {result.marks.length > 0 ? (
        <table className="ruled mt-3" data-stack="">
          <thead>
            <tr><th>Mark</th><th>E</th><th>N</th><th>U</th></tr>
          </thead>
          <tbody>
            {result.marks.map(({ name, position, within: off }) => (
              <tr key={name}>
                <td data-label="Mark" className="figure font-medium">{name}</td>
                {position.map((mm, axis) => (
                  <td key={axis} data-label={"ENU"[axis]} className="figure">
                    {off ? <>{formatLength(mm, units)} <span className="text-soft">{within(off[axis]!)}</span></> : "hangs loose"}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      ) : null}
      {result.ends.length >= 2 && lineId !== null ? (
        <p className="mt-4">
          <ButtonLink tone="primary" href={`/lines/${lineId}?close=${result.ends[0]!.id},${result.ends[1]!.id}`}>Close between {result.ends[0]!.name} and {result.ends[1]!.name}</ButtonLink>
        </p>
      ) : null}
    </section>
  );
}
