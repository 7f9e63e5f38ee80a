"use client";
import { memo, useDeferredValue, useEffect, useMemo, useState } from "react";
import { formatInches, formatTerm, parseLength, type Model, type Nps, type TakeOutWord, type UnitSystem, type Way, type WayPreference, type WayRefusal, type WaysInput } from "@/iso";
import { Button } from "@/components/ui/button";
import { ChoiceRow } from "@/components/ui/choice-row";
import { Notice } from "@/components/ui/notice";
import { Progress } from "@/components/ui/progress";
import { KeepOuts } from "./keep-outs";
import { ShopStock } from "./shop-stock";
import { useWays, type WaysShown } from "./use-ways";
import { WayCard } from "./way-card";
import { readKeepOut, readSettings, writeSettings, type KeepOutForm, type WaysSettings } from "./ways-settings";

/** What the dialog has read: the two ends, the gap, how well they are known. */
export interface WaysAsked {
  readonly end0: Omit<WaysInput["end0"], "nps">;
  readonly end1: Omit<WaysInput["end1"], "nps">;
  readonly nps: Nps;
  readonly rootGapMm: number;
  readonly toleranceMm?: number;
}

export type WayPlan = { readonly ok: true } | { readonly ok: false; readonly message: string };

export interface WaysPanelProps {
  readonly asked: WaysAsked;
  readonly model: Model;
  readonly takeOuts: readonly TakeOutWord[];
  /** Whether a way can go into the run, and why not. */
  readonly plan: (way: Way, input: WaysInput) => WayPlan;
  /** null when the reader may not edit. */
  readonly onInsert: ((way: Way, input: WaysInput) => void) | null;
}

const PREFERENCES: readonly { readonly value: WayPreference; readonly label: string }[] = [
  { value: "standard-first", label: "Whole fittings first" },
  { value: "fewest-welds", label: "Fewest welds" },
  { value: "least-trimmed", label: "Least trimmed" },
  { value: "shortest", label: "Shortest" },
];

const SHOWN_FIRST = 6;
const SHOWN_MORE = 12;
/** Smallest pup that stands for 1.5 OD, mm, as on the sheet (common practice). */
const SHORTEST_PUP_MM = 50;

/** Every sensible way to close between the two ends, in the shop's order. */
export function WaysPanel(props: WaysPanelProps) {
  const { asked, model, takeOuts } = props;
  const { settings: line } = model.document;
  const { units } = line;
  const [settings, setSettings] = useState<WaysSettings>(() => readSettings(browserStore()));
  const [keepOuts, setKeepOuts] = useState<readonly KeepOutForm[]>([]);
  const [ownNps1, setNps1] = useState<Nps | null>(null);
  useEffect(() => writeSettings(browserStore(), settings), [settings]);
  const nps1 = ownNps1 ?? asked.nps;
  const pup = settings.minimumPup.trim() === "" ? null : parseLength(settings.minimumPup, units);
  const pupMm = pup?.ok ? pup.mm : line.minimumPupMm;
  const asking = useDeferredValue(useMemo(
    (): WaysInput => ({
      end0: { ...asked.end0, nps: asked.nps }, end1: { ...asked.end1, nps: nps1 }, schedule: line.pipe.schedule, rootGapMm: asked.rootGapMm,
      angles: settings.angles, radii: settings.radii, trimMaxDeg: settings.trimMaxDeg, minimumPupMm: pupMm,
      keepOuts: keepOuts.flatMap((form, i) => {
        const read = readKeepOut(form, units, i + 1);
        return read.ok ? [read.keepOut] : [];
      }),
      units, takeOuts, ...(asked.toleranceMm === undefined ? {} : { toleranceMm: asked.toleranceMm }),
    }),
    [asked, nps1, line.pipe.schedule, settings.angles, settings.radii, settings.trimMaxDeg, pupMm, keepOuts, units, takeOuts],
  ));
  const shown = useWays(asking, settings.preference);
  return (
    <section aria-labelledby="ways-head" className="mt-8 border-t border-ink pt-4">
      <h3 id="ways-head" className="text-lg font-bold">Every way to close</h3>
      <p className="mb-3 text-soft">Whole elbows with pipe between, one or both trimmed, mitres, and what a saw at an end would open.</p>
      <ShopStock settings={settings} onChange={setSettings} nps1={nps1} onNps1={setNps1} pupError={pup && !pup.ok ? pup.message : undefined} usualPup={usualPup(line.minimumPupMm, units)} />
      <div className="mt-3">
        <KeepOuts value={keepOuts} units={units} onChange={setKeepOuts} />
      </div>
      <div className="mt-3">
        <ChoiceRow label="Order of the ways" choices={PREFERENCES} value={settings.preference} onChange={(preference) => setSettings({ ...settings, preference })} />
      </div>
      {shown.problem ? <Notice tone="trouble" word="Cannot be asked" className="mt-4">{shown.problem}</Notice> : <Found {...props} key={settings.preference} input={asking} shown={shown} units={units} />}
    </section>
  );
}

