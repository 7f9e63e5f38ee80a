"use client";
import { STOCK_ANGLES, type Nps, type StockAngle } from "@/iso";
import { NPS_OPTIONS } from "@/components/jobs/settings-text";
import { Check, Select, TextField } from "@/components/ui/field";
import type { WaysSettings } from "./ways-settings";

export interface ShopStockProps {
  readonly settings: WaysSettings;
  readonly onChange: (settings: WaysSettings) => void;
  readonly nps1: Nps;
  readonly onNps1: (nps: Nps) => void;
  readonly pupError: string | undefined;
  /** Used where no shortest pup is typed. */
  readonly usualPup: string;
}

const ANGLE_NAMES: Readonly<Record<StockAngle, string>> = { 90: "90°", 60: "60°", 45: "45°", 30: "30°", 22.5: "22 1/2°" };
const TRIMS = [
  { value: "90", label: "to any angle, from a 90" },
  { value: "60", label: "to 60° at most" },
  { value: "45", label: "to 45° at most" },
  { value: "0", label: "never" },
];

/** Elbows the shop has, how far it trims, its shortest pup, and the size at end 1. */
export function ShopStock({ settings, onChange, nps1, onNps1, pupError, usualPup }: ShopStockProps) {
  const toggled = <T,>(list: readonly T[], each: T): T[] => (list.includes(each) ? list.filter((other) => other !== each) : [...list, each]);
  return (
    <div className="space-y-3">
      <fieldset className="min-w-0">
        <legend className="font-medium">Whole elbows in the shop</legend>
        <div className="flex flex-wrap gap-x-5">
          {STOCK_ANGLES.map((angle) => (
            <Check key={angle} label={ANGLE_NAMES[angle]} checked={settings.angles.includes(angle)} onChange={() => onChange({ ...settings, angles: toggled(settings.angles, angle) })} />
          ))}
          {(["LR", "SR"] as const).map((radius) => (
            <Check
              key={radius}
              label={radius === "LR" ? "long radius" : "short radius"}
              checked={settings.radii.includes(radius)}
              onChange={() => {
                const radii = toggled(settings.radii, radius);
                if (radii.length > 0) onChange({ ...settings, radii });
              }}
            />
          ))}
        </div>
        <p className="text-sm text-soft">Remembered in this browser.</p>
      </fieldset>
      <div className="grid grid-cols-2 items-end gap-3 sm:grid-cols-3">
        <Select label="Elbows are trimmed" options={TRIMS} value={String(settings.trimMaxDeg)} onChange={(event) => onChange({ ...settings, trimMaxDeg: Number(event.target.value) })} />
        <TextField label="Shortest pup" figure value={settings.minimumPup} placeholder={usualPup} error={pupError} onChange={(event) => onChange({ ...settings, minimumPup: event.target.value })} />
        <Select label="Size at end 1" options={NPS_OPTIONS} value={nps1} onChange={(event) => onNps1(event.target.value as Nps)} />
      </div>
    </div>
  );
}
