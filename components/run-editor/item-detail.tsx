"use client";
import { NPS_SIZES, type AxisName, type Item, type Nps, type RatingClass, type UnitSystem } from "@/iso";
import { Select } from "@/components/ui/field";
import { CommitField } from "./commit-field";
import { lengthEntryText } from "@/components/jobs/settings-text";
import { readDegrees, readOptionalLength, readText } from "./length-reader";

export interface ItemDetailProps {
  readonly item: Item;
  readonly units: UnitSystem;
  readonly readOnly: boolean;
  readonly onItem: (item: Item) => void;
}

type Option = { readonly value: string; readonly label: string };
const AXES: readonly Option[] = [
  { value: "E", label: "east" }, { value: "W", label: "west" }, { value: "N", label: "north" },
  { value: "S", label: "south" }, { value: "U", label: "up" }, { value: "D", label: "down" },
];
const CLASSES: readonly Option[] = [{ value: "", label: "the line's" }, ...["150", "300", "600", "900", "1500"].map((value) => ({ value, label: `class ${value}` }))];
const SIZES: readonly Option[] = NPS_SIZES.map((nps) => ({ value: nps, label: `NPS ${nps}` }));

/** What an item takes beyond its short word. */
export function ItemDetail({ item, units, readOnly, onItem }: ItemDetailProps) {
  const choose = (label: string, value: string, options: readonly Option[], set: (value: string) => Item) => (
    <Select key={label} label={label} options={options} value={value} disabled={readOnly} onChange={(event) => onItem(set(event.target.value))} />
  );
  const text = (label: string, value: string, set: (value: string) => Item, placeholder = "") => (
    <CommitField key={`${label}${value}`} label={label} text={value} placeholder={placeholder} readOnly={readOnly} read={readText} onCommit={(next) => onItem(set(next))} />
  );
  const rating = (value: string): RatingClass | null => (value === "" ? null : (Number(value) as RatingClass));
  switch (item.kind) {
    case "flange":
      return (
        <>
          {choose("Class", String(item.ratingClass ?? ""), CLASSES, (value) => ({ ...item, ratingClass: rating(value) }))}
          <BoltHoles item={item} readOnly={readOnly} onItem={onItem} />
          {choose("In a pair, the point is", item.gasketSide, [{ value: "after", label: "the face before the gasket" }, { value: "before", label: "the face after the gasket" }], (value) => ({ ...item, gasketSide: value as "before" | "after" }))}
          {choose("Goes to", item.goes, [{ value: "open", label: "not said" }, { value: "nozzle", label: "nozzle" }, { value: "continued", label: "continued" }, { value: "existing", label: "existing, verify" }], (value) => ({ ...item, goes: value as typeof item.goes }))}
          {text("Name printed there", item.text, (value) => ({ ...item, text: value }), "N3")}
        </>
      );
    case "valve":
      return (
        <>
          {choose("Class", String(item.ratingClass ?? ""), CLASSES, (value) => ({ ...item, ratingClass: rating(value) }))}
          {choose("Ends", item.ends, [{ value: "flanged", label: "flanged" }, { value: "butt", label: "butt-weld" }, { value: "socket", label: "socket-weld" }], (value) => ({ ...item, ends: value as typeof item.ends }))}
          {item.ends === "flanged" ? choose("Mating flanges", item.mating, [{ value: "weld-neck", label: "weld-neck" }, { value: "slip-on", label: "slip-on" }, { value: "socket-weld", label: "socket-weld" }], (value) => ({ ...item, mating: value as typeof item.mating })) : null}
          {choose("Stem", item.stem ?? "", [{ value: "", label: "up, or north on a riser" }, ...AXES], (value) => ({ ...item, stem: value === "" ? null : (value as AxisName) }))}
          {text("Tag", item.tag, (value) => ({ ...item, tag: value }), "V-101")}
          <CommitField label="Measured face to face" hint="in place of the table's" figure readOnly={readOnly} text={item.faceToFaceMm === null ? "" : lengthEntryText(item.faceToFaceMm, units)} read={readOptionalLength(units)} onCommit={(mm) => onItem({ ...item, faceToFaceMm: mm === 0 ? null : mm })} />
        </>
      );
    case "tee":
      return (
        <>
          {choose("Branch size", item.branchNps ?? "", [{ value: "", label: "same as the run" }, ...SIZES], (value) => ({ ...item, branchNps: value === "" ? null : (value as Nps) }))}
          {choose("Ends", item.ends, [{ value: "butt", label: "butt-weld" }, { value: "socket", label: "socket-weld" }], (value) => ({ ...item, ends: value as typeof item.ends }))}
        </>
      );
    case "outlet":
    case "stub-in":
      return choose("Branch size", item.branchNps, SIZES, (value) => ({ ...item, branchNps: value as Nps }));
    case "reducer":
      return (
        <>
          {choose("To size", item.toNps, SIZES, (value) => ({ ...item, toNps: value as Nps }))}
          {text("Schedule after it", item.toSchedule ?? "", (value) => ({ ...item, toSchedule: value.slice(0, 12) || null }), "the line's")}
          {item.shape === "eccentric" ? choose("Flat side", item.flat ?? "D", AXES, (value) => ({ ...item, flat: value as AxisName })) : null}
        </>
      );
    case "end":
      return (
        <>
          {choose("Goes to", item.goes, [{ value: "open", label: "open end" }, { value: "field-weld", label: "field weld" }, { value: "continued", label: "continued on" }, { value: "existing", label: "existing, verify" }], (value) => ({ ...item, goes: value as typeof item.goes }))}
          {text("Name printed there", item.text, (value) => ({ ...item, text: value }), "L-204")}
        </>
      );
    case "support":
      return text("Support", item.text, (value) => ({ ...item, text: value }), "shoe, PS-12");
    default:
      return null;
  }
}

type Flange = Extract<Item, { kind: "flange" }>;

function BoltHoles({ item, readOnly, onItem }: { readonly item: Flange; readonly readOnly: boolean; readonly onItem: (item: Item) => void }) {
  const turned = item.boltHoles === "straddle" ? null : item.boltHoles;
  return (
    <>
      <Select
        label="Bolt holes"
        disabled={readOnly}
        value={turned ? "turned" : "straddle"}
        options={[{ value: "straddle", label: "straddle the centre line" }, { value: "turned", label: "turned" }]}
        onChange={(event) => onItem({ ...item, boltHoles: event.target.value === "straddle" ? "straddle" : { turnDeg: 0, from: "S" } })}
      />
      {turned ? (
        <>
          <CommitField label="Turned, degrees clockwise" figure readOnly={readOnly} text={String(turned.turnDeg)} read={readDegrees} onCommit={(turnDeg) => onItem({ ...item, boltHoles: { ...turned, turnDeg } })} />
          <Select label="Looked at from" disabled={readOnly} value={turned.from} options={AXES} onChange={(event) => onItem({ ...item, boltHoles: { ...turned, from: event.target.value as AxisName } })} />
        </>
      ) : null}
    </>
  );
}
