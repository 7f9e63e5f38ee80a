/** A cutting plan as rows, for the screen and for CSV: one row per piece, in the order it is cut. Pure. */
import { formatLength } from "@/iso";
import { planWord, unitMm, unplacedWord, type NestDetail, type NestGroup, type NestPiece, type NestResult, type NestSource } from "./nest-plans";

export interface PlanBar {
  /** "group:bar", as heats are named by. */
  readonly key: string;
  /** From 1, through all groups. */
  readonly number: number;
  readonly lengthMm: number;
  readonly offcut: boolean;
  /** "" = not known. */
  readonly heat: string;
  readonly pieces: readonly { readonly piece: NestPiece; readonly startMm: number; readonly lengthMm: number }[];
  readonly restMm: number;
  readonly returned: boolean;
}

export interface PlanGroup {
  readonly group: NestGroup;
  readonly title: string;
  readonly bars: readonly PlanBar[];
  readonly unplaced: readonly { readonly mark: string; readonly reason: string }[];
  readonly word: string;
  readonly cost: number;
  readonly costed: boolean;
  readonly cutMm: number;
  readonly takenMm: number;
  readonly returnedMm: number;
}

/** The plan's groups with everything in mm. */
export function planGroups(source: NestSource, result: NestResult): PlanGroup[] {
  let number = 0;
  return result.groups.map((plan, g): PlanGroup => {
    const group = source.groups[g]!;
    const unit = unitMm(group.units);
    const piece = new Map(group.pieces.map((p) => [p.id, p]));
    const kerf = Math.ceil(source.saw.kerfMm / unit - 1e-4);
    const trim = Math.ceil(source.endTrimMm / unit - 1e-4);
    const bars = plan.bars.map((bar, b): PlanBar => {
      number += 1;
      let at = trim;
      const pieces = bar.pieces.map(({ mark, length }) => {
        const start = at;
        at += length + kerf;
        return { piece: piece.get(mark)!, startMm: start * unit, lengthMm: length * unit };
      });
      const stock = source.stock.find((s) => s.id === bar.stockId);
      return {
        key: `${g}:${b}`, number, lengthMm: bar.stockLength * unit, offcut: stock?.kind === "offcut", heat: bar.heat ?? result.heats?.[`${g}:${b}`] ?? "",
        pieces, restMm: bar.rest * unit, returned: bar.returned,
      };
    });
    const sum = (of: (bar: PlanBar) => number) => bars.reduce((total, bar) => total + of(bar), 0);
    return {
      group, title: groupTitle(group), bars, word: planWord(plan), cost: plan.cost, costed: plan.costed,
      unplaced: plan.unplaced.map(({ mark, reason }) => ({ mark: pieceWord(piece.get(mark)!), reason: unplacedWord(reason) })),
      cutMm: sum((bar) => bar.pieces.reduce((total, p) => total + p.lengthMm, 0)), takenMm: sum((bar) => bar.lengthMm), returnedMm: sum((bar) => (bar.returned ? bar.restMm : 0)),
    };
  });
}

export function pieceWord({ line, mark }: NestPiece): string {
  return `${line} ${mark}`;
}

export function groupTitle({ nps, schedule, material, specification, units }: NestGroup): string {
  return [`${units === "metric" ? "Pipe of NPS" : "NPS"} ${nps}`, schedule, material, specification].filter((part) => part !== "").join(", ");
}

/** Head and rows. Lengths as the line writes them, and in mm. */
export function planRows(nest: Pick<NestDetail, "source" | "result" | "title" | "state">): (string | number)[][] {
  const head = ["Length no.", "Size", "Schedule", "Material", "Stock", "Stock length", "Heat", "Cut", "Line", "Spool", "Piece", "Cut length", "Cut length mm", "Starts at mm", "Rest mm", "Rest goes back"];
  const groups = nest.result ? planGroups(nest.source, nest.result) : [];
  return [
    head,
    ...groups.flatMap(({ group, bars }) =>
      bars.flatMap((bar) =>
        bar.pieces.map(({ piece, startMm, lengthMm }, k): (string | number)[] => [
          bar.number, group.nps, group.schedule, group.material, bar.offcut ? "offcut" : "full length", formatLength(bar.lengthMm, group.units), bar.heat, k + 1,
          piece.line, piece.spool, piece.mark, formatLength(lengthMm, group.units), tenth(lengthMm), tenth(startMm), k === bar.pieces.length - 1 ? tenth(bar.restMm) : "", k === bar.pieces.length - 1 ? (bar.returned ? "yes" : "no") : "",
        ]),
      ),
    ),
  ];
}

function tenth(mm: number): number {
  return Math.round(mm * 10) / 10;
}
