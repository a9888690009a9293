/** A point of a drawing: x to the right, y downwards, in drawing units (1 unit is about one pixel of a 240 wide picture). */
export type Point = readonly [x: number, y: number];

/**
 * One part of a machine's picture. `symbol` is the symbol of a parameter, coordinate or input; `at` is the middle of its
 * text where the usual place would not do.
 */
export type DrawingItem =
  /** A rigid part; the payload is drawn as one that is put on. */
  | {
      readonly kind: 'block';
      readonly corner: Point;
      readonly size: Point;
      readonly symbol: string;
      readonly payload?: true;
    }
  | {
      readonly kind: 'spring' | 'damper';
      readonly from: Point;
      readonly to: Point;
      readonly symbol: string;
      readonly at: Point;
    }
  | {
      readonly kind: 'wheel';
      readonly centre: Point;
      readonly radius: number;
      readonly symbol?: string;
      readonly at?: Point;
    }
  /** Hatched on the right-hand side when going from `from` to `to`. */
  | { readonly kind: 'ground'; readonly from: Point; readonly to: Point }
  | { readonly kind: 'line'; readonly points: readonly Point[]; readonly thin?: true }
  /** A force or other input. */
  | {
      readonly kind: 'force';
      readonly from: Point;
      readonly to: Point;
      readonly symbol: string;
      readonly at: Point;
    }
  /** The positive direction of a coordinate. */
  | {
      readonly kind: 'motion';
      readonly from: Point;
      readonly to: Point;
      readonly symbol: string;
      readonly at: Point;
    }
  /** A turning coordinate or a torque: an arc through three points with an arrow at its end. */
  | {
      readonly kind: 'turn';
      readonly from: Point;
      readonly over: Point;
      readonly to: Point;
      readonly symbol: string;
      readonly at: Point;
      readonly strong?: true;
    }
  /** A distance between two marks. */
  | {
      readonly kind: 'distance';
      readonly from: Point;
      readonly to: Point;
      readonly symbol: string;
      readonly at: Point;
    }
  /** A centre of mass. */
  | { readonly kind: 'centre'; readonly at: Point }
  | { readonly kind: 'text'; readonly symbol: string; readonly at: Point };

/** The picture of a machine with its symbols, as data: what draws it decides on strokes and colours. */
export interface Drawing {
  readonly width: number;
  readonly height: number;
  /** What the picture shows, for people who do not see it. */
  readonly description: string;
  readonly items: readonly DrawingItem[];
}
