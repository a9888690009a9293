import { describe, expect, it } from 'vitest';
import { LoopMeasures } from './loop-measures';
import { loadLoop, type Polynomial, product, response, scan } from './testing/unity-loop';

const measures = new LoopMeasures(24);
const DEGREE = Math.PI / 180;

function of(numerator: Polynomial, denominator: Polynomial): LoopMeasures {
  loadLoop(measures, numerator, denominator);
  return measures;
}

describe('margins of published loops', () => {
  it('a conditionally resonant loop: phase fine, modulus poor, gain unlimited upwards', () => {
    // Åström & Murray, Feedback Systems (printed 70° and 0.27); recomputed 69.77° and 0.27093.
    const loop = of(product([0.38], [1, 0.1, 0.55]), product([1, 0], [1, 1], [1, 0.06, 0.5]));
    const values = loop.values();
    expect(values.stable).toBe(true);
    expect((values.phaseMargin ?? 0) / DEGREE).toBeCloseTo(69.77, 2);
    expect(values.modulusMargin).toBeCloseTo(0.27093, 5);
    expect(values.gainMargin?.up).toBeNull();
    expect(loop.gainFactor()).toBe(1000);
  });

  it('25/(s³ + 10s² + 10s + 10): 3.6 and 29.1105°', () => {
    // Seiler, Packard & Gahinet 2020, IEEE Control Systems Magazine 40(5): 3.6 and 29.1105° from
    // memory; bisection on |L| = 1 recomputes the phase as 29.11037°.
    const loop = of([25], [1, 10, 10, 10]);
    expect(loop.gainMargin().up).toBeCloseTo(3.6, 12);
    expect(loop.gainMargin().upFrequency).toBeCloseTo(Math.sqrt(10), 12);
    expect(loop.phaseMargin().value / DEGREE).toBeCloseTo(29.11037, 5);
    expect(loop.values().gainMargin?.down).toBeNull();
    expect(loop.delayMargin().value).toBeCloseTo(loop.phaseMargin().value / loop.phaseMargin().frequency, 14);
  });

  it('s(s² + s + 1)(s + 2) + K: stable below 14/9', () => {
    // Ogata, Modern Control Engineering.
    expect(of([1], product([1, 0], [1, 1, 1], [1, 2])).gainMargin().up).toBeCloseTo(14 / 9, 12);
  });

  it('s³ + 18s² + 77s + K: stable below 1386', () => {
    // Nise, Control Systems Engineering, example 6.9.
    const { up, upFrequency } = of([100], [1, 18, 77, 0]).gainMargin();
    expect(up * 100).toBeCloseTo(1386, 8);
    expect(upFrequency).toBeCloseTo(Math.sqrt(77), 11);
  });

  it('s(s − 1)(s + 6) + K(s + 1): stable above 7.5 only', () => {
    // Franklin, Powell & Emami-Naeini (from memory).
    const { up, down } = of([10, 10], product([1, 0], [1, -1], [1, 6])).gainMargin();
    expect(down * 10).toBeCloseTo(7.5, 11);
    expect(up).toBe(Infinity);
    expect(measures.gainFactor()).toBeCloseTo(4 / 3, 12);
  });
});

describe('gain margin at the ends of the axis', () => {
  it('finds a static instability downwards, at ω = 0', () => {
    // −K/(s − 1) under negative feedback of −1: s − 1 + K, stable for K > 1.
    const { down, downFrequency, up } = of([4], [1, -1]).gainMargin();
    expect(down).toBeCloseTo(0.25, 15);
    expect(downFrequency).toBe(0);
    expect(up).toBe(Infinity);
  });

  it('finds a pole that leaves through infinity', () => {
    // (s + 1) − 0.4κ(s − 1): leading coefficient 1 − 0.4κ.
    const { up, upFrequency } = of([-0.4, 0.4], [1, 1]).gainMargin();
    expect(up).toBeCloseTo(2.5, 14);
    expect(upFrequency).toBe(Infinity);
  });

  it('counts poles of L on the axis as reached at factor 0, others not at all', () => {
    const resting = of([1], [1, 1, 0]).gainMargin();
    expect([resting.down, resting.downFrequency]).toEqual([0, 0]);
    expect(measures.values().gainMargin).toEqual({ up: null, down: null });
    const swinging = of([1, 0], [1, 0, 9]).gainMargin();
    expect(swinging.down).toBe(0);
    expect(swinging.downFrequency).toBeCloseTo(3, 14);
    of([1], [1, 3, 1]);
    expect(measures.values().gainMargin).toEqual({ up: null, down: null });
  });

  it('finds both sides of a conditionally stable loop', () => {
    // s³ + Ks² + 2Ks + K with K = 2κ: Routh's 2K² > K, so κ > ¼.
    const { down, downFrequency } = of([2, 4, 2], [1, 0, 0, 0]).gainMargin();
    expect(down).toBeCloseTo(0.25, 8);
    expect(downFrequency).toBeCloseTo(1, 8);
  });
});

