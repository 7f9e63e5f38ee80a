"use client";
import { useMemo, useState } from "react";
import { INCH_MM, snapBetween, type CloseBetweenInput, type SnapChoice } from "@/iso";
import { Select } from "@/components/ui/field";

const ANGLES = [
  { value: "1", label: "1°" },
  { value: "0.5", label: "1/2°" },
  { value: "0.25", label: "1/4°" },
  { value: "0.1", label: "0.1°" },
];
const INCHES = [
  { value: String(INCH_MM / 8), label: "1/8 in" },
  { value: String(INCH_MM / 16), label: "1/16 in" },
  { value: String(INCH_MM / 32), label: "1/32 in" },
];
const MILLIMETRES = [
  { value: "5", label: "5 mm" },
  { value: "2", label: "2 mm" },
  { value: "1", label: "1 mm" },
];

const HEADS: Readonly<Record<SnapChoice["way"], { readonly head: string; readonly about: string }>> = {
  exact: { head: "Exact", about: "as solved" },
  snapped: { head: "Snapped", about: "the least mismatch overall" },
  square: { head: "Squarest", about: "each number rounded by itself" },
};

/** What the shop can cut: angles and length in its own steps, and how the piece then meets end 1. */
export function ClosingSnap({ input }: { readonly input: CloseBetweenInput }) {
  const metric = input.units === "metric";
  const [angle, setAngle] = useState("0.25");
  const [length, setLength] = useState(metric ? "1" : String(INCH_MM / 16));
  const choices = useMemo(() => snapBetween(input, { angleDeg: Number(angle), length: Number(length) }), [input, angle, length]);
  if (!choices) return null;
  return (
    <section className="mt-5" aria-labelledby="closing-snap">
      <h3 id="closing-snap" className="font-bold">In the shop&apos;s steps</h3>
      <div className="mt-2 flex flex-wrap gap-3">
        <Select label="Angles to" className="w-32" options={ANGLES} value={angle} onChange={(event) => setAngle(event.target.value)} />
        <Select label="Length to" className="w-32" options={metric ? MILLIMETRES : INCHES} value={length} onChange={(event) => setLength(event.target.value)} />
      </div>
      <div className="overflow-x-auto">
        <table className="ruled mt-3 text-sm">
          <caption className="sr-only">The closing exact and in the shop&apos;s steps</caption>
          <thead>
            <tr>
              <th scope="col">Cut</th>
              {choices.map(({ way }) => (
                <th key={way} scope="col">
                  {HEADS[way].head}
                  <span className="block font-normal text-soft">{HEADS[way].about}</span>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            <Line head="Elbow at end 0" choices={choices} of={(choice) => choice.angle0} />
            <Line head="Pipe" choices={choices} of={(choice) => choice.pipe} />
            <Line head="Elbow at end 1" choices={choices} of={(choice) => choice.angle1} />
            <Line head="Roll, looking along the pipe" choices={choices} of={(choice) => choice.roll} />
            <Line head="First elbow turned" choices={choices} of={(choice) => choice.firstRoll || "not"} />
            <Line head="Then" choices={choices} of={(choice) => choice.words} words />
          </tbody>
        </table>
      </div>
      <p className="mt-2 text-sm text-soft">
        Snapped misses least; Squarest keeps a flange square and lets the pipe miss more. The joint decides: a butt weld hides a small opening, bolts do not.
      </p>
    </section>
  );
}

interface LineProps {
  readonly head: string;
  readonly choices: readonly SnapChoice[];
  readonly of: (choice: SnapChoice) => string;
  readonly words?: boolean;
}

function Line({ head, choices, of, words }: LineProps) {
  return (
    <tr>
      <th scope="row" className="text-left font-normal">{head}</th>
      {choices.map((choice) => (
        <td key={choice.way} className={words ? "min-w-44" : "figure"}>{of(choice)}</td>
      ))}
    </tr>
  );
}
