import type { Drawing, DrawingItem, Point } from '../../../../shared/machines';
import { arcPath, arrowHead, damperPath, groundPath, pathThrough, springPath } from './strokes';
import { symbolParts, type SymbolParts } from './symbol-parts';

export interface Stroke {
  readonly path: string;
  readonly style: 'line' | 'strong' | 'thin' | 'body' | 'payload' | 'head';
}

export interface DrawnSymbol extends SymbolParts {
  readonly at: Point;
  readonly quiet: boolean;
}

export interface DrawnParts {
  readonly strokes: readonly Stroke[];
  readonly symbols: readonly DrawnSymbol[];
}

/** The strokes and symbols of a drawing, in the order in which they cover each other. */
export function drawnParts({ items }: Drawing): DrawnParts {
  return {
    strokes: items.flatMap(strokesOf),
    symbols: items.flatMap((item) => {
      if (!('symbol' in item) || item.symbol === undefined) return [];
      const at = item.kind === 'block' ? middle(item) : item.at;
      if (at === undefined) return [];
      return [{ ...symbolParts(item.symbol), at, quiet: item.kind === 'motion' || item.kind === 'distance' }];
    }),
  };
}

function middle({ corner, size }: Extract<DrawingItem, { kind: 'block' }>): Point {
  return [corner[0] + size[0] / 2, corner[1] + size[1] / 2];
}

function strokesOf(item: DrawingItem): Stroke[] {
  switch (item.kind) {
    case 'block': {
      const [x, y] = item.corner;
      const [width, height] = item.size;
      const path = `M${x} ${y}h${width}v${height}h${-width}z`;
      return [{ path, style: item.payload === true ? 'payload' : 'body' }];
    }
    case 'wheel': {
      const [x, y] = item.centre;
      const circle = (radius: number) =>
        `M${x - radius} ${y}a${radius} ${radius} 0 1 0 ${2 * radius} 0a${radius} ${radius} 0 1 0 ${-2 * radius} 0z`;
      return [
        { path: circle(item.radius), style: 'body' },
        { path: circle(2.5), style: 'head' },
      ];
    }
    case 'spring':
      return [{ path: springPath(item.from, item.to), style: 'line' }];
    case 'damper':
      return [{ path: damperPath(item.from, item.to), style: 'line' }];
    case 'ground':
      return [{ path: groundPath(item.from, item.to), style: 'line' }];
    case 'line':
      return [{ path: pathThrough(item.points), style: item.thin === true ? 'thin' : 'line' }];
    case 'force':
      return [
        { path: pathThrough([item.from, item.to]), style: 'strong' },
        { path: arrowHead(item.from, item.to, 7), style: 'strong' },
      ];
    case 'motion':
      return [
        { path: pathThrough([item.from, item.to]), style: 'thin' },
        { path: arrowHead(item.from, item.to, 6), style: 'thin' },
        { path: tick(item.from, item.to), style: 'thin' },
      ];
    case 'turn': {
      const style = item.strong === true ? 'strong' : 'thin';
      return [
        { path: arcPath(item.from, item.over, item.to), style },
        { path: arrowHead(item.over, item.to, 6), style },
      ];
    }
    case 'distance':
      return [
        { path: pathThrough([item.from, item.to]), style: 'thin' },
        { path: arrowHead(item.from, item.to, 5), style: 'thin' },
        { path: arrowHead(item.to, item.from, 5), style: 'thin' },
      ];
    case 'centre': {
      const [x, y] = item.at;
      return [{ path: `M${x - 4} ${y}a4 4 0 1 0 8 0a4 4 0 1 0 -8 0z`, style: 'head' }];
    }
    case 'text':
      return [];
  }
}

/** The short stroke across the start of a coordinate's arrow. */
function tick(from: Point, to: Point): string {
  const sideways = Math.abs(to[1] - from[1]) > Math.abs(to[0] - from[0]);
  return sideways
    ? pathThrough([
        [from[0] - 5, from[1]],
        [from[0] + 5, from[1]],
      ])
    : pathThrough([
        [from[0], from[1] - 5],
        [from[0], from[1] + 5],
      ]);
}
