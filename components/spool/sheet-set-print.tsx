"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useState } from "react";
import { useForm, useWatch } from "react-hook-form";
import { SHEET_PART_WORDS, SHEET_PARTS, type SheetPart, type SheetSize } from "@/iso";
import { SHEET_OPTIONS } from "@/components/jobs/sheet-words";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { Check, Select } from "@/components/ui/field";
import { sheetSetFormSchema, type SheetSetForm } from "@/lib/rules/sheet-set-form";
import { recallSet, rememberSet } from "./sheet-set-memory";

export interface SheetSetPrintProps {
  readonly spoolId: string;
  readonly issued: boolean;
  /** Size of what is composed; null takes that of the issued sheet. */
  readonly size: SheetSize | null;
  /** Large target, for gloves. */
  readonly big?: boolean;
}

const ABOUT: Readonly<Record<SheetPart, string>> = {
  sheet: "isometric, materials, cut list, welds, sign-off",
  index: "which part begins on which page",
  cuts: "each piece as a bar with its sum, ends and blanks",
  welds: "the isometric with weld numbers, and the log",
  bench: "turns laid out with their marks, and check dimensions",
  templates: "true-scale wrap-arounds with a proof bar",
  legend: "symbols, lines and letters that this spool uses",
};

/** Prints what a person chooses of a spool's set, in one file; the browser remembers what was chosen. */
export function SheetSetPrint({ spoolId, issued, size, big }: SheetSetPrintProps) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button big={big} onClick={() => setOpen(true)}>
        Print a set
      </Button>
      <Dialog open={open} title="Print a set" onClose={() => setOpen(false)}>
        <SetForm spoolId={spoolId} issued={issued} size={size} onDone={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function SetForm({ spoolId, issued, size, onDone }: Omit<SheetSetPrintProps, "big"> & { readonly onDone: () => void }) {
  const { register, handleSubmit, control, formState } = useForm<SheetSetForm>({
    resolver: zodResolver(sheetSetFormSchema),
    defaultValues: { ...recallSet(), size: size ?? recallSet().size, verified: false },
  });
  const [parts, fit] = useWatch({ control, name: ["parts", "fit"] });
  const print = (form: SheetSetForm) => {
    rememberSet(form);
    window.open(setAddress(spoolId, issued, form), "_blank", "noopener");
    onDone();
  };
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(print)(event)} className="space-y-4">
      <fieldset>
        <legend className="mb-1 font-medium">What to print, in one file</legend>
        {SHEET_PARTS.map((part) => (
          <Check
            key={part}
            value={part}
            label={
              <>
                <span className="font-medium">{SHEET_PART_WORDS[part]}</span>{" "}
                <span className="block text-sm text-soft">{ABOUT[part]}</span>
              </>
            }
            {...register("parts")}
          />
        ))}
        {formState.errors.parts ? (
          <p role="alert" className="mt-1 text-sm font-medium text-alert">
            {formState.errors.parts.message}
          </p>
        ) : null}
      </fieldset>
      <Select
        label="Paper"
        hint={issued && parts.includes("sheet") ? "The spool sheet keeps the size it was signed in." : undefined}
        options={issued ? [{ value: "", label: "As issued" }, ...SHEET_OPTIONS] : [{ value: "", label: "As the job says" }, ...SHEET_OPTIONS]}
        {...register("size")}
      />
      <Check label="Keep everything half an inch off the paper's edge, for printers with wide margins" {...register("fit")} />
      {fit && issued && parts.includes("sheet") ? (
        <p className="text-sm text-soft">The signed sheet is made a little smaller for that and says so. All else is laid out anew; templates keep their scale.</p>
      ) : null}
      {parts.includes("cuts") ? (
        <Check
          label="I will verify each length by tape, two readings, before cutting."
          error={formState.errors.verified?.message}
          {...register("verified")}
        />
      ) : null}
      <DialogActions>
        <Button type="submit" tone="primary" big busy={formState.isSubmitting} busyLabel="Opening">
          Open the PDF
        </Button>
      </DialogActions>
    </form>
  );
}

/** Address of the file. */
export function setAddress(spoolId: string, issued: boolean, { parts, size, fit }: Pick<SheetSetForm, "parts" | "size" | "fit">): string {
  const chosen = SHEET_PARTS.filter((part) => parts.includes(part)).join(",");
  return `/api/spools/${spoolId}/sheet-set?parts=${chosen}&of=${issued ? "issued" : "draft"}${size ? `&size=${size}` : ""}${fit ? "&fit=1" : ""}`;
}
