"use client";
import { Dialog } from "@/components/ui/dialog";
import { KeyHint } from "@/components/ui/key-hint";
import type { UnitSystem } from "@/iso";
import { KEY_HELP } from "./cell-keys";
import { ITEM_GROUPS, ITEM_WORDS } from "./item-words";

const MOVES: Readonly<Record<UnitSystem, readonly (readonly [string, string])[]>> = {
  imperial: [
    ["e 3-1 1/2", `3'-1 1/2" east; e3-1.5 is the same`],
    ["un 3-0", `3'-0" at 45° up-north`],
    ["n30e 4-0", `4'-0", 30° from north towards east`],
    ["045/30 4-0", `azimuth 45°, 30° up`],
    ["E 2-0 N 1-0 U 3", `several axes at once; a bare number is inches`],
    ["2-0, 1-0, 3", "east, north, up"],
    ["3-0", "straight on from the leg before"],
    ["e 10-0 @ 1:100", "a level length and its slope: %, 1:n, in/ft; @ down 2% falls"],
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
    ["e 3000 @ 1:100", "a level length and its slope: %, 1:n, mm/m; @ down 2% falls"],
    ["@ 3000, 0, 2400", "a position on the line's own axes"],
    [`e 30 1/2"`, "the other unit, where it is named"],
  ],
};

const DRAWING_HELP: readonly (readonly [string, string])[] = [
  ["Press a number", "edits it there; Enter takes it, Esc leaves it"],
  ["Page Up", "and Page Down go from point to point"],
  ["Enter", "edits the number of the current row"],
  ["+", "closer; - wider; 0 shows all; the arrows move the look"],
];

const AFTER_ITEM: readonly (readonly [string, string])[] = [
  ["+ spec B2", "a specification break from here on"],
  ["+ mat A312 TP304", "another material from here on"],
  ["+ ins 2 in", "insulation from here on; + trace for tracing"],
  ["meet 7", "in a run's last row: it comes back to row 7 and closes a loop"],
];

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
        <section>
          <h3 className="mb-2">On the drawing</h3>
          <ul className="space-y-1.5 text-sm">
            {DRAWING_HELP.map(([key, does]) => (
              <li key={key}>
                <span className="mr-1.5"><KeyHint keys={key} /></span>
                {does}
              </li>
            ))}
          </ul>
        </section>
        <section>
          <h3 className="mb-2">After an item, or alone</h3>
          <dl className="grid grid-cols-[minmax(7rem,auto)_1fr] gap-x-4 gap-y-1.5 text-sm">
            {AFTER_ITEM.map(([text, does]) => (
              <Pair key={text} text={text} does={does} />
            ))}
          </dl>
        </section>
        <section className="md:col-span-2">
          <h3 className="mb-2">Items</h3>
          {ITEM_GROUPS.map((group) => (
            <div key={group} className="mb-3">
              <h4 className="cell-label">{group}</h4>
              <dl className="grid gap-x-6 gap-y-1.5 text-sm sm:grid-cols-2">
                {ITEM_WORDS.filter((word) => word.group === group).map((word) => (
                  <div key={word.word} className="grid grid-cols-[5rem_1fr] gap-x-3">
                    <Pair text={word.word} does={word.after ? `${word.name} (${word.after})` : word.name} />
                  </div>
                ))}
              </dl>
            </div>
          ))}
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