function usualPup(mm: number | null, units: UnitSystem): string {
  if (mm === null) return `1.5 OD, ${units === "metric" ? `${SHORTEST_PUP_MM} mm` : "2 in"} at least`;
  return units === "metric" ? formatTerm(mm, units) : formatInches(mm);
}

function browserStore(): Storage | null {
  return typeof window === "undefined" ? null : window.localStorage;
}

function Found({ shown, input, units, plan, onInsert }: WaysPanelProps & { readonly shown: WaysShown; readonly input: WaysInput; readonly units: UnitSystem }) {
  const [count, setCount] = useState(SHOWN_FIRST);
  const { ways, search } = shown;
  const hidden = ways.length - count;
  return (
    <>
      <SearchState shown={shown} />
      {ways.length === 0 && search.state === "finished" ? <Notice tone="trouble" word="No way" className="mt-3">Nothing closes these ends with what the shop has. Why, and what would open a way, stands below.</Notice> : null}
      <ol className="mt-3" aria-label="Ways to close">
        {ways.slice(0, count).map((way, i) => (
          <PlannedCard key={way.id} way={way} rank={i + 1} input={input} units={units} plan={plan} onInsert={onInsert} />
        ))}
      </ol>
      {hidden > 0 ? (
        <Button tone="quiet" onClick={() => setCount(count + SHOWN_MORE)}>
          Show {Math.min(hidden, SHOWN_MORE)} more of {ways.length} listed
        </Button>
      ) : null}
      <Refusals refusals={shown.refusals} />
      {shown.notes.length > 0 ? (
        <ul className="mt-3 list-disc space-y-1 pl-5 text-sm text-soft">
          {shown.notes.map((note) => (
            <li key={note}>{note}</li>
          ))}
        </ul>
      ) : null}
      <p className="mt-3 text-sm text-caution">Take-outs are nominal: measure the fitting in hand. Verify by tape, two readings, before cutting. Do not pull, jack or heat to fit.</p>
    </>
  );
}

type PlannedProps = Pick<WaysPanelProps, "plan" | "onInsert"> & { readonly way: Way; readonly rank: number; readonly input: WaysInput; readonly units: UnitSystem };

/** Whether a way fits the run is worked out once, not at each word of the search. */
const PlannedCard = memo(function PlannedCard({ way, rank, input, units, plan, onInsert }: PlannedProps) {
  const planned = useMemo(() => (onInsert ? plan(way, input) : null), [onInsert, plan, way, input]);
  return <WayCard way={way} rank={rank} units={units} refusal={planned && !planned.ok ? planned.message : null} onInsert={onInsert ? () => onInsert(way, input) : null} />;
});

function SearchState({ shown: { search, cancel, again } }: { readonly shown: WaysShown }) {
  const words = {
    waiting: "The search of three elbows starts in a moment.",
    running: "Three elbows: searching.",
    stopped: `Three elbows: stopped. ${search.found} found until then stand in the list.`,
    finished: `Three elbows: ${search.found === 0 ? "none found" : `${search.found} ways found, the best of them listed`}.`,
  }[search.state];
  return (
    <div className="mt-4 flex flex-wrap items-center gap-x-5 gap-y-2 border-l-[3px] border-dye pl-3">
      <span role="status">{words}</span>
      {search.state === "running" ? (
        <>
          {search.total > 0 ? <Progress className="w-64" done={search.done} of={search.total} word={`rows of elbows, ${search.found} ways so far`} /> : null}
          <Button onClick={cancel}>Cancel the search</Button>
        </>
      ) : null}
      {search.state === "stopped" ? <Button onClick={again}>Search again</Button> : null}
    </div>
  );
}

const ABOUT: Readonly<Record<WayRefusal["about"], string>> = {
  "trimmed-pair": "Two trimmed elbows", "two-standard": "Two whole elbows", "three-standard": "Three whole elbows", "one-trimmed": "One whole, one trimmed", mitre: "Mitres",
};

function Refusals({ refusals }: { readonly refusals: readonly WayRefusal[] }) {
  if (refusals.length === 0) return null;
  return (
    <section aria-labelledby="ways-not" className="mt-5">
      <h4 id="ways-not" className="font-bold">What does not close, and why</h4>
      <dl className="mt-1 space-y-2 text-sm">
        {refusals.map(({ about, sentence, whatWouldWork }) => (
          <div key={about}>
            <dt className="font-medium">{ABOUT[about]}</dt>
            <dd>
              {sentence}
              {whatWouldWork ? <span className="block font-medium">{whatWouldWork}</span> : null}
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
