/** What the comparison's page draws of a pair: the overlay, and both drawings in one view. Pure; done in the browser. */
import { buildModel, clouded, drawModel, drawOverlay, proposeView, type CompareRow, type Drawing, type PaperBox, type SheetInput } from "@/iso";
import { measureText } from "@/fonts/widths";

/** Room each drawing is made for, mm: about a tabloid's overlay, and half of it. */
const OVERLAY = { widthMm: 330, heightMm: 215 };
const HALF = { widthMm: 230, heightMm: 200 };

export interface CompareViews {
  readonly overlay: Drawing;
  readonly before: Drawing;
  readonly after: Drawing;
}

/** null when the core cannot draw one of them; the stored PDFs are still there then. */
export function compareViews(from: SheetInput, to: SheetInput, rows: readonly CompareRow[]): CompareViews | null {
  try {
    const [then, now] = [from, to].map((input) => buildModel(input.document, input.marks, input.takeOuts)) as [ReturnType<typeof buildModel>, ReturnType<typeof buildModel>];
    const view = to.document.view ?? from.document.view ?? proposeView(now, measureText);
    const letter = ({ spool }: SheetInput, model: typeof now): string | null => (model.spools.some((one) => one.letter === spool) ? spool : null);
    const half = (input: SheetInput, model: typeof now, side: 0 | 1): Drawing => {
      const pointIds = clouded(rows, model, side);
      return drawModel(model, {
        ...HALF, measure: measureText, view, spool: letter(input, model), show: { items: false, welds: true, pieces: true, dimensions: true },
        changed: pointIds.length === 0 ? null : { code: to.revision.code, pointIds },
      });
    };
    return {
      overlay: drawOverlay(then, now, rows, { ...OVERLAY, measure: measureText, view, spools: [letter(from, then), letter(to, now)] }),
      before: half(from, then, 0), after: half(to, now, 1),
    };
  } catch {
    return null;
  }
}

/** Box that shows all of several drawings made for one room. */
export function boundsOf(drawings: readonly Drawing[]): PaperBox {
  return {
    minX: Math.min(...drawings.map(({ bounds }) => bounds.minX)), minY: Math.min(...drawings.map(({ bounds }) => bounds.minY)),
    maxX: Math.max(...drawings.map(({ bounds }) => bounds.maxX)), maxY: Math.max(...drawings.map(({ bounds }) => bounds.maxY)),
  };
}
