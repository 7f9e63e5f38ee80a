"use client";
import { useState } from "react";
import { ROLE_WORDS } from "@/components/shell/places";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { apiSend, failureText, refreshApi, useApi } from "@/components/ui/fetcher";
import { dayText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { Notice, useToast } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { Table, type Column } from "@/components/ui/table";
import type { PersonRow, Role } from "@/lib/rules/api-types";
import { Invitations } from "./invitations";

const ROLES = Object.keys(ROLE_WORDS) as Role[];

/** Who belongs to the shop, in which role; the owner changes roles, removes and invites. */
export function PeopleView({ owner }: { readonly owner: boolean }) {
  const people = useApi<readonly PersonRow[]>("/api/shop/people");
  return (
    <>
      <Section title="People">
        <Loaded api={people} label="Loading people">
          {(rows) => (
            <>
              {rows.length === 1 ? (
                <Notice className="mb-4">
                  You are alone in this shop. Signing needs a second person: invite an inspector.
                </Notice>
              ) : null}
              <PeopleTable rows={rows} owner={owner} />
            </>
          )}
        </Loaded>
      </Section>
      {owner ? <Invitations /> : <RoleHelp />}
    </>
  );
}

function PeopleTable({ rows, owner }: { readonly rows: readonly PersonRow[]; readonly owner: boolean }) {
  const [leaving, setLeaving] = useState<PersonRow | null>(null);
  const columns: Column<PersonRow>[] = [
    {
      key: "name",
      head: "Name",
      cell: (person) => (
        <span>
          <strong>{person.name}</strong>
          {person.you ? " (you)" : ""}
          <span className="block text-sm break-all text-soft">{person.email}</span>
        </span>
      ),
    },
    {
      key: "role",
      head: "Role",
      cell: (person) => (owner && !person.you ? <RoleSelect person={person} /> : ROLE_WORDS[person.role]),
    },
    { key: "joined", head: "Since", cell: (person) => dayText(person.joinedAt) },
  ];
  if (owner) {
    columns.push({
      key: "remove",
      head: "",
      cell: (person) =>
        person.you ? null : (
          <Button tone="quiet" aria-label={`Remove ${person.name}`} onClick={() => setLeaving(person)}>
            Remove
          </Button>
        ),
    });
  }
  return (
    <>
      <Table caption="People" columns={columns} rows={rows} rowKey={(person) => person.id} />
      <RemoveDialog person={leaving} onClose={() => setLeaving(null)} />
    </>
  );
}

function RoleSelect({ person }: { readonly person: PersonRow }) {
  const say = useToast();
  const change = async (role: Role) => {
    try {
      await apiSend("PATCH", `/api/shop/people/${person.id}`, { role });
      say(`${person.name}: ${ROLE_WORDS[role].toLowerCase()} from now on.`);
    } catch (failure) {
      say(failureText(failure), "trouble");
    }
    await refreshApi("/api/shop/people");
  };
  return (
    <select
      aria-label={`Role of ${person.name}`}
      value={person.role}
      onChange={(event) => void change(event.target.value as Role)}
      className="min-h-11 border border-rule bg-sheet px-3"
    >
      {ROLES.map((role) => (
        <option key={role} value={role}>
          {ROLE_WORDS[role]}
        </option>
      ))}
    </select>
  );
}

function RemoveDialog({
  person,
  onClose,
}: {
  readonly person: PersonRow | null;
  readonly onClose: () => void;
}) {
  const say = useToast();
  const [trouble, setTrouble] = useState<string | null>(null);
  const close = () => {
    setTrouble(null);
    onClose();
  };
  const remove = async () => {
    if (!person) return;
    try {
      await apiSend("DELETE", `/api/shop/people/${person.id}`);
      await refreshApi("/api/shop/people");
      say(`${person.name} is out of the shop.`);
      close();
    } catch (failure) {
      setTrouble(failureText(failure));
    }
  };
  return (
    <Dialog open={person !== null} onClose={close} title={`Remove ${person?.name ?? ""}`}>
      {trouble ? (
        <Notice tone="trouble" className="mb-3">
          {trouble}
        </Notice>
      ) : null}
      <p>
        {person?.name} is signed out at once and sees nothing of this shop any more. What they drew, signed
        and recorded keeps their name.
      </p>
      <DialogActions>
        <Button tone="stop" onClick={() => void remove()}>
          Remove from the shop
        </Button>
      </DialogActions>
    </Dialog>
  );
}

function RoleHelp() {
  return <p className="text-soft">The owner of the shop invites people and changes their roles.</p>;
}