describe('phase and delay margin', () => {
  it('of an integrator are π/2 and π/(2K)', () => {
    const loop = of([5], [1, 0]);
    expect(loop.phaseMargin().value).toBeCloseTo(Math.PI / 2, 14);
    expect(loop.phaseMargin().frequency).toBeCloseTo(5, 13);
    expect(loop.delayMargin().value).toBeCloseTo(Math.PI / 10, 14);
  });

  it('without a crossover are π and unlimited', () => {
    const loop = of([0.5], [1, 1]);
    expect(loop.phaseMargin().value).toBe(Math.PI);
    expect(loop.delayMargin().value).toBe(Infinity);
    expect(loop.values()).toMatchObject({ phaseMargin: Math.PI, delayMargin: null });
  });

  it('allow no delay where the gain at infinite frequency is above 1', () => {
    const loop = of([3, 1], [1, 2]);
    expect(loop.delayMargin().value).toBe(0);
    expect(loop.delayMargin().frequency).toBe(Infinity);
  });

  it('count a lead for the phase, and the whole lag for the delay', () => {
    // 0.8s²/(s² + 0.2s + 1): |L| = 1 where 0.36ω⁴ − 1.96ω² + 1 = 0.
    const loop = of([0.8, 0, 0], [1, 0.2, 1]);
    const lower = Math.sqrt((1.96 - Math.sqrt(1.96 * 1.96 - 1.44)) / 0.72);
    const upper = Math.sqrt((1.96 + Math.sqrt(1.96 * 1.96 - 1.44)) / 0.72);
    const denominatorAngle = (omega: number) => Math.atan2(0.2 * omega, 1 - omega * omega);
    expect(loop.phaseMargin().value).toBeCloseTo(denominatorAngle(lower), 13);
    expect(loop.phaseMargin().frequency).toBeCloseTo(lower, 13);
    expect(loop.delayMargin().value).toBeCloseTo((2 * Math.PI - denominatorAngle(upper)) / upper, 13);
    expect(loop.delayMargin().frequency).toBeCloseTo(upper, 13);
  });
});

describe('modulus margin', () => {
  it('is 1 at infinite frequency for a loop that never comes nearer', () => {
    const loop = of([2], [1, 1]);
    expect(loop.modulusMargin().value).toBe(1);
    expect(loop.modulusMargin().frequency).toBe(Infinity);
  });

  it('is 0 where L tends to −1', () => {
    expect(of([-1, 0], [1, 1]).modulusMargin().value).toBe(0);
  });

  it.each([1e-2, 1e-4, 1e-6, 1e-8])('sees a resonance of damping ratio %d', (ratio) => {
    // 1 + L = (s² + 2ζs + 1)/(s² + 40ζs + 1) · (s + 2)/(s + 1): least value near ω = 1.
    const closed: [number, number][] = [
      [-ratio, Math.sqrt(1 - ratio * ratio)],
      [-2, 0],
    ];
    const open: [number, number][] = [
      [-20 * ratio, Math.sqrt(1 - 400 * ratio * ratio)],
      [-1, 0],
    ];
    const lists = [closed, open].map((poles) => {
      const all = poles.flatMap(([x, y]): [number, number][] =>
        y > 0
          ? [
              [x, y],
              [x, -y],
            ]
          : [[x, y]],
      );
      return [Float64Array.from(all.map((p) => p[0])), Float64Array.from(all.map((p) => p[1]))];
    });
    measures.load(lists[0][0], lists[0][1], 3, lists[1][0], lists[1][1], 3, 1);
    const margin = measures.confirmedModulusMargin();
    let least = Infinity;
    for (let k = -20000; k <= 20000; k++) {
      measures.loop.evaluate(1 + (k / 1000) * ratio);
      least = Math.min(least, Math.hypot(measures.loop.re, measures.loop.im));
    }
    expect(margin.value).toBeLessThanOrEqual(least * (1 + 1e-12));
    expect(margin.value).toBeGreaterThan(least * (1 - 1e-5));
    expect(margin.corrected).toBe(false);
  });

  it('is corrected by the level test when a lower minimum has been missed', () => {
    const loop = of(product([0.38], [1, 0.1, 0.55]), product([1, 0], [1, 1], [1, 0.06, 0.5]));
    const margin = loop.modulusMargin();
    const { value, frequency } = margin;
    margin.value = 0.9;
    margin.frequency = 3;
    loop.confirmedModulusMargin();
    expect(margin.corrected).toBe(true);
    expect(margin.value).toBeCloseTo(value, 14);
    expect(margin.frequency).toBeCloseTo(frequency, 7);
  });
});

