"use client";
import { useWatch, type UseFormReturn } from "react-hook-form";
import { Check, TextArea, TextField } from "@/components/ui/field";
import type { PackageFormValues } from "@/lib/rules/package-forms";

/** What makes a package a transmittal: its number, for whom and what for. */
export function TransmittalFields({ form }: { readonly form: UseFormReturn<PackageFormValues> }) {
  const { register, setValue, control, formState: { errors } } = form;
  const isTransmittal = Boolean(useWatch({ control, name: "transmittal" }));
  const of = errors.transmittal;
  const today = new Date().toLocaleDateString("en-CA");
  return (
    <fieldset className="mb-2">
      <Check
        label="It goes out as a transmittal, to be acknowledged"
        checked={isTransmittal}
        onChange={(event) => setValue("transmittal", event.target.checked ? { number: "", date: today, purpose: "", recipient: "", replyBy: "", remark: "" } : null)}
      />
      {isTransmittal ? (
        <div className="mt-2 grid gap-3 sm:grid-cols-3 sm:items-end">
          <TextField label="Number" figure maxLength={40} error={of?.number?.message} {...register("transmittal.number")} />
          <TextField label="Date" type="date" error={of?.date?.message} {...register("transmittal.date")} />
          <TextField label="Reply by" hint="Empty: none asked for" type="date" error={of?.replyBy?.message} {...register("transmittal.replyBy")} />
          <TextField label="To" maxLength={200} error={of?.recipient?.message} {...register("transmittal.recipient")} />
          <TextField label="Purpose" hint="For fabrication, for approval ..." className="sm:col-span-2" maxLength={200} error={of?.purpose?.message} {...register("transmittal.purpose")} />
          <TextArea label="Remark" rows={2} className="sm:col-span-3" maxLength={1000} error={of?.remark?.message} {...register("transmittal.remark")} />
        </div>
      ) : null}
    </fieldset>
  );
}
