/** HiGHS (compiled to WebAssembly) as the linear programme solver the nesting asks for. */
import loadHighs from "highs";
import type { LpModel, OpenLp } from "@/iso";

/** HiGHS's number for the primal simplex: a kept basis stays feasible when columns are added. */
const PRIMAL_SIMPLEX = 4;
const LEAST_SECONDS = 0.01;

/** Opens programmes for nestPieces(). Solving blocks its thread: keep it off the web's. */
export async function loadLpSolver(): Promise<OpenLp> {
  const highs = await loadHighs();
  return (rows): LpModel => {
    const model = highs.createModel();
    model.options.set("output_flag", false);
    model.options.set({ simplex_strategy: PRIMAL_SIMPLEX, presolve: "off" });
    for (const { least, most } of rows) model.addRow(least, most, { indices: [], values: [] });
    let columns = 0;
    const done = () => model.getModelStatus() === highs.constants.modelStatus.optimal;
    return {
      addColumns(added) {
        const count = added.length;
        const starts = [0];
        for (const { rows: at } of added) starts.push(starts[starts.length - 1]! + at.length);
        model.addCols({
          cost: Float64Array.from(added, (column) => column.cost),
          lower: new Float64Array(count),
          upper: new Float64Array(count).fill(Number.POSITIVE_INFINITY),
          matrix: {
            format: "csc", numRows: rows.length, numCols: count, starts: Int32Array.from(starts),
            indices: Int32Array.from(added.flatMap((column) => [...column.rows])),
            values: Float64Array.from(added.flatMap((column) => [...column.values])),
          },
        });
        columns += count;
      },
      setRow: (row, least, most) => void model.changeRowBounds(row, least, most),
      solve() {
        model.run();
        if (!done()) return null;
        const { colValue, rowDual } = model.getSolution();
        return { objective: model.getObjectiveValue(), values: colValue, rowDuals: rowDual };
      },
      solveWhole(seconds, start) {
        model.options.set({ time_limit: model.getRunTime() + Math.max(LEAST_SECONDS, seconds), mip_rel_gap: 0 });
        model.changeColsIntegrality({ kind: "range", from: 0, to: columns - 1 }, new Int32Array(columns).fill(highs.constants.variableType.integer));
        model.setSolution({ colValue: Float64Array.from(start) });
        model.run();
        const optimal = done();
        const values = model.getSolution().colValue;
        const found = optimal || Number.isFinite(model.info.get("mip_gap"));
        return found ? { optimal, bound: Number(model.info.get("mip_dual_bound")), values } : null;
      },
      close: () => model.dispose(),
    };
  };
}
