import type { Point } from '../../../../shared/machines';

/** Unit vector from one point to the other, and the distance; along x where both are the same point. */
function direction([x1, y1]: Point, [x2, y2]: Point): { along: Point; across: Point; length: number } {
  const length = Math.hypot(x2 - x1, y2 - y1);
  const along: Point = length === 0 ? [1, 0] : [(x2 - x1) / length, (y2 - y1) / length];
  return { along, across: [-along[1], along[0]], length };
}

/** Places points given as (along, across) from `from` towards `to`. */
function placed(from: Point, to: Point, points: readonly Point[]): Point[] {
  const { along, across } = direction(from, to);
  return points.map(([s, t]) => [
    from[0] + s * along[0] + t * across[0],
    from[1] + s * along[1] + t * across[1],
  ]);
}

export function pathThrough(points: readonly Point[]): string {
  return points.map(([x, y], index) => `${index === 0 ? 'M' : 'L'}${round(x)} ${round(y)}`).join('');
}

/** A zigzag of three teeth between two straight ends. */
export function springPath(from: Point, to: Point): string {
  const { length } = direction(from, to);
  const end = Math.min(12, length / 5);
  const tooth = (length - 2 * end) / 12;
  const teeth = [1, 3, 5, 7, 9, 11].map((step, index): Point => [
    end + step * tooth,
    index % 2 === 0 ? -7 : 7,
  ]);
  return pathThrough(placed(from, to, [[0, 0], [end, 0], ...teeth, [length - end, 0], [length, 0]]));
}

/** A cup with a plate in it. */
export function damperPath(from: Point, to: Point): string {
  const { length } = direction(from, to);
  const [start, plate, end] = [length * 0.38, length * 0.5, length * 0.62];
  const half = Math.min(8, length / 3);
  const parts: Point[][] = [
    [
      [0, 0],
      [plate, 0],
    ],
    [
      [plate, -half * 0.65],
      [plate, half * 0.65],
    ],
    [
      [start, -half],
      [end, -half],
      [end, half],
      [start, half],
    ],
    [
      [end, 0],
      [length, 0],
    ],
  ];
  return parts.map((part) => pathThrough(placed(from, to, part))).join('');
}

/** The line of the ground and short strokes behind it. */
export function groundPath(from: Point, to: Point): string {
  const { length } = direction(from, to);
  const strokes = Array.from({ length: Math.floor(length / 8) + 1 }, (_, index) => index * 8);
  return [
    pathThrough([from, to]),
    ...strokes.map((s) =>
      pathThrough(
        placed(from, to, [
          [s, 0],
          [s - 6, 6],
        ]),
      ),
    ),
  ].join('');
}

/** The two strokes or, filled, the triangle of an arrow that ends in `to`. */
export function arrowHead(from: Point, to: Point, size: number): string {
  const { length } = direction(from, to);
  return pathThrough(
    placed(from, to, [
      [length - size, -size * 0.62],
      [length, 0],
      [length - size, size * 0.62],
    ]),
  );
}

/** A smooth arc through three points. */
export function arcPath(from: Point, over: Point, to: Point): string {
  const control: Point = [2 * over[0] - (from[0] + to[0]) / 2, 2 * over[1] - (from[1] + to[1]) / 2];
  return `M${from[0]} ${from[1]}Q${round(control[0])} ${round(control[1])} ${to[0]} ${to[1]}`;
}

function round(value: number): number {
  return Math.round(value * 100) / 100;
}
