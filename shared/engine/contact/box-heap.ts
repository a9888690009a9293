/** An open box of a search. Fractions are of the root box, exact dyadic numbers; the last dimension is t. */
export interface OpenBox {
  readonly data: Float64Array;
  readonly low: Float64Array;
  readonly high: Float64Array;
  objective: number;
  /** Larger is newer: among equal objectives the newest box goes first, so that few stay open. */
  order: number;
  /** Whether the parameter box has not been looked at yet: a split along t leaves its centre where it was. */
  fresh: boolean;
}

/** A binary heap: smallest objective first, then the newest. */
export class BoxHeap {
  private readonly boxes: OpenBox[] = [];

  get size(): number {
    return this.boxes.length;
  }

  /** The open boxes, in no particular order. */
  get open(): readonly OpenBox[] {
    return this.boxes;
  }

  push(box: OpenBox): void {
    const { boxes } = this;
    let at = boxes.length;
    boxes.push(box);
    while (at > 0) {
      const parent = (at - 1) >> 1;
      if (!precedes(box, boxes[parent])) break;
      boxes[at] = boxes[parent];
      at = parent;
    }
    boxes[at] = box;
  }

  pop(): OpenBox | undefined {
    const { boxes } = this;
    const first = boxes[0];
    const last = boxes.pop();
    if (last === undefined || boxes.length === 0) return last;
    let at = 0;
    for (;;) {
      let child = 2 * at + 1;
      if (child >= boxes.length) break;
      if (child + 1 < boxes.length && precedes(boxes[child + 1], boxes[child])) child++;
      if (!precedes(boxes[child], last)) break;
      boxes[at] = boxes[child];
      at = child;
    }
    boxes[at] = last;
    return first;
  }
}

function precedes(a: OpenBox, b: OpenBox): boolean {
  return a.objective < b.objective || (a.objective === b.objective && a.order > b.order);
}
