"use client";
import { apiSend, refreshApi, useApi } from "@/components/ui/fetcher";
import { useToast } from "@/components/ui/notice";
import type { ShopSettings } from "@/lib/rules/api-types";
import type { ShopSettingsForm } from "@/lib/rules/forms";

/** The shop's settings and the one way to change part of them. */
export function useShopSettings() {
  const say = useToast();
  const shop = useApi<ShopSettings>("/api/shop");
  const patch = async (change: ShopSettingsForm, done: string) => {
    await apiSend("PATCH", "/api/shop", change);
    await refreshApi("/api/shop", "/api/viewer");
    say(done);
  };
  return { shop, patch };
}
