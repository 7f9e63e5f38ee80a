"use client";
import { useState } from "react";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { ApiFailure, apiSend, refreshApi } from "@/components/ui/fetcher";
import { TextField } from "@/components/ui/field";
import { FileButton } from "@/components/ui/file-button";
import { Notice, useToast } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import { P12_MAX_BYTES } from "@/lib/rules/certificates";

interface UploadForm {
  readonly password: string;
}

const FIELDS = ["password"] as const;

/** A .p12 and its password, sent together and checked at once. */
export function CertificateUploadForm({ path }: { readonly path: string }) {
  const say = useToast();
  const [file, setFile] = useState<File | null>(null);
  const { register, handleSubmit, setError, reset, formState } = useForm<UploadForm>({ defaultValues: { password: "" } });
  const { trouble, send } = useFormSend(setError, FIELDS);
  const upload = async ({ password }: UploadForm) => {
    if (file === null) throw refusal("Choose a .p12 file.");
    if (file.size > P12_MAX_BYTES) throw refusal("A .p12 of this size is not taken: at most 64 KB.");
    await apiSend("PUT", path, { p12: await base64Of(file), password });
    await refreshApi(path);
    setFile(null);
    reset();
    say("The uploaded certificate is in use.");
  };
  return (
    <form noValidate onSubmit={(event) => void handleSubmit((values) => send(() => upload(values)))(event)}>
      <h3>Upload one</h3>
      <p className="mb-3 text-sm text-soft">
        A .p12 or .pfx with an RSA key, and its password. Both are kept encrypted; neither is shown again.
      </p>
      {trouble ? (
        <Notice tone="trouble" className="mb-3">
          {trouble}
        </Notice>
      ) : null}
      <div className="mb-3 flex flex-wrap items-center gap-3">
        <FileButton label={file ? "Choose another" : "Choose a .p12"} accept=".p12,.pfx,application/x-pkcs12" onFile={setFile} />
        <span className="min-w-0 break-all">{file?.name ?? "No file chosen"}</span>
      </div>
      <TextField
        label="Password of the .p12"
        type="password"
        autoComplete="off"
        className="max-w-sm"
        error={formState.errors.password?.message}
        {...register("password")}
      />
      <Button type="submit" tone="primary" className="mt-4" busy={formState.isSubmitting} busyLabel="Checking">
        Use this certificate
      </Button>
    </form>
  );
}

function refusal(message: string): ApiFailure {
  return new ApiFailure(400, "invalid", message, {});
}

async function base64Of(file: File): Promise<string> {
  const bytes = new Uint8Array(await file.arrayBuffer());
  return btoa(Array.from(bytes, (byte) => String.fromCharCode(byte)).join(""));
}
