export { HeatMap } from './heat-map';
export type { AxisText, BandChange, BandEdge, BandRectangle, MapGrid, MapPoint, MapWindow } from './map-grid';
