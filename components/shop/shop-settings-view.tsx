"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import { LineSettingsForm } from "@/components/jobs/line-settings-form";
import { SHEET_OPTIONS } from "@/components/jobs/sheet-words";
import { TitleEditor } from "@/components/jobs/title-editor";
import { Button } from "@/components/ui/button";
import { refreshApi } from "@/components/ui/fetcher";
import { Select, TextField } from "@/components/ui/field";
import { Loaded } from "@/components/ui/loaded";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { useFormSend } from "@/components/ui/use-form-send";
import type { ShopSettings } from "@/lib/rules/api-types";
import { shopSettingsSchema, type ShopSettingsForm } from "@/lib/rules/forms";
import { useShopSettings } from "./use-shop-settings";

const schema = shopSettingsSchema.pick({ name: true, sheetSize: true });
const FIELDS = ["name", "sheetSize"] as const;

/** What the shop hands down to new jobs, and its own title block. */
export function ShopSettingsView({ owner }: { readonly owner: boolean }) {
  const { shop, patch } = useShopSettings();
  return (
    <Loaded api={shop} label="Loading settings" lines={8}>
      {(data) => (
        <>
          {owner ? null : (
            <Notice className="mb-6">Your role reads these settings. The owner changes them.</Notice>
          )}
          <Section title="Name and sheet">
            <HeadFields shop={data} owner={owner} onSave={(values) => patch(values, "Shop saved.")} />
          </Section>
          <Section title="Title block">
            <TitleEditor
              titleBlock={data.titleBlock}
              logoPath="/api/shop/logo"
              ownLogo={data.titleBlock.logo}
              size={data.sheetSize}
              settings={data.defaults}
              line={null}
              editable={owner}
              onSave={(change) => patch(change, "Title block saved.")}
              onLogo={() => void refreshApi("/api/shop")}
            />
          </Section>
          <Section title="Defaults for new jobs">
            <p className="mb-4 text-soft">Jobs that exist keep their own.</p>
            <LineSettingsForm
              settings={data.defaults}
              editable={owner}
              onSave={(defaults) => patch({ defaults }, "Defaults saved.")}
            />
          </Section>
        </>
      )}
    </Loaded>
  );
}

function HeadFields({
  shop,
  owner,
  onSave,
}: {
  readonly shop: ShopSettings;
  readonly owner: boolean;
  readonly onSave: (values: ShopSettingsForm) => Promise<void>;
}) {
  const { register, handleSubmit, setError, formState } = useForm<ShopSettingsForm>({
    resolver: zodResolver(schema),
    values: { name: shop.name, sheetSize: shop.sheetSize },
    resetOptions: { keepDirtyValues: true },
  });
  const { trouble, send } = useFormSend(setError, FIELDS);
  return (
    <form noValidate onSubmit={(event) => void handleSubmit((values) => send(() => onSave(values)))(event)}>
      {trouble ? (
        <Notice tone="trouble" className="mb-3">
          {trouble}
        </Notice>
      ) : null}
      <fieldset disabled={!owner} className="grid gap-4 sm:grid-cols-2 xl:grid-cols-4">
        <TextField label="Name of the shop" error={formState.errors.name?.message} {...register("name")} />
        <Select
          label="Sheet size of new jobs"
          options={SHEET_OPTIONS}
          error={formState.errors.sheetSize?.message}
          {...register("sheetSize")}
        />
      </fieldset>
      {owner ? (
        <Button
          type="submit"
          tone="primary"
          className="mt-5"
          busy={formState.isSubmitting}
          busyLabel="Saving"
        >
          Save
        </Button>
      ) : null}
    </form>
  );
}