describe('unstable loops', () => {
  it('have no margins', () => {
    expect(of([2000], [1, 18, 77, 0]).values()).toMatchObject({
      stable: false,
      gainMargin: null,
      phaseMargin: null,
      delayMargin: null,
      modulusMargin: null,
    });
  });

  it('are what an exact count says, where there is one', () => {
    const re = Float64Array.of(1e-17, -1);
    const im = new Float64Array(2);
    measures.load(re, im, 2, re, im, 2, 1, true);
    expect(measures.stable).toBe(true);
    measures.load(re, im, 2, re, im, 2, 1);
    expect(measures.stable).toBe(false);
  });
});

describe('random loops against a dense scan', () => {
  let state = 20240607;
  const random = () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 4294967296;
  };
  const factor = (): number[] => {
    const omega = 10 ** (random() * 3 - 1);
    const kind = random();
    if (kind < 0.4) {
      return [1 / omega, 1];
    }
    const ratio = kind < 0.7 ? 0.1 + random() : 10 ** (-1 - random() * 3);
    return [1 / (omega * omega), (2 * ratio) / omega, 1];
  };
  const transferFunction = (): [number[], number[]] => {
    let denominator = product(...Array.from({ length: 1 + Math.floor(random() * 4) }, factor));
    if (random() < 0.4) {
      denominator = product(denominator, [1, 0]);
    }
    if (random() < 0.25) {
      denominator = product(denominator, [1, -(10 ** (random() - 1))]);
    }
    let numerator = [10 ** (random() * 4 - 2)];
    while (random() < 0.5) {
      const next = product(numerator, factor());
      if (next.length >= denominator.length) {
        break;
      }
      numerator = next;
    }
    return [numerator, denominator];
  };

  it('nothing nearer is missed, and every reported crossing is one', { timeout: 60_000 }, () => {
    let tried = 0;
    while (tried < 120) {
      const [numerator, denominator] = transferFunction();
      const loop = of(numerator, denominator);
      if (loop.decayRate < 1e-7) {
        continue;
      }
      tried++;
      const scanned = scan(numerator, denominator, 1e-4, 1e5, 40_000);
      const gain = loop.gainMargin();
      const phase = loop.phaseMargin();
      const delay = loop.delayMargin();
      const modulus = loop.confirmedModulusMargin();
      expect(gain.up).toBeLessThanOrEqual(scanned.up * 1.02);
      expect(gain.down).toBeGreaterThanOrEqual(scanned.down * 0.98);
      expect(phase.value).toBeLessThanOrEqual(scanned.phase + 0.02);
      expect(delay.value).toBeLessThanOrEqual(scanned.delay * 1.05);
      expect(modulus.value).toBeLessThanOrEqual(scanned.modulus * (1 + 1e-9));
      expect(modulus.corrected).toBe(false);

      if (gain.up < 1e6 && gain.upFrequency < Infinity) {
        const [x, y] = response(numerator, denominator, gain.upFrequency);
        expect(Math.hypot(1 + gain.up * x, gain.up * y)).toBeLessThan(1e-6);
      }
      if (gain.down > 1e-6) {
        const [x, y] = response(numerator, denominator, gain.downFrequency);
        expect(Math.hypot(1 + gain.down * x, gain.down * y)).toBeLessThan(1e-6);
      }
      if (!Number.isNaN(phase.frequency)) {
        const [x, y] = response(numerator, denominator, phase.frequency);
        expect(Math.hypot(x, y)).toBeCloseTo(1, 6);
        expect(Math.abs(Math.atan2(-y, -x))).toBeCloseTo(phase.value, 6);
        const [u, v] = response(numerator, denominator, delay.frequency);
        const turn = -delay.value * delay.frequency;
        expect(
          Math.hypot(u * Math.cos(turn) - v * Math.sin(turn) + 1, u * Math.sin(turn) + v * Math.cos(turn)),
        ).toBeLessThan(1e-6);
      }
      if (modulus.frequency < Infinity) {
        const [x, y] = response(numerator, denominator, modulus.frequency);
        expect(Math.hypot(1 + x, y) / modulus.value).toBeCloseTo(1, 6);
      }

      // Peak sensitivity bounds: Ms/(Ms − 1) and 2 asin(1/(2Ms)), with 1/Ms the modulus margin.
      const least = modulus.value;
      expect(gain.up).toBeGreaterThanOrEqual((1 / (1 - Math.min(least, 1))) * (1 - 1e-9));
      expect(phase.value).toBeGreaterThanOrEqual(2 * Math.asin(Math.min(1, least / 2)) - 1e-9);
    }
  });

  it('gives the same digits when the same loop is loaded again', () => {
    const other = new LoopMeasures(24);
    for (let k = 0; k < 20; k++) {
      const [numerator, denominator] = transferFunction();
      const first = of(numerator, denominator).values();
      of([1], [1, 1]).values();
      expect(of(numerator, denominator).values()).toEqual(first);
      loadLoop(other, numerator, denominator);
      expect(other.values()).toEqual(first);
    }
  });
});
