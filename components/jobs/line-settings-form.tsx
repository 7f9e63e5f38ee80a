"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useState } from "react";
import { useForm } from "react-hook-form";
import type { LineSettings } from "@/iso";
import { FitFields, LIMIT_FIELDS, SHOP_FIELDS } from "@/components/fit/fit-fields";
import { Button } from "@/components/ui/button";
import { failureText } from "@/components/ui/fetcher";
import { Check, Select, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { UNIT_OPTIONS } from "./new-job-dialog";
import { MarkFields } from "./mark-fields";
import { Group, type SettingsPart } from "./settings-group";
import { NPS_OPTIONS, settingsTextSchema, settingsToText, type SettingsText } from "./settings-text";

export interface LineSettingsFormProps {
  readonly settings: LineSettings;
  readonly editable: boolean;
  readonly onSave: (settings: LineSettings) => Promise<void>;
  /** A line changes its units elsewhere, where it is asked what its numbers mean. */
  readonly fixedUnits?: boolean;
  readonly saveLabel?: string;
}

const CLASSES = ["150", "300", "600", "900", "1500"].map((value) => ({ value, label: `Class ${value}` }));
const FORGED_CLASSES = [
  { value: "", label: "Class 3000 (usual)" },
  ...["2000", "3000", "6000"].map((value) => ({ value, label: `Class ${value}` })),
];
const ELBOWS = [{ value: "LR", label: "Long radius" }, { value: "SR", label: "Short radius" }];

/** What each new line starts from: pipe, fittings, allowances, limits and texts as entered. */
export function LineSettingsForm({
  settings,
  editable,
  onSave,
  fixedUnits = false,
  saveLabel = "Save the defaults",
}: LineSettingsFormProps) {
  const [trouble, setTrouble] = useState<string | null>(null);
  const { register, handleSubmit, formState } = useForm<SettingsText, unknown, LineSettings>({
    resolver: zodResolver(settingsTextSchema),
    values: settingsToText(settings),
    resetOptions: { keepDirtyValues: true },
  });
  const part = { register, errors: formState.errors };
  const save = async (next: LineSettings) => {
    setTrouble(null);
    await onSave(next).catch((failure: unknown) => setTrouble(failureText(failure)));
  };
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(save)(event)}>
      {trouble ? (
        <Notice tone="trouble" className="mb-4">
          {trouble}
        </Notice>
      ) : null}
      <fieldset disabled={!editable} className="space-y-6">
        <PipeFields {...part} fixedUnits={fixedUnits} />
        <AllowanceFields {...part} />
        <LimitFields {...part} />
        <MarkFields {...part} />
        <Group title="How sure a closing fits" hint="What the shop holds to, and what a field joint may be off by and still be made: the chance of a fit is worked from these. Usual values; each says where it comes from.">
          <FitFields fields={SHOP_FIELDS} {...part} />
          <FitFields fields={LIMIT_FIELDS} {...part} />
        </Group>
        <EnteredFields {...part} />
      </fieldset>
      {editable ? (
        <Button
          type="submit"
          tone="primary"
          className="mt-6"
          busy={formState.isSubmitting}
          busyLabel="Saving"
        >
          {saveLabel}
        </Button>
      ) : null}
    </form>
  );
}

function PipeFields({ register, errors, fixedUnits }: SettingsPart & { readonly fixedUnits: boolean }) {
  return (
    <Group title="Pipe and fittings">
      {fixedUnits ? null : (
        <Select label="Units" options={UNIT_OPTIONS} error={errors.units?.message} {...register("units")} />
      )}
      <Select label="Size" options={NPS_OPTIONS} error={errors.nps?.message} {...register("nps")} />
      <TextField label="Schedule" figure error={errors.schedule?.message} {...register("schedule")} />
      <TextField label="Material" error={errors.material?.message} {...register("material")} />
      <TextField label="Specification" error={errors.specification?.message} {...register("specification")} />
      <Select label="Elbow" options={ELBOWS} error={errors.elbow?.message} {...register("elbow")} />
      <Select
        label="Flange class"
        options={CLASSES}
        error={errors.ratingClass?.message}
        {...register("ratingClass")}
      />
      <Select
        label="Socket and threaded fittings"
        options={FORGED_CLASSES}
        error={errors.forgedClass?.message}
        {...register("forgedClass")}
      />
    </Group>
  );
}

function AllowanceFields({ register, errors }: SettingsPart) {
  return (
    <Group
      title="Allowances"
      hint="Gap, land and bevel come from the WPS. Type lengths as on a tape; a bare number is inches, or millimetres on a metric job."
    >
      <TextField label="Root gap" figure error={errors.rootGap?.message} {...register("rootGap")} />
      <TextField
        label="Socket pull-back"
        figure
        error={errors.socketPullBack?.message}
        {...register("socketPullBack")}
      />
      <TextField label="Gasket" figure error={errors.gasket?.message} {...register("gasket")} />
      <TextField
        label="Slip-on setting"
        figure
        error={errors.slipOnSetting?.message}
        {...register("slipOnSetting")}
      />
      <TextField
        label="Thread make-up"
        figure
        placeholder="as tabulated"
        error={errors.threadMakeUp?.message}
        {...register("threadMakeUp")}
      />
      <TextField label="Field trim" figure error={errors.fieldTrim?.message} {...register("fieldTrim")} />
      <Check
        label="A face dimension includes the gasket"
        className="self-end"
        {...register("faceIncludesGasket")}
      />
    </Group>
  );
}

function LimitFields({ register, errors }: SettingsPart) {
  return (
    <Group title="Limits" hint="A standard elbow is taken within so many degrees; a pup is pipe between two welds; longer pipe than the stock is split with a weld; a loop that misses by no more is taken up in its last leg; the box is what a spool ships in, turned whichever way. Each gives a finding on the line, never a change of what was typed.">
      <TextField
        label="Elbow within, degrees"
        figure
        error={errors.withinDeg?.message}
        {...register("withinDeg")}
      />
      <TextField
        label="Shortest pup"
        figure
        placeholder="1.5 OD"
        error={errors.minimumPup?.message}
        {...register("minimumPup")}
      />
      <TextField
        label="Longest stock pipe"
        figure
        placeholder="never split"
        error={errors.stockLength?.message}
        {...register("stockLength")}
      />
      <TextField
        label="Loop may miss by"
        figure
        placeholder="3mm"
        error={errors.loopTolerance?.message}
        {...register("loopTolerance")}
      />
      <div className="grid grid-cols-3 gap-3 sm:col-span-2">
        <TextField
          label="Box length"
          figure
          error={errors.boxLength?.message}
          {...register("boxLength")}
        />
        <TextField label="Box width" figure error={errors.boxWidth?.message} {...register("boxWidth")} />
        <TextField label="Box height" figure error={errors.boxHeight?.message} {...register("boxHeight")} />
      </div>
    </Group>
  );
}

function EnteredFields({ register, errors }: SettingsPart) {
  return (
    <Group
      title="As entered, per owner's specification"
      hint="Printed on the sheet as it stands here; nothing is judged from it."
    >
      <TextField label="Insulation" error={errors.insulation?.message} {...register("insulation")} />
      <TextField label="PWHT" error={errors.pwht?.message} {...register("pwht")} />
      <TextField label="NDE" error={errors.nde?.message} {...register("nde")} />
      <TextField label="Test" error={errors.test?.message} {...register("test")} />
      <TextField label="Paint" error={errors.paint?.message} {...register("paint")} />
    </Group>
  );
}
