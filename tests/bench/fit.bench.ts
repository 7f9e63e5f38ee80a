/** The chance of a fit: 50 cases against 100 000 draws of the building simulation each, and what one answer costs. */
import { fitOfClosing } from "../../iso";
import { checkedCases, simulationOf } from "../iso/fit/cases";
import { simulateFit } from "../oracle/fit-simulation";
import { medianTimesUs, timeText, type BenchRow } from "./stopwatch";

const CASES = 50;
const DRAWS = 100_000;
/** Points of 100. */
const BUDGET = 2;

export async function measure(): Promise<BenchRow[]> {
  const cases = checkedCases(CASES);
  const off = cases.map((each) => 100 * (fitOfClosing(each.input).probability! - simulateFit(simulationOf(each, DRAWS))));
  const worst = Math.max(...off.map(Math.abs));
  const mean = off.reduce((sum, each) => sum + each, 0) / off.length;
  const one = simulationOf(cases[0]!, 1000);
  const [answerUs = NaN, drawsUs = NaN] = await medianTimesUs(
    [
      { name: "answer", times: 1, work: () => fitOfClosing(cases[0]!.input) },
      { name: "1 000 draws", times: 1, work: () => simulateFit(one) },
    ],
    20,
  );
  return [
    { name: "chance of a fit, largest miss of simulation", figure: worst, unit: "points", budget: BUDGET, detail: `${CASES} cases of ${DRAWS} draws, mean miss ${mean.toFixed(3)}` },
    { name: "whole answer : 1 000 draws", figure: answerUs / drawsUs, detail: `${timeText(answerUs)} : ${timeText(drawsUs)}` },
  ];
}
