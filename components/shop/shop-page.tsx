"use client";
import { useState } from "react";
import { useViewer } from "@/components/shell/use-viewer";
import { ChoiceRow, type Choice } from "@/components/ui/choice-row";
import { Loaded } from "@/components/ui/loaded";
import { TitleStrip } from "@/components/ui/title-strip";
import type { Viewer } from "@/lib/rules/api-types";
import { canDo } from "@/lib/rules/permissions";
import { AuditView } from "./audit-view";
import { CertificateView } from "./certificate-view";
import { PeopleView } from "./people-view";
import { SessionsView } from "./sessions-view";
import { ShopSettingsView } from "./shop-settings-view";
import { StockView } from "./stock-view";
import { TakeOutView } from "./take-out-view";

type Part = "people" | "settings" | "stock" | "take-outs" | "certificate" | "sessions" | "log";

/** The shop's account: people, settings, stock, take-outs, one's own sessions, the log. */
export function ShopPage() {
  const viewer = useViewer();
  return (
    <Loaded api={viewer} page label="Loading the shop">
      {(data) => <Shop viewer={data} />}
    </Loaded>
  );
}

function Shop({ viewer }: { readonly viewer: Viewer }) {
  const [part, setPart] = useState<Part>("people");
  const owner = canDo(viewer.role, "shop.change");
  const choices: Choice<Part>[] = [
    { value: "people", label: "People" },
    { value: "settings", label: "Settings" },
    { value: "stock", label: "Stock" },
    { value: "take-outs", label: "Take-outs" },
    { value: "certificate", label: "Certificate" },
    { value: "sessions", label: "Your sessions" },
  ];
  if (canDo(viewer.role, "log.read")) choices.push({ value: "log", label: "Log" });
  return (
    <>
      <TitleStrip kind="Shop" title={viewer.shop.name} />
      <div className="mb-6" data-screen-only>
        <ChoiceRow label="Part of the shop" choices={choices} value={part} onChange={setPart} />
      </div>
      {part === "people" ? <PeopleView owner={owner} /> : null}
      {part === "settings" ? <ShopSettingsView owner={owner} /> : null}
      {part === "stock" ? <StockView owner={owner} /> : null}
      {part === "take-outs" ? <TakeOutView owner={owner} /> : null}
      {part === "certificate" ? <CertificateView owner={owner} /> : null}
      {part === "sessions" ? <SessionsView /> : null}
      {part === "log" ? <AuditView /> : null}
    </>
  );
}
