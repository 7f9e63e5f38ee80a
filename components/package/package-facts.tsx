import { SHEET_PART_WORDS } from "@/iso";
import { Section } from "@/components/ui/section";
import { timeText } from "@/components/ui/format";
import type { PackageDetail } from "@/lib/rules/packages";

/** What was asked for: which pages, as copies or originals, and of a transmittal for whom and what for. */
export function PackageFacts({ one }: { readonly one: PackageDetail }) {
  const { facts, receipt, options } = one;
  const parts = ["Spool sheets as issued", ...options.extras.map((part) => SHEET_PART_WORDS[part])].join(", ");
  const rows: [string, string][] = [
    ["Pages", parts],
    ["Copies", options.copies === "originals" ? "Signed originals, unaltered" : "Marked copies; signatures stay with the originals"],
  ];
  if (facts) {
    rows.push(["To", facts.recipient], ["Purpose", facts.purpose], ["Date", facts.date], ["Reply by", facts.replyBy || "no reply asked for"]);
    if (facts.remark) rows.push(["Remark", facts.remark]);
    rows.push(["Acknowledged", receipt ? `${receipt.receivedBy}, ${receipt.receivedOn}${receipt.remark ? `: ${receipt.remark}` : ""} (noted by ${receipt.by}, ${timeText(receipt.at)})` : "not yet"]);
  }
  return (
    <Section title={facts ? "Transmittal" : "Package"}>
      <dl className="grid grid-cols-[auto_1fr] gap-x-6 gap-y-1">
        {rows.map(([label, value]) => (
          <div key={label} className="contents">
            <dt className="text-soft">{label}</dt>
            <dd className="min-w-0 break-words">{value}</dd>
          </div>
        ))}
      </dl>
    </Section>
  );
}
