/** A small seeded generator (mulberry32: 32 bits of state, an additive step and two multiplications to mix). */
export class SeededRandom {
  private state: number;

  constructor(seed: number) {
    // Neighbouring seeds would otherwise start with similar numbers.
    this.state = Math.imul(seed ^ 0x9e3779b9, 0x85ebca6b) | 0;
    for (let i = 0; i < 3; i++) this.next();
  }

  /** Uniform in [0, 1). */
  next(): number {
    this.state = (this.state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(this.state ^ (this.state >>> 15), this.state | 1);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  }

  between(low: number, high: number): number {
    return low + this.next() * (high - low);
  }

  /** 10 to a power between the two. */
  decade(low: number, high: number): number {
    return 10 ** this.between(low, high);
  }

  chance(share: number): boolean {
    return this.next() < share;
  }

  sign(): number {
    return this.chance(0.5) ? 1 : -1;
  }

  /** An integer from low to high, both included. */
  integer(low: number, high: number): number {
    return low + Math.floor(this.next() * (high - low + 1));
  }

  pick<T>(choices: readonly T[]): T {
    return choices[this.integer(0, choices.length - 1)];
  }
}
