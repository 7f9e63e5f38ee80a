"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useRouter } from "next/navigation";
import { useForm, useWatch } from "react-hook-form";
import { SHEET_PART_WORDS } from "@/iso";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { EmptyState } from "@/components/ui/empty-state";
import { apiSend, useApi } from "@/components/ui/fetcher";
import { Check, Select, TextField } from "@/components/ui/field";
import { countText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { Notice } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import { SHEET_WORDS } from "@/components/jobs/sheet-words";
import type { JobDetail } from "@/lib/rules/api-types";
import { packageNewSchema, type PackageFormValues } from "@/lib/rules/package-forms";
import { PACKAGE_EXTRAS, type PackageCandidate } from "@/lib/rules/packages";
import { SheetChoice } from "./sheet-choice";
import { TransmittalFields } from "./transmittal-fields";

interface PackageDialogProps {
  readonly job: JobDetail;
  readonly open: boolean;
  readonly onClose: () => void;
}

/** Which sheets, with which parts, in what file, and for whom. */
export function PackageDialog({ job, open, onClose }: PackageDialogProps) {
  const sheets = useApi<PackageCandidate[]>(open ? `/api/jobs/${job.id}/packages/sheets` : null);
  return (
    <Dialog open={open} onClose={onClose} title="New package" wide>
      <Loaded api={sheets} label="Loading the job's sheets">
        {(rows) => (rows.length === 0 ? <NothingIssued /> : <PackageForm job={job} sheets={rows} onClose={onClose} />)}
      </Loaded>
    </Dialog>
  );
}

function NothingIssued() {
  return <EmptyState title="No sheet to pack">Sheets can be packed once they are issued: submit a spool and have it signed.</EmptyState>;
}

const FILES = [
  { value: "pdf", label: "One PDF of marked copies" },
  { value: "zip-marked", label: "ZIP of single PDFs, marked copies" },
  { value: "zip-originals", label: "ZIP of single PDFs, signed originals" },
] as const;

const FIELDS = ["title", "revisionIds", "transmittal.number", "transmittal.date", "transmittal.purpose", "transmittal.recipient", "transmittal.replyBy", "transmittal.remark"] as const;

function PackageForm({ job, sheets, onClose }: { readonly job: JobDetail; readonly sheets: readonly PackageCandidate[]; readonly onClose: () => void }) {
  const router = useRouter();
  const current = sheets.filter((sheet) => sheet.state !== "for-review" && !sheet.hold).map((sheet) => sheet.revisionId);
  const form = useForm<PackageFormValues>({
    resolver: zodResolver(packageNewSchema),
    defaultValues: { title: "", revisionIds: current, form: "pdf", copies: "marked", extras: [], paper: null, transmittal: null },
  });
  const { register, handleSubmit, setValue, setError, control, formState: { errors, isSubmitting } } = form;
  const { trouble, send } = useFormSend<PackageFormValues>(setError, FIELDS);
  const [chosen, file, copies, extras, paper] = useWatch({ control, name: ["revisionIds", "form", "copies", "extras", "paper"] });
  const setFile = (value: string) => {
    setValue("form", value === "pdf" ? "pdf" : "zip");
    setValue("copies", value === "zip-originals" ? "originals" : "marked");
  };
  const submit = handleSubmit((values) =>
    send(async () => {
      const { id } = await apiSend<{ id: string }>("POST", `/api/jobs/${job.id}/packages`, values);
      router.push(`/packages/${id}`);
    }),
  );
  return (
    <form noValidate onSubmit={(event) => void submit(event)}>
      {trouble ? (
        <Notice tone="trouble" className="mb-4">
          {trouble}
        </Notice>
      ) : null}
      <SheetChoice sheets={sheets} chosen={new Set(chosen)} onChange={(ids) => setValue("revisionIds", [...ids], { shouldValidate: true })} error={errors.revisionIds?.message} />
      <div className="mb-4 grid gap-3 sm:grid-cols-3 sm:items-end">
        <Select label="File" options={FILES} value={file === "pdf" ? "pdf" : `zip-${copies}`} onChange={(event) => setFile(event.target.value)} />
        <Select label="Paper of added pages" options={papers()} value={paper ?? ""} onChange={(event) => setValue("paper", (event.target.value || null) as PackageFormValues["paper"])} />
        <TextField label="Title" hint="Empty: its lines" maxLength={120} error={errors.title?.message} {...register("title")} />
      </div>
      <FileNote isPdf={file === "pdf"} areOriginals={file === "zip" && copies === "originals"} />
      <fieldset className="mb-4">
        <legend className="mb-1 font-medium">Add to each spool sheet</legend>
        <div className="flex flex-wrap gap-x-6">
          {PACKAGE_EXTRAS.map((part) => (
            <Check key={part} label={SHEET_PART_WORDS[part]} value={part} checked={extras?.includes(part) ?? false} onChange={(event) => setValue("extras", PACKAGE_EXTRAS.filter((one) => (one === part ? event.target.checked : extras?.includes(one))))} />
          ))}
        </div>
      </fieldset>
      <TransmittalFields form={form} />
      <DialogActions>
        <Button onClick={onClose}>Close</Button>
        <Button type="submit" tone="primary" busy={isSubmitting} busyLabel="Asking" disabled={chosen.length === 0}>
          {chosen.length === 0 ? "Make the package" : `Make the package of ${countText(chosen.length, "sheet")}`}
        </Button>
      </DialogActions>
    </form>
  );
}

function papers() {
  return [{ value: "", label: "As each sheet was issued" }, ...Object.entries(SHEET_WORDS).map(([value, label]) => ({ value, label }))];
}

function FileNote({ isPdf, areOriginals }: { readonly isPdf: boolean; readonly areOriginals: boolean }) {
  const text = areOriginals
    ? "The stored files as they are, signatures intact, with an index and a list of their hashes. They carry no mark of who took them."
    : `Each page says that it is an uncontrolled copy, who printed it and when${isPdf ? "; bookmarks and an index lead to each line and spool" : ""}. Signatures stay with the originals.`;
  return <p className="mb-4 text-sm text-soft">{text}</p>;
}
