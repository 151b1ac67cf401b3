export { type CountBar, CountColumn } from "./columns/count-column.tsx";
export { DensityColumn, type DensityPoint, type LevelSet } from "./columns/density-column.tsx";
export {
  type HiddenRock,
  LithologyColumn,
  type LoggedBed,
  lithologyPatterns,
} from "./columns/lithology-column.tsx";
export {
  type SearchedGroup,
  type SearchedSample,
  SearchRail,
  searchRailPatterns,
  searchRailWidth,
} from "./columns/search-rail.tsx";
export { type CurvePoint, ValueColumn, type ValuePoint, type ValueScale } from "./columns/value-column.tsx";
export { linearColumn, logColumn } from "./columns/value-scale.ts";
export { Credits, creditLines, creditsDepth } from "./credits.tsx";
export { FACE_IDS, FACES, type Face, type FaceId, fontFaceCss, fontFaceLinks } from "./faces.ts";
export { type AxisReading, axisTicks, HeightAxis, readingAt } from "./height-axis.tsx";
export { type HeightScale, heightScale, type Lens } from "./height-scale.ts";
export { Legend, type LegendEntry, legendLayout } from "./legend.tsx";
export { lithologyOf } from "./lithology/lithology.ts";
export { lithologyLegend, PATTERN_CREDIT } from "./lithology/lithology-legend.ts";
export { HorizonLine, type HorizonMark } from "./marks/horizon-line.tsx";
export { Taper, type TaperStep } from "./marks/taper.tsx";
export { Plate, POINTS_PER_MM } from "./plate.tsx";
export { type PlateFile, plates } from "./plates/all-plates.ts";
export type { Drawing, Panel, SectionView, VerticalScale, View } from "./plates/drawing.ts";
export { fenceDiagram } from "./plates/fence-diagram.tsx";
export { markerPlate } from "./plates/marker-plate.tsx";
export { rangeChart, rangeChartPages } from "./plates/range-chart.tsx";
export type { AsideFind, PagedView, RangeOrder, RangeView } from "./plates/range-view.ts";
export { type TimingView, timingPlate } from "./plates/timing-plate.tsx";
export { renderPlate } from "./render-plate.ts";
export { fitText, type TextStyle, textWidth, wrapText } from "./text.ts";
export { COLOURS, GROUP_SIGNS, type GroupSign, groupSign, SMALLEST_TEXT } from "./theme.ts";
