"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import { ROLE_WORDS } from "@/components/shell/places";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { apiSend, failureText, refreshApi, useApi } from "@/components/ui/fetcher";
import { Select, TextField } from "@/components/ui/field";
import { timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { Notice, useToast } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { Table, type Column } from "@/components/ui/table";
import { useFormSend } from "@/components/ui/use-form-send";
import type { InvitationRow, Role } from "@/lib/rules/api-types";
import { inviteSchema, type InviteForm } from "@/lib/rules/forms";

const FIELDS = ["email", "role"] as const;
const MAY: Readonly<Record<Role, string>> = {
  detailer: "Detailer: describes runs and submits sheets",
  inspector: "Inspector: reviews, signs, keeps the weld log",
  fitter: "Fitter: issued sheets, records cut, fit-up and weld",
  owner: "Owner: everything, and the account",
};
const ROLE_OPTIONS = (Object.keys(MAY) as Role[]).map((value) => ({ value, label: MAY[value] }));

/** Invitations that wait, and a new one by mail. */
export function Invitations() {
  const invitations = useApi<readonly InvitationRow[]>("/api/shop/invitations");
  return (
    <Section title="Invitations">
      <InviteFields />
      <div className="mt-6">
        <Loaded api={invitations} label="Loading invitations" lines={2}>
          {(rows) =>
            rows.length === 0 ? (
              <EmptyState title="No invitation waits">
                Invite a person above; the link in the mail works once.
              </EmptyState>
            ) : (
              <Waiting rows={rows} />
            )
          }
        </Loaded>
      </div>
    </Section>
  );
}

function InviteFields() {
  const say = useToast();
  const { register, handleSubmit, setError, reset, formState } = useForm<InviteForm>({
    resolver: zodResolver(inviteSchema),
    defaultValues: { email: "", role: "detailer" },
  });
  const { trouble, send } = useFormSend(setError, FIELDS);
  const invite = (values: InviteForm) =>
    send(async () => {
      await apiSend("POST", "/api/shop/invitations", values);
      await refreshApi("/api/shop/invitations");
      say(`Invitation sent to ${values.email}.`);
      reset();
    });
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(invite)(event)}>
      {trouble ? (
        <Notice tone="trouble" className="mb-3">
          {trouble}
        </Notice>
      ) : null}
      <div className="grid items-start gap-4 sm:grid-cols-[1fr_1.3fr_auto]">
        <TextField
          label="E-mail address"
          type="email"
          error={formState.errors.email?.message}
          {...register("email")}
        />
        <Select
          label="Role"
          options={ROLE_OPTIONS}
          error={formState.errors.role?.message}
          {...register("role")}
        />
        <Button
          type="submit"
          tone="primary"
          className="sm:mt-7"
          busy={formState.isSubmitting}
          busyLabel="Sending"
        >
          Invite
        </Button>
      </div>
    </form>
  );
}

function Waiting({ rows }: { readonly rows: readonly InvitationRow[] }) {
  const say = useToast();
  const withdraw = async (row: InvitationRow) => {
    try {
      await apiSend("DELETE", `/api/shop/invitations/${row.id}`);
      say("Invitation withdrawn.");
    } catch (failure) {
      say(failureText(failure), "trouble");
    }
    await refreshApi("/api/shop/invitations");
  };
  const columns: readonly Column<InvitationRow>[] = [
    { key: "email", head: "E-mail address", cell: (row) => <span className="break-all">{row.email}</span> },
    { key: "role", head: "Role", cell: (row) => ROLE_WORDS[row.role] },
    { key: "expires", head: "Runs out", cell: (row) => timeText(row.expiresAt) },
    {
      key: "withdraw",
      head: "",
      cell: (row) => (
        <Button
          tone="quiet"
          aria-label={`Withdraw the invitation of ${row.email}`}
          onClick={() => void withdraw(row)}
        >
          Withdraw
        </Button>
      ),
    },
  ];
  return <Table caption="Invitations" columns={columns} rows={rows} rowKey={(row) => row.id} />;
}
