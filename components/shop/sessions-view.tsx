"use client";
import { Button } from "@/components/ui/button";
import { apiSend, failureText, refreshApi, useApi } from "@/components/ui/fetcher";
import { timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { useToast } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { Table, type Column } from "@/components/ui/table";
import type { SessionRow } from "@/lib/rules/api-types";

/** Where the viewer is signed in, each to be ended. */
export function SessionsView() {
  const sessions = useApi<readonly SessionRow[]>("/api/sessions");
  return (
    <Section title="Your sessions">
      <Loaded api={sessions} label="Loading sessions">
        {(rows) => <Sessions rows={rows} />}
      </Loaded>
    </Section>
  );
}

function Sessions({ rows }: { readonly rows: readonly SessionRow[] }) {
  const say = useToast();
  const end = async (row: SessionRow) => {
    try {
      await apiSend("DELETE", `/api/sessions/${row.id}`);
      say("Session ended.");
    } catch (failure) {
      say(failureText(failure), "trouble");
    }
    await refreshApi("/api/sessions");
  };
  const others = rows.filter((row) => !row.current);
  const endOthers = async () => {
    const ended = await Promise.allSettled(others.map((row) => apiSend("DELETE", `/api/sessions/${row.id}`)));
    const stuck = ended.find((one) => one.status === "rejected");
    if (stuck) say(failureText(stuck.reason), "trouble");
    else say("Your other sessions are ended.");
    await refreshApi("/api/sessions");
  };
  const columns: readonly Column<SessionRow>[] = [
    {
      key: "device",
      head: "Device",
      cell: (row) => (
        <span className="break-words">
          {row.device}
          {row.current ? <strong className="block">This one</strong> : null}
        </span>
      ),
    },
    { key: "created", head: "Signed in", cell: (row) => timeText(row.createdAt) },
    { key: "seen", head: "Last seen", cell: (row) => timeText(row.lastSeenAt) },
    {
      key: "end",
      head: "",
      cell: (row) => (row.current ? null : <Button onClick={() => void end(row)}>End it</Button>),
    },
  ];
  return (
    <>
      <Table caption="Your sessions" columns={columns} rows={rows} rowKey={(row) => row.id} />
      {others.length > 1 ? (
        <Button className="mt-4" onClick={() => void endOthers()}>
          End all but this one
        </Button>
      ) : null}
    </>
  );
}
