/*
 * The part of the core that decides, apart from the rest of it so that the worker loads it when it is first wanted.
 */
export { estimateArriving } from "../../src/choose/arriving-estimate.ts";
export { CellTrials } from "../../src/choose/cell-trials.ts";
export { windowDepartures } from "../../src/choose/departure-window.ts";
export { latestInTime } from "../../src/choose/in-time.ts";
export type { MinuteCells } from "../../src/choose/minute-cells.ts";
export { fastestBound, leastUseBound, type PaceBound } from "../../src/choose/pace-bound.ts";
export { fastestWithReserve, leastUseSpeed, paceCurve } from "../../src/choose/pace-curve.ts";
export { refinedBests, refineRoutes } from "../../src/choose/refine.ts";
export type { Steps } from "../../src/choose/steps.ts";
export { type SureWindow, sureWindow } from "../../src/choose/sure-window.ts";
export type { Sweep } from "../../src/choose/sweep.ts";
export { withTurnBack } from "../../src/choose/turn-back-estimate.ts";
export { conditionsOf, type UncertaintyAsked, withUncertainty } from "../../src/choose/uncertain-estimate.ts";
export { makeSweep, sweepCells } from "../../src/choose/window.ts";
export { summariseWindow } from "../../src/choose/window-summary.ts";
export { boundText } from "../../src/report/sure-text.ts";
