"use client";
import { useState } from "react";
import { formatLength, parseLength, type UnitSystem } from "@/iso";
import { Button } from "@/components/ui/button";
import { failureText } from "@/components/ui/fetcher";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import type { ShopSettings } from "@/lib/rules/api-types";
import { nestingSchema, type ShopSettingsForm } from "@/lib/rules/forms";
import type { NestingSettings } from "@/lib/rules/nest-plans";

interface Typed {
  readonly saws: readonly { readonly name: string; readonly kerf: string }[];
  readonly trim: string;
  readonly least: string;
  readonly share: string;
}

const typedOf = (nesting: NestingSettings, units: UnitSystem): Typed => ({
  saws: nesting.saws.map(({ name, kerfMm }) => ({ name, kerf: String(kerfMm) })),
  trim: formatLength(nesting.endTrimMm, units),
  least: formatLength(nesting.leastOffcutMm, units),
  share: String(Math.round(nesting.offcutShare * 100)),
});

/** What was typed as settings, or the sentence that says why it is none. */
function nestingOf(typed: Typed, units: UnitSystem): NestingSettings | string {
  const trim = parseLength(typed.trim, units);
  const least = parseLength(typed.least, units);
  if (!trim.ok) return `End trim: ${trim.message}`;
  if (!least.ok) return `Least offcut: ${least.message}`;
  const saws = typed.saws.filter((saw) => saw.name.trim() !== "").map(({ name, kerf }) => ({ name, kerfMm: kerf.trim() === "" ? Number.NaN : Number(kerf) }));
  const checked = nestingSchema.safeParse({ saws, endTrimMm: trim.mm, leastOffcutMm: least.mm, offcutShare: Number(typed.share) / 100 });
  return checked.success ? checked.data : (checked.error.issues[0]?.message ?? "Check what you typed.");
}

/** How the shop cuts lengths up: its saws, the trim, and which rests are kept. */
export function NestingView({ shop, owner, onSave }: { readonly shop: ShopSettings; readonly owner: boolean; readonly onSave: (change: ShopSettingsForm) => Promise<void> }) {
  const { units } = shop.defaults;
  const [typed, setTyped] = useState(() => typedOf(shop.nesting, units));
  const [trouble, setTrouble] = useState<string | null>(null);
  const setSaw = (n: number, change: Partial<Typed["saws"][number]>) => setTyped({ ...typed, saws: typed.saws.map((saw, k) => (k === n ? { ...saw, ...change } : saw)) });
  const save = async () => {
    const nesting = nestingOf(typed, units);
    if (typeof nesting === "string") return setTrouble(nesting);
    setTrouble(null);
    await onSave({ nesting: { ...nesting, saws: [...nesting.saws] } }).catch((failure: unknown) => setTrouble(failureText(failure)));
  };
  return (
    <Section title="Cutting lengths up">
      {trouble ? (
        <Notice tone="trouble" className="mb-3">
          {trouble}
        </Notice>
      ) : null}
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault();
          void save();
        }}
      >
        <fieldset disabled={!owner}>
          {typed.saws.map((saw, n) => (
            <div key={n} className="mb-3 grid max-w-xl grid-cols-[1fr_9rem] items-start gap-3" role="group" aria-label={`Saw ${n + 1}`}>
              <TextField label="Saw" hint="Empty: left out" value={saw.name} onChange={(event) => setSaw(n, { name: event.target.value })} />
              <TextField label="Its cut, mm" figure inputMode="decimal" value={saw.kerf} onChange={(event) => setSaw(n, { kerf: event.target.value })} />
            </div>
          ))}
          {owner && typed.saws.length < 8 ? (
            <Button tone="quiet" onClick={() => setTyped({ ...typed, saws: [...typed.saws, { name: "", kerf: "" }] })}>
              Add a saw
            </Button>
          ) : null}
          <div className="my-4 grid max-w-3xl gap-3 sm:grid-cols-3">
            <TextField label="Trim at each end" figure value={typed.trim} onChange={(event) => setTyped({ ...typed, trim: event.target.value })} />
            <TextField label="Least offcut kept" figure value={typed.least} onChange={(event) => setTyped({ ...typed, least: event.target.value })} />
            <TextField label="An offcut's worth, %" hint="Of new pipe of its length" figure inputMode="numeric" value={typed.share} onChange={(event) => setTyped({ ...typed, share: event.target.value })} />
          </div>
          {owner ? <Button type="submit" tone="primary">Save how lengths are cut</Button> : null}
        </fieldset>
      </form>
    </Section>
  );
}
