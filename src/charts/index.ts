export { type CarpetAxis, type CarpetPlotData, carpetPlot } from './carpet-plot.ts';
export {
  type ElevatorToTrimData,
  elevatorToTrim,
  type TrimCg,
  type TrimCurve,
  type TrimPanel,
} from './elevator-to-trim.ts';
export type { FlightTestSlopesData, FlownCg, StraightLine } from './flight-test-data.ts';
export { flightTestSlopes } from './flight-test-slopes.ts';
export type { MassPoint } from './geometry/burn-path.ts';
export type { LoadingCase, LoadingDiagramData, LoadingLimit } from './loading-data.ts';
export { loadingDiagram } from './loading-diagram.ts';
export { macRuler } from './mac-ruler.ts';
export type { MacRulerData, MacRulerRow } from './mac-ruler-data.ts';
export {
  type AxisMargins,
  type BandEdges,
  type MarginAlongAxisData,
  marginAlongAxis,
} from './margin-along-axis.ts';
export { type BuildUp, type NeutralPointBuildUpData, neutralPointBuildUp } from './neutral-point-build-up.ts';
export { type PlanOutline, type PlanPoint, type PlanViewData, planView } from './plan-view.ts';
export { type CellAxis, type RegionMapData, regionMap } from './region-map.ts';
export { type ChartFormat, chartFormats, renderChart } from './render-chart.ts';
export type { ChartHeading, ChartSpec } from './sheet.ts';
export { sliceChart } from './slice-chart.ts';
export type { GridAxis, SliceChartData, SlicePick, SliceRequirement } from './slice-data.ts';
export { type CgLimit, type TailSizingData, tailSizing } from './tail-sizing.ts';
