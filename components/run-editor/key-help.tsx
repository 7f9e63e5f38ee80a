"use client";
import { Dialog } from "@/components/ui/dialog";
import { KeyHint } from "@/components/ui/key-hint";
import type { UnitSystem } from "@/iso";
import { KEY_HELP } from "./cell-keys";
import { ITEM_WORDS } from "./item-words";

const MOVES: Readonly<Record<UnitSystem, readonly (readonly [string, string])[]>> = {
  imperial: [
    ["e 3-1 1/2", `3'-1 1/2" east; e3-1.5 is the same`],
    ["un 3-0", `3'-0" at 45° up-north`],
    ["n30e 4-0", `4'-0", 30° from north towards east`],
    ["045/30 4-0", `azimuth 45°, 30° up`],
    ["E 2-0 N 1-0 U 3", `several axes at once; a bare number is inches`],
    ["2-0, 1-0, 3", "east, north, up"],
    ["3-0", "straight on from the leg before"],
    ["@ 10-0, 0, 8-0", "a position on the line's own axes"],
    ["e 775mm", "the other unit, where it is named"],
  ],
  metric: [
    ["e 775", "775 mm east; e775 is the same"],
    ["un 900", "900 mm at 45° up-north"],
    ["n30e 1200", "1200 mm, 30° from north towards east"],
    ["045/30 1200", "azimuth 45°, 30° up"],
    ["E 600 N 300 U 75", "several axes at once; a bare number is millimetres"],
    ["600, 300, 75", "east, north, up"],
    ["900", "straight on from the leg before"],
    ["@ 3000, 0, 2400", "a position on the line's own axes"],
    [`e 30 1/2"`, "the other unit, where it is named"],
  ],
};

/** What to type and what the keys do. */
export function KeyHelp({ open, units, onClose }: { readonly open: boolean; readonly units: UnitSystem; readonly onClose: () => void }) {
  return (
    <Dialog open={open} onClose={onClose} title="Typing a run" wide>
      <div className="grid gap-6 md:grid-cols-2">
        <section>
          <h3 className="mb-2">Move</h3>
          <dl className="grid grid-cols-[minmax(7rem,auto)_1fr] gap-x-4 gap-y-1.5 text-sm">
            {MOVES[units].map(([text, does]) => (
              <Pair key={text} text={text} does={does} />
            ))}
          </dl>
          <h3 className="mt-5 mb-2">Joint and Source</h3>
          <p className="text-sm">
            Joint: <b className="figure">shop</b>, <b className="figure">field</b> or <b className="figure">fit</b>, with <b className="figure">in</b>, <b className="figure">out</b> or <b className="figure">branch</b> for the weld meant, or <b className="figure">bolts</b> for the bolted faces. Source: <b className="figure">m</b> measured, <b className="figure">d</b> from drawing, <b className="figure">c</b> calculated, <b className="figure">a</b> assumed.
          </p>
        </section>
        <section>
          <h3 className="mb-2">Keys</h3>
          <ul className="space-y-1.5 text-sm">
            {KEY_HELP.map((row) => (
              <li key={row.does}>
                {row.keys.map((key) => (
                  <span key={key} className="mr-1.5">
                    <KeyHint keys={key} />
                  </span>
                ))}
                {row.does}
              </li>
            ))}
          </ul>
        </section>
        <section className="md:col-span-2">
          <h3 className="mb-2">Items</h3>
          <dl className="grid gap-x-6 gap-y-1.5 text-sm sm:grid-cols-2">
            {ITEM_WORDS.map((word) => (
              <div key={word.word} className="grid grid-cols-[5rem_1fr] gap-x-3">
                <Pair text={word.word} does={word.after ? `${word.name} (${word.after})` : word.name} />
              </div>
            ))}
          </dl>
        </section>
      </div>
    </Dialog>
  );
}

function Pair({ text, does }: { readonly text: string; readonly does: string }) {
  return (
    <>
      <dt className="figure font-medium">{text}</dt>
      <dd className="text-soft">{does}</dd>
    </>
  );
}
