import { contourLines } from './contour-lines';
import { isKnown, type MapGrid } from './map-grid';
import { distance, writeColour, type MapPalette } from './map-palette';

/** A map turned into pictures of one pixel a cell and lines, all that does not depend on size and view. */
export interface MapPicture {
  readonly columns: number;
  readonly rows: number;
  readonly colours: OffscreenCanvas;
  readonly failing: OffscreenCanvas | undefined;
  readonly unknown: OffscreenCanvas | undefined;
  readonly limitLines: readonly number[];
  /** At 1.5 and 2 times the limit. */
  readonly fineLines: readonly number[];
}

/** Where a node lies on the canvas, in device pixels. */
export interface MapPlace {
  readonly width: number;
  readonly height: number;
  /** Place of the first node and the distance to the next; y runs up, so its distance is negative. */
  readonly x0: number;
  readonly y0: number;
  readonly dx: number;
  readonly dy: number;
  readonly pixelRatio: number;
}

/** Multiples of the limit with a fine line. */
const FINE_LEVELS = [1.5, 2];
const HATCH = 8;

export function pictureOf(map: MapGrid, limit: number, palette: MapPalette): MapPicture {
  const rows = map.values.length;
  const columns = map.values[0]?.length ?? 0;
  const colours = new ImageData(columns, rows);
  const failing = new ImageData(columns, rows);
  const unknown = new ImageData(columns, rows);
  const reach = reachOf(map, limit);
  let anyFails = false;
  let anyUnknown = false;
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const value = map.values[row][column];
      const at = 4 * ((rows - 1 - row) * columns + column);
      if (!isKnown(value)) {
        colours.data.set([palette.unknown.r, palette.unknown.g, palette.unknown.b, 255], at);
        unknown.data[at + 3] = 255;
        anyUnknown = true;
        continue;
      }
      writeColour(colours.data, at, distance(value, limit, reach), palette);
      if (value < limit) {
        failing.data[at + 3] = 255;
        anyFails = true;
      }
    }
  }
  return {
    columns,
    rows,
    colours: canvasOf(colours),
    failing: anyFails ? canvasOf(failing) : undefined,
    unknown: anyUnknown ? canvasOf(unknown) : undefined,
    limitLines: contourLines(map, limit),
    fineLines: limit > 0 ? FINE_LEVELS.flatMap((level) => contourLines(map, level * limit)) : [],
  };
}

export function paintMap(
  context: CanvasRenderingContext2D,
  picture: MapPicture,
  palette: MapPalette,
  place: MapPlace,
): void {
  const { width, height, pixelRatio } = place;
  context.setTransform(1, 0, 0, 1, 0, 0);
  context.clearRect(0, 0, width, height);
  drawCells(context, picture.colours, picture, place);
  const hatches = [
    { mask: picture.failing, colour: palette.failHatch, rising: true },
    { mask: picture.unknown, colour: palette.unknownHatch, rising: false },
  ];
  for (const { mask, colour, rising } of hatches) {
    if (mask === undefined) continue;
    const layer = new OffscreenCanvas(width, height);
    const layerContext = layer.getContext('2d');
    const hatch = hatchTile(colour, rising, pixelRatio);
    const pattern = hatch && layerContext?.createPattern(hatch, 'repeat');
    if (!layerContext || !pattern) continue;
    drawCells(layerContext, mask, picture, place);
    layerContext.globalCompositeOperation = 'source-in';
    layerContext.fillStyle = pattern;
    layerContext.fillRect(0, 0, width, height);
    context.drawImage(layer, 0, 0);
  }
  context.lineCap = 'round';
  drawLines(context, picture.fineLines, place, palette.contour, 1);
  drawLines(context, picture.limitLines, place, palette.limit, 3);
}

type AnyContext = CanvasRenderingContext2D | OffscreenCanvasRenderingContext2D;

/** A cell has its node in the middle; those at the border show one half. */
function drawCells(
  context: AnyContext,
  cells: OffscreenCanvas,
  { columns, rows }: MapPicture,
  { x0, y0, dx, dy }: MapPlace,
): void {
  context.imageSmoothingEnabled = false;
  const left = x0 - dx / 2;
  const top = y0 + (rows - 0.5) * dy;
  context.drawImage(cells, left, top, columns * dx, -rows * dy);
}

function drawLines(
  context: CanvasRenderingContext2D,
  lines: readonly number[],
  { x0, y0, dx, dy, pixelRatio }: MapPlace,
  colour: string,
  width: number,
): void {
  if (lines.length === 0) return;
  context.beginPath();
  for (let i = 0; i < lines.length; i += 4) {
    context.moveTo(x0 + lines[i] * dx, y0 + lines[i + 1] * dy);
    context.lineTo(x0 + lines[i + 2] * dx, y0 + lines[i + 3] * dy);
  }
  context.strokeStyle = colour;
  context.lineWidth = width * pixelRatio;
  context.stroke();
}

function hatchTile(colour: string, rising: boolean, pixelRatio: number): OffscreenCanvas | undefined {
  const size = Math.round(HATCH * pixelRatio);
  const tile = new OffscreenCanvas(size, size);
  const context = tile.getContext('2d');
  if (context === null) return undefined;
  context.strokeStyle = colour;
  context.lineWidth = 1.1 * pixelRatio;
  context.beginPath();
  // The same line in the neighbouring tiles too: its corners reach over.
  for (const shift of [-size, 0, size]) {
    context.moveTo(shift - size, rising ? 2 * size : -size);
    context.lineTo(shift + 2 * size, rising ? -size : 2 * size);
  }
  context.stroke();
  return tile;
}

function canvasOf(image: ImageData): OffscreenCanvas {
  const canvas = new OffscreenCanvas(Math.max(1, image.width), Math.max(1, image.height));
  canvas.getContext('2d')?.putImageData(image, 0, 0);
  return canvas;
}

function reachOf({ values }: MapGrid, limit: number): number {
  let reach = 0;
  for (const row of values) {
    for (const value of row) if (isKnown(value)) reach = Math.max(reach, Math.abs(value - limit));
  }
  return reach;
}
