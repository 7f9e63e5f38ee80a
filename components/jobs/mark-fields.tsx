/** How a job numbers welds, pieces and spools. */
import { Select, TextField } from "@/components/ui/field";
import { Group, type SettingsPart } from "./settings-group";

const ADDED = [
  { value: "letter", label: "Number before it and a letter (5A)" },
  { value: "next", label: "Next free number" },
];
const SPOOL_MARKS = [
  { value: "letters", label: "Letters (A, B, C)" },
  { value: "numbers", label: "Numbers (1, 2, 3)" },
];
export function MarkFields({ register, errors }: SettingsPart) {
  return (
    <Group
      title="Marks"
      hint="How welds, cut pieces and spools are numbered. Once a line is submitted, or work on it is recorded, a mark given stays: a joint taken out is listed VOID and its number is never used again, and these rules hold for what is added later. Threaded and bolted joints carry no weld number."
    >
      <TextField label="Weld prefix" figure error={errors.weldPrefix?.message} {...register("weldPrefix")} />
      <TextField label="First weld" figure error={errors.weldStart?.message} {...register("weldStart")} />
      <TextField label="Piece prefix" figure error={errors.piecePrefix?.message} {...register("piecePrefix")} />
      <TextField label="First piece" figure error={errors.pieceStart?.message} {...register("pieceStart")} />
      <Select
        label="A joint added in between takes"
        options={ADDED}
        error={errors.added?.message}
        {...register("added")}
      />
      <Select label="Spools are marked by" options={SPOOL_MARKS} error={errors.spools?.message} {...register("spools")} />
    </Group>
  );
}
