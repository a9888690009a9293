import { figureText, withUnit } from '../band-handle';
import type { AxisText, BandRectangle, CellCounts, MapPoint, MapWindow } from './map-grid';

export interface MapFacts {
  readonly xAxis: AxisText;
  readonly yAxis: AxisText;
  readonly extent: MapWindow;
  readonly counts: CellCounts;
  readonly nominal: MapPoint | undefined;
  readonly failing: MapPoint | undefined;
  readonly band: BandRectangle | undefined;
  readonly proved: string | undefined;
}

/** What the picture shows, for those who do not see it. */
export function mapSentence(facts: MapFacts): string {
  const { xAxis, yAxis, extent, counts, nominal, failing, band, proved } = facts;
  const at = ({ x, y }: MapPoint) => `${withUnit(x, xAxis.unit)} and ${withUnit(y, yAxis.unit)}`;
  const across = `${xAxis.label} from ${range(extent.xLow, extent.xHigh, xAxis.unit)} across`;
  const up = `${yAxis.label} from ${range(extent.yLow, extent.yHigh, yAxis.unit)} up`;
  const sentences = [`Map with ${across} and ${up}.`, cellSentence(counts)];
  if (nominal !== undefined) sentences.push(`Nominal point at ${at(nominal)}.`);
  if (failing !== undefined) sentences.push(`Failing point at ${at(failing)}.`);
  const bands =
    band === undefined
      ? []
      : [bandText(xAxis, band.xLow, band.xHigh), bandText(yAxis, band.yLow, band.yHigh)].filter(
          (text) => text !== '',
        );
  if (bands.length > 0) sentences.push(`Band: ${bands.join(', ')}.`);
  if (proved !== undefined) sentences.push(`${proved.charAt(0).toUpperCase()}${proved.slice(1)}.`);
  return sentences.join(' ');
}

function cellSentence({ all, failing, unknown }: CellCounts): string {
  const fails =
    failing === 0
      ? 'No cell is below the limit'
      : failing === all
        ? `All ${all} cells are below the limit`
        : `${failing} of ${all} cells ${failing === 1 ? 'is' : 'are'} below the limit`;
  return unknown === 0 ? `${fails}.` : `${fails}, ${unknown} ${unknown === 1 ? 'is' : 'are'} unknown.`;
}

function bandText({ label, unit }: AxisText, low: number | null, high: number | null): string {
  if (low !== null && high !== null) return `${label} ${range(low, high, unit)}`;
  if (low !== null) return `${label} from ${withUnit(low, unit)} up`;
  return high === null ? '' : `${label} up to ${withUnit(high, unit)}`;
}

function range(low: number, high: number, unit: string): string {
  return `${figureText(low)} to ${withUnit(high, unit)}`;
}
