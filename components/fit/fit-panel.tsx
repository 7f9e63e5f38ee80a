"use client";
/** How sure is the fit: the verdict first, then what makes it so, what would make it surer, and what it was worked from. */
import { zodResolver } from "@hookform/resolvers/zod";
import { useDeferredValue, useMemo } from "react";
import { useForm, useWatch } from "react-hook-form";
import { fitOfClosing, flangeBolts, solverInput, vecUnit, type CloseBetweenInput, type ClosingFound, type FitFace, type FitTrim, type LineSettings, type Nps, type Vec3 } from "@/iso";
import { Select, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { FitFields, LIMIT_FIELDS, SHOP_FIELDS } from "./fit-fields";
import { fitFormSchema, fitFormStart, type FitFormTexts, type FitFormValues } from "./fit-form-schema";
import { FitContributions, FitMismatches, FitTrims } from "./fit-tables";
import { FitVerdict } from "./fit-verdict";
import { endErrors, type SurveySource } from "./known-ends";
import { useFitSurvey } from "./use-fit-survey";

export interface FitPanelProps {
  /** The closing as it was asked, and its answer. */
  readonly input: CloseBetweenInput;
  readonly answer: ClosingFound;
  /** Ends of the line's survey that end 0 and end 1 were taken from; null = typed, or from the drawing. */
  readonly surveyedIds: readonly [string | null, string | null];
  /** Line whose survey it is; null without one. */
  readonly lineId: string | null;
  readonly nps: Nps;
  readonly settings: LineSettings;
  /** Joint whose field-fit weld is to go into the run, and the choice of it; absent where nothing is inserted. */
  readonly taken?: string | null;
  readonly onTake?: ((trim: FitTrim | null) => void) | undefined;
}

const TARGETS = ["0.8", "0.9", "0.95", "0.99"].map((value) => ({ value, label: `${Math.round(Number(value) * 100)} in 100` }));
const FIT_UPS = [
  { value: "shared", label: "Both joints share what is off" },
  { value: "set-true", label: "End 0 set true, all at end 1" },
];

export function FitPanel(props: FitPanelProps) {
  const { input, settings } = props;
  const { units } = input;
  const schema = useMemo(() => fitFormSchema(units), [units]);
  const { register, control, formState } = useForm<FitFormTexts, unknown, FitFormValues>({ resolver: zodResolver(schema), defaultValues: fitFormStart(settings.fit, units), mode: "onChange" });
  const texts = useWatch({ control });
  const values = useMemo(() => schema.safeParse(texts), [schema, texts]);
  const survey = useFitSurvey(props.surveyedIds.some((id) => id !== null) ? props.lineId : null);
  const typed = props.surveyedIds.some((id) => id === null);
  return (
    <section aria-labelledby="fit-head" className="mt-6 border-t border-hair pt-4">
      <h3 id="fit-head">How sure is the fit</h3>
      <div className="mt-3">{values.success ? <FitAnswer {...props} values={values.data} survey={survey} /> : <Notice tone="caution">A tolerance below cannot be read; the chance stands here once it can.</Notice>}</div>
      <form noValidate aria-label="What the fit is worked from" onSubmit={(event) => event.preventDefault()} className="mt-5" data-screen-only>
        <div className="grid gap-4 sm:grid-cols-2 lg:grid-cols-3">
          <Select label="Wanted" options={TARGETS} {...register("target")} />
          <Select label="Fit-up" options={FIT_UPS} {...register("fitUp")} />
          {([0, 1] as const).map((end) => (
            <Select key={end} label={`Joint at end ${end}`} options={faceOptions(settings, props.nps)} {...register(`face${end}`)} />
          ))}
          {typed ? (
            <>
              <TextField label="End not surveyed, position ±" hint="each way, two deviations" figure error={formState.errors.endPosition?.message} {...register("endPosition")} />
              <TextField label="End not surveyed, axis ±" hint="degrees" figure error={formState.errors.endAxis?.message} {...register("endAxis")} />
            </>
          ) : null}
        </div>
        <details className="mt-4" open={Object.keys(formState.errors).some((field) => field.startsWith("fit"))}>
          <summary className="inline-flex min-h-11 items-center font-medium text-dye underline underline-offset-4">Tolerances of the shop, and limits of a joint</summary>
          <p className="mb-3 text-sm text-soft">Usual values, some from memory as said beside them; the WPS, the specification and your own shop decide. The line&apos;s settings keep them.</p>
          <div className="grid gap-4 sm:grid-cols-2 lg:grid-cols-3">
            <FitFields fields={SHOP_FIELDS} register={register} errors={formState.errors} />
            <FitFields fields={LIMIT_FIELDS} register={register} errors={formState.errors} />
          </div>
        </details>
      </form>
    </section>
  );
}

function faceOptions({ ratingClass }: LineSettings, nps: Nps) {
  const bolted = flangeBolts(ratingClass, nps) ? [{ value: "flange", label: `Flange, class ${ratingClass}` }] : [];
  return [{ value: "butt", label: "Butt weld" }, ...bolted];
}

interface FitAnswerProps extends FitPanelProps {
  readonly values: FitFormValues;
  readonly survey: SurveySource | null;
}

function FitAnswer({ input, answer, surveyedIds, nps, settings, taken, onTake, values: newest, survey }: FitAnswerProps) {
  const values = useDeferredValue(newest);
  const closing = useMemo(() => solverInput(input), [input]);
  const axes = useMemo(() => [closing.d0, closing.d1].map((axis) => vecUnit(axis) ?? axis) as [Vec3, Vec3], [closing]);
  const [id0, id1] = surveyedIds;
  const errors = useMemo(() => endErrors([{ axis: axes[0], surveyedId: id0 }, { axis: axes[1], surveyedId: id1 }], survey, values.typed), [axes, id0, id1, survey, values.typed]);
  const result = useMemo(() => {
    const circleMm = flangeBolts(settings.ratingClass, nps)?.circleMm ?? null;
    const face = (kind: "butt" | "flange"): FitFace => (kind === "flange" && circleMm !== null ? { kind, boltCircleMm: circleMm } : { kind: "butt" });
    return fitOfClosing({
      closing, solution: answer.solution, odMm: input.odMm, units: input.units, errors, settings: values.settings,
      fitUp: values.fitUp, target: values.target, faces: [face(values.faces[0]), face(values.faces[1])],
    });
  }, [closing, answer, input, errors, values, settings.ratingClass, nps]);
  const unfit = survey !== null && survey.result.adjustment !== null && !survey.result.adjustment.fits;
  return (
    <div aria-live="polite" aria-busy={values !== newest}>
      {unfit ? <Notice tone="caution" className="mb-3">The survey&apos;s readings do not fit together within their tolerances: a slip among them counts for more than anything below. Measure again first.</Notice> : null}
      <FitVerdict result={result} target={values.target} />
      {result.probability === null ? null : (
        <div className="mt-5 space-y-6">
          <section aria-label="Trim">
            <h4 className="font-bold">Field-fit weld and trim</h4>
            <FitTrims trims={result.trims} target={values.target} units={input.units} taken={taken} onTake={onTake} />
          </section>
          <section aria-label="Mismatches">
            <h4 className="font-bold">How far it may miss</h4>
            <FitMismatches result={result} fitUp={values.fitUp} units={input.units} axis={axes[1]} flanged={values.faces[1] === "flange"} />
          </section>
          <section aria-label="Contributions">
            <h4 className="mb-1 font-bold">What it comes from</h4>
            <FitContributions contributions={result.contributions} />
          </section>
        </div>
      )}
      <p className="mt-4 text-caution">Do not pull, jack or heat to fit. Code, WPS and acceptance come from the engineer and the owner.</p>
    </div>
  );
}
