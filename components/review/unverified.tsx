"use client";
import { Check } from "@/components/ui/field";
import type { ReviewDetail } from "@/lib/rules/api-types";

export interface UnverifiedProps {
  readonly dimensions: ReviewDetail["unverified"];
  readonly accepted: ReadonlySet<string>;
  readonly onToggle: (pointId: string) => void;
  readonly mayAccept: boolean;
  /** Whose name the acceptance carries. */
  readonly name: string;
}

/** Assumed numbers and single readings; each blocks release until the signer accepts it by name. */
export function Unverified({ dimensions, accepted, onToggle, mayAccept, name }: UnverifiedProps) {
  if (dimensions.length === 0)
    return (
      <p className="text-soft">
        None. Every dimension was measured twice, taken from a drawing or calculated.
      </p>
    );
  return (
    <>
      <p className="mb-1">
        <strong>VIF.</strong>{" "}
        {mayAccept
          ? `Each blocks release until you, ${name}, accept it. Your name is printed beside it.`
          : "Each blocks release until the signer accepts it by name."}
      </p>
      <ul>
        {dimensions.map((dimension) => (
          <li key={dimension.pointId} className="border-b border-hair last:border-b-0">
            {mayAccept ? (
              <Check
                checked={accepted.has(dimension.pointId)}
                onChange={() => onToggle(dimension.pointId)}
                label={<span>Accept {dimension.text}</span>}
              />
            ) : (
              <p className="py-2">{dimension.text}</p>
            )}
          </li>
        ))}
      </ul>
    </>
  );
}
