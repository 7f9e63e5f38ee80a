"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useFieldArray, useForm } from "react-hook-form";
import { z } from "zod";
import { formatLength, npsSchema, parseLength, type UnitSystem } from "@/iso";
import { NPS_OPTIONS } from "@/components/jobs/settings-text";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { Select, TextField } from "@/components/ui/field";
import { Loaded } from "@/components/ui/loaded";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { useFormSend } from "@/components/ui/use-form-send";
import type { ShopSettings } from "@/lib/rules/api-types";
import { stockRowSchema, type ShopSettingsForm } from "@/lib/rules/forms";
import { NestingView } from "./nesting-view";
import { OffcutView } from "./offcut-view";
import { useShopSettings } from "./use-shop-settings";

type StockRow = ShopSettings["stock"][number];

/** Stock lengths as a form holds them: numbers as typed. */
function stockSchema(units: UnitSystem) {
  const row = z
    .object({
      nps: npsSchema,
      schedule: z.string(),
      material: z.string(),
      length: z.string(),
      quantity: z.string(),
      cost: z.string(),
      heat: z.string(),
    })
    .transform((typed, context): StockRow => {
      const length = parseLength(typed.length, units);
      if (!length.ok) context.addIssue({ code: "custom", path: ["length"], message: length.message });
      const quantity = typed.quantity.trim() === "" ? null : Number(typed.quantity);
      const checked = stockRowSchema.safeParse({
        nps: typed.nps,
        schedule: typed.schedule,
        material: typed.material,
        lengthMm: length.ok ? length.mm : 1,
        quantity,
        ...(typed.cost.trim() === "" ? {} : { cost: Number(typed.cost) }),
        ...(typed.heat.trim() === "" ? {} : { heat: typed.heat }),
      });
      if (checked.success) return checked.data;
      for (const issue of checked.error.issues)
        context.addIssue({
          code: "custom",
          path: issue.path[0] === "lengthMm" ? ["length"] : [...issue.path],
          message: issue.message,
        });
      return z.NEVER;
    });
  return z.object({ stock: z.array(row).max(200, "At most 200 rows.") });
}

type StockInput = z.input<ReturnType<typeof stockSchema>>;
type StockOutput = z.output<ReturnType<typeof stockSchema>>;
const FIELDS = ["stock"] as const;

/** Stock lengths on the rack. */
export function StockView({ owner }: { readonly owner: boolean }) {
  const { shop, patch } = useShopSettings();
  return (
    <Loaded api={shop} label="Loading stock">
      {(data) => (
        <>
          <Section title="Stock lengths on the rack">
            <StockForm shop={data} owner={owner} onSave={(change) => patch(change, "Stock saved.")} />
          </Section>
          <OffcutView shop={data} owner={owner} />
          <NestingView shop={data} owner={owner} onSave={(change) => patch(change, "Saved.")} />
        </>
      )}
    </Loaded>
  );
}

function StockForm({
  shop,
  owner,
  onSave,
}: {
  readonly shop: ShopSettings;
  readonly owner: boolean;
  readonly onSave: (change: ShopSettingsForm) => Promise<void>;
}) {
  const { units, pipe } = shop.defaults;
  const typed = shop.stock.map((row) => ({
    ...row,
    length: formatLength(row.lengthMm, units),
    quantity: row.quantity === null ? "" : String(row.quantity),
    cost: row.cost === undefined ? "" : String(row.cost),
    heat: row.heat ?? "",
  }));
  const { register, control, handleSubmit, setError, formState } = useForm<StockInput, unknown, StockOutput>({
    resolver: zodResolver(stockSchema(units)),
    values: {
      stock: typed.map(({ nps, schedule, material, length, quantity, cost, heat }) => ({
        nps: nps as StockInput["stock"][number]["nps"],
        schedule,
        material,
        length,
        quantity,
        cost,
        heat,
      })),
    },
    resetOptions: { keepDirtyValues: true },
  });
  const rows = useFieldArray({ control, name: "stock" });
  const { trouble, send } = useFormSend(setError, FIELDS);
  const add = (
    <Button
      onClick={() =>
        rows.append({
          nps: pipe.nps,
          schedule: pipe.schedule,
          material: pipe.material,
          length: units === "metric" ? "6000" : "20'",
          quantity: "",
          cost: "",
          heat: "",
        })
      }
    >
      Add a length
    </Button>
  );
  return (
    <form
      noValidate
      onSubmit={(event) =>
        void handleSubmit((values) =>
          send(() => onSave({ stock: values.stock as ShopSettingsForm["stock"] })),
        )(event)
      }
    >
      {trouble ? (
        <Notice tone="trouble" className="mb-3">
          {trouble}
        </Notice>
      ) : null}
      {rows.fields.length === 0 ? (
        <EmptyState title="The rack is empty" action={owner ? add : null}>
          {owner
            ? "Enter the lengths you hold, so that cut lists can say where a piece comes from."
            : "The owner enters the lengths the shop holds."}
        </EmptyState>
      ) : null}
      <fieldset disabled={!owner} className="space-y-4">
        {rows.fields.map((row, n) => {
          const errors = formState.errors.stock?.[n];
          return (
            <div
              key={row.id}
              role="group"
              aria-label={`Stock row ${n + 1}`}
              className="grid grid-cols-2 items-start gap-3 border-b border-hair pb-4 lg:grid-cols-[7rem_6rem_1fr_8rem_8rem_7rem_8rem_auto]"
            >
              <Select
                label="Size"
                options={NPS_OPTIONS}
                error={errors?.nps?.message}
                {...register(`stock.${n}.nps`)}
              />
              <TextField
                label="Schedule"
                figure
                error={errors?.schedule?.message}
                {...register(`stock.${n}.schedule`)}
              />
              <TextField
                label="Material"
                className="col-span-2 lg:col-span-1"
                error={errors?.material?.message}
                {...register(`stock.${n}.material`)}
              />
              <TextField
                label="Length"
                figure
                error={errors?.length?.message}
                {...register(`stock.${n}.length`)}
              />
              <TextField
                label="Quantity"
                hint="Empty: as many as wanted"
                figure
                inputMode="numeric"
                error={errors?.quantity?.message}
                {...register(`stock.${n}.quantity`)}
              />
              <TextField
                label="Cost of one"
                hint="Your own money"
                figure
                inputMode="decimal"
                error={errors?.cost?.message}
                {...register(`stock.${n}.cost`)}
              />
              <TextField
                label="Heat"
                hint="If all have one"
                figure
                error={errors?.heat?.message}
                {...register(`stock.${n}.heat`)}
              />
              {owner ? (
                <Button
                  tone="quiet"
                  className="col-span-2 justify-self-start lg:col-span-1 lg:mt-7"
                  aria-label={`Remove stock row ${n + 1}`}
                  onClick={() => rows.remove(n)}
                >
                  Remove
                </Button>
              ) : null}
            </div>
          );
        })}
      </fieldset>
      {owner && (rows.fields.length > 0 || formState.isDirty) ? (
        <div className="mt-5 flex flex-wrap gap-3">
          {rows.fields.length > 0 ? add : null}
          <Button type="submit" tone="primary" busy={formState.isSubmitting} busyLabel="Saving">
            Save the stock
          </Button>
        </div>
      ) : null}
    </form>
  );
}
