/** The one door into the core. Inside iso/ nobody imports this file. One line per file, grouped by room. */

// geometry
export * from "./geometry/types";
export * from "./geometry/vec3";
export * from "./geometry/paper";
export * from "./geometry/tolerances";

// units
export * from "./units/length";
export * from "./units/direction";
export * from "./units/slope";
export * from "./units/format";

// catalogue
export * from "./catalogue/keys";
export * from "./catalogue/catalogue";
export * from "./catalogue/pipe";
export * from "./catalogue/key-words";
export * from "./catalogue/missing-keys";

// closing
export * from "./closing/closing-types";
export * from "./closing/solver";
export * from "./closing/elbow-marks";
export * from "./closing/advice";
export * from "./closing/sensitivity";
export * from "./closing/end-spread";
export * from "./closing/close-between";
export * from "./closing/snap-between";
export * from "./closing/snap";

// ways
export * from "./ways/ways-types";
export { quickWays, standardWays } from "./ways/find-ways";
export { threeElbowWays, WALK_STEPS, type ThreeElbowResult } from "./ways/three-elbow";
export { threeElbowRefusal } from "./ways/refusals";
export { sortWays, uniqueWays } from "./ways/order";
export * from "./ways/way-stops";

// survey
export * from "./survey/survey-document";
export * from "./survey/survey-tools";
export * from "./survey/survey-result";
export * from "./survey/paste-points";
export type { SurveyEndResult } from "./survey/survey-ends";
export * from "./survey/end-influences";
export type { SurveyFinding } from "./survey/survey-read";

// fit
export * from "./fit/fit-settings";
export * from "./fit/fit-types";
export type { FitFace, FitPiece } from "./fit/chain";
export * from "./fit/closing-chain";
export * from "./fit/end-errors";
export * from "./fit/fit-of-chain";
export * from "./fit/fit-of-closing";
export { chanceNumber, chanceWords, trimWords } from "./fit/fit-words";

// nest
export * from "./nest/nest-types";
export { nestPieces } from "./nest/nest";

// layout
export * from "./layout/mitre";
export * from "./layout/saddle";
export * from "./layout/checks";
export * from "./layout/lengths";
export * from "./layout/tile";
export type { Template } from "./layout/template";
export * from "./layout/spool-templates";
export * from "./layout/as-fitted";
export * from "./layout/as-fitted-document";
export * from "./layout/as-fitted-types";
export { pointName as fittedPointName } from "./layout/as-fitted-read";
export { fittedWanted, type Wanted, type WantedFace, type WantedCorner } from "./layout/as-fitted-wanted";
export { wayWords as fittedWayWords } from "./layout/as-fitted-judge";
export { FITTED_VIEWS, FITTED_WORDS, fittedPicture, type FittedView } from "./layout/as-fitted-picture";

// run
export * from "./run/document";
export * from "./run/model-types";
export * from "./run/build-model";
export * from "./run/marks";
export * from "./run/mark-names";
export * from "./run/defaults";
export * from "./run/edit";
export * from "./run/edit-result";
export * from "./run/entry-words";
export * from "./run/reorder";
export * from "./run/reverse";
export * from "./run/mirror";
export * from "./run/insert-line";
export * from "./run/axes";

// draw
export * from "./draw/drawing-types";
export { drawModel } from "./draw/draw-model";
export { drawSheets, type SheetsOptions } from "./draw/draw-sheets";
export { proposeView } from "./draw/orient";
export * from "./draw/svg";
export { endKeys, jointKeys, partKeys } from "./draw/legend-keys";
export { inkBounds } from "./draw/item-bounds";
export { itemMoved } from "./draw/paths";

// sheet
export * from "./sheet/sheet-types";
export * from "./sheet/sheet-size";
export * from "./sheet/compose";
export * from "./sheet/state-mark";
export * from "./sheet/title-order";
export { LEGEND_WORDS, legendItems, legendLayout } from "./sheet/legend";
export { legendPicture } from "./sheet/legend-pictures";
export * from "./sheet/bench-pages";
export { benchChecks } from "./sheet/bench-tables";
export * from "./sheet/template-pages";
export * from "./sheet/as-fitted-pages";
export * from "./sheet/set-types";
export { composeCutMapPages } from "./sheet/cut-map";
export { composeWeldMapPages } from "./sheet/weld-map";
export { composeLegendPages } from "./sheet/legend-page";
export * from "./sheet/sheet-set";
export { composeIndexPages, type IndexEntry, type IndexInput } from "./sheet/index-pages";
export * from "./sheet/cover-pages";
export { sheetFacts, sizeText as pipeSizeText, type SheetFacts } from "./sheet/sheet-facts";

// compare
export * from "./compare/compare-types";
export { clouded, composeComparePages, sideOf as compareSideOf, type CompareFacts } from "./compare/compare-pages";
export { rowName as compareRowName, sideWords as compareSideWords } from "./compare/compare-table";
export { overlayLegend } from "./compare/overlay-legend";
export { drawOverlay, type OverlayDrawing, type OverlayOptions } from "./compare/overlay";

// exchange
export { drawingDxf, dxfLayer } from "./exchange/dxf";
