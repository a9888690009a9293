const STOP = 0;
const SHARE = 1;
const FIELDS = 2;
/** Shares are kept as whole parts of this. */
const PARTS = 10_000;

/**
 * What both sides of a computation see at once, without messages: a thread deep in a computation reads none.
 */
export class RunControl {
  private readonly fields: Int32Array;

  /** @param buffer of the other side; left out: a new one */
  constructor(readonly buffer = new SharedArrayBuffer(FIELDS * Int32Array.BYTES_PER_ELEMENT)) {
    this.fields = new Int32Array(buffer);
  }

  askToStop(): void {
    Atomics.store(this.fields, STOP, 1);
  }

  get isAskedToStop(): boolean {
    return Atomics.load(this.fields, STOP) === 1;
  }

  /** Share of the work that is done, 0 to 1; an estimate where nobody knows the whole. */
  get share(): number {
    return Atomics.load(this.fields, SHARE) / PARTS;
  }

  set share(share: number) {
    Atomics.store(this.fields, SHARE, Math.floor(Math.min(1, Math.max(0, share)) * PARTS));
  }
}
