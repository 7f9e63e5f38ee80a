"use client";
import { useMemo, useState } from "react";
import type { LineSettings, SheetSize, TitleBlock } from "@/iso";
import { LogoField } from "./logo-field";
import { TitleFieldsForm } from "./title-fields-form";
import { TitlePreview, type TitlePreviewProps } from "./title-preview";
import type { TitleChange } from "./title-rows";

export interface TitleEditorProps {
  /** As saved; `order` is its stored order. */
  readonly titleBlock: TitleBlock;
  readonly logoPath: string;
  /** The logo set here; a job without one prints its shop's. */
  readonly ownLogo: TitleBlock["logo"];
  readonly size: SheetSize;
  readonly settings: LineSettings;
  readonly line: TitlePreviewProps["line"];
  readonly editable: boolean;
  readonly onSave: (change: TitleChange) => Promise<void>;
  readonly onLogo: () => void;
}

/** Fields, their order and the logo of a title block, with the sheet as it would print beside them. */
export function TitleEditor({ titleBlock, logoPath, ownLogo, size, settings, line, editable, onSave, onLogo }: TitleEditorProps) {
  const [typed, setTyped] = useState<TitleChange | null>(null);
  const [chosen, setChosen] = useState<string | null>(null);
  const shown = useMemo<TitleBlock>(() => {
    if (!typed) return titleBlock;
    const { order: saved, ...rest } = titleBlock;
    void saved;
    return { ...rest, fields: typed.fields, ...(typed.titleOrder.length > 0 ? { order: typed.titleOrder } : {}) };
  }, [titleBlock, typed]);
  return (
    <div className="grid items-start gap-8 xl:grid-cols-2">
      <TitleFieldsForm fields={titleBlock.fields} order={titleBlock.order} editable={editable} onSave={onSave} onTyped={setTyped} />
      <div className="min-w-0 space-y-8 xl:sticky xl:top-4">
        <TitlePreview titleBlock={shown} chosenLogo={chosen} size={size} settings={settings} line={line} />
        <LogoField path={logoPath} logo={ownLogo} editable={editable} onChanged={onLogo} onPreview={setChosen} />
      </div>
    </div>
  );
}
