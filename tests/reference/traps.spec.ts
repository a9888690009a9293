import { describe, expect, it } from 'vitest';
import { companionMachine } from './support/companion-machine';
import { runStudy, type StudyDraft } from './support/run-study';
import { expectLargest, expectSmallest } from './support/two-sided';

/** m q″ + c q′ + q with a damping that is an expression in m. */
const damped = (damping: string, payload: object): StudyDraft => ({
  machine: { coordinates: ['q'], mass: [['m']], damping: [[damping]], stiffness: [[1]] },
  parameters: [{ id: 'm', minimum: 0, ...payload }],
  payload: 'm',
});

describe('a narrow pocket of failing payloads', () => {
  // Derived: unstable exactly where the damping is negative, within 0.1 kg of the centre.
  it.each([63.7, 101.25, 118.048, 187.3])('of ±0.1 kg around %d kg is found', (centre) => {
    const study = damped(`0.5*((m - ${centre})^2 - 0.01)`, { nominal: 60, low: 60, high: 200 });
    const { largestPayload, bands } = runStudy({ ...study, searchUpTo: 400 });
    expectLargest(largestPayload, centre - 0.1, 60);
    expect(largestPayload?.failsAt).toBeLessThan(centre + 0.1);
    expect(bands).toMatchObject({ verdict: 'fails', requirement: 'stability' });
    expect(Math.abs((bands.witness?.m ?? NaN) - centre)).toBeLessThan(0.1);
  });

  it('is found below the nominal payload too', () => {
    const study = damped('0.5*((m - 81.3)^2 - 0.01)', { nominal: 200, low: 150, high: 250 });
    const { smallestPayload, largestPayload, bands } = runStudy({
      ...study,
      searchUpTo: 400,
      searchDownTo: 50,
    });
    expectSmallest(smallestPayload, 81.4, 200);
    expect(smallestPayload?.failsAt).toBeGreaterThan(81.2);
    expect(largestPayload).toMatchObject({ provedTo: 400, failsAt: null });
    expect(bands).toEqual({ verdict: 'holds', proof: 'proved' });
  });
});

describe('a pocket so narrow that rounding could hide it', () => {
  // Derived: unstable within 1e−6 kg of the centre. A fixed guard against rounding "proves" the whole range.
  const centres = Array.from({ length: 40 }, (_, i) => 61.048 + (137.9 / 39) * i);

  it.each(centres)('is never proved across, around %d kg', (centre) => {
    const study = damped(`0.5*((m - ${centre})^2 - 1e-12)`, { nominal: 60, low: 60, high: 200 });
    const { largestPayload, bands } = runStudy({ ...study, searchUpTo: 200, searchDownTo: 60 });
    expect(largestPayload?.provedTo).toBeLessThanOrEqual(centre - 1e-6);
    expect(largestPayload?.provedTo).toBeGreaterThan(60);
    expect(bands.verdict).not.toBe('holds');
    const failing = largestPayload?.failsAt ?? null;
    if (failing !== null) expect(Math.abs(failing - centre)).toBeLessThan(1e-6);
    else expect(largestPayload).toMatchObject({ undecided: true });
  });

  it('is proved past where it is only nearly one', () => {
    // Derived: the damping is at least 5e−7 at every payload.
    const study = damped('0.5*((m - 118.048)^2 + 1e-6)', { nominal: 60, low: 60, high: 200 });
    const { largestPayload, bands } = runStudy({ ...study, searchUpTo: 200 });
    expect(largestPayload).toMatchObject({ provedTo: 200, failsAt: null });
    expect(bands).toEqual({ verdict: 'holds', proof: 'proved' });
  });
});

describe('an integral gain of 1e−14', () => {
  const run = (ki: number) =>
    runStudy({
      machine: { template: 'mass-spring-damper' },
      parameters: [
        { id: 'm', nominal: 5, low: 1, high: 10, minimum: 0 },
        { id: 'm0', nominal: 1 },
        { id: 'k', nominal: 100, low: 80, high: 120 },
        { id: 'c', nominal: 2 },
      ],
      control: { law: 'pid', input: 'u', output: 'q', kp: 400, ki, kd: 40, derivativeTime: 0 },
      payload: 'm',
      searchUpTo: 50,
    });

  it('is stable, and proved so', () => {
    // Derived: m s³ + 42 s² + 500 s + Ki has all roots in the left half plane for 0 < Ki < 42·500/m (Routh).
    const { nominal, bands, largestPayload } = run(1e-14);
    expect(nominal.stable).toBe(true);
    expect(nominal.decayRate).toBeGreaterThanOrEqual(0);
    expect(bands).toEqual({ verdict: 'holds', proof: 'proved' });
    expect(largestPayload).toMatchObject({ provedTo: 50, failsAt: null });
  });

  it('with the other sign is unstable', () => {
    // Derived: the constant coefficient is negative.
    const { nominal, bands, largestPayload, bandStretch } = run(-1e-14);
    expect(nominal).toMatchObject({ stable: false, phaseMargin: null });
    expect(nominal.decayRate).toBeLessThanOrEqual(0);
    expect(bands).toMatchObject({ verdict: 'fails', requirement: 'stability' });
    expect(largestPayload).toMatchObject({ provedTo: null, failsAt: 5 });
    expect(bandStretch).toMatchObject({ provedTo: null, failsAt: 0 });
  });
});

describe('an island of radius 0', () => {
  it('leaves the payload undecided from the point it touches on', () => {
    // Derived: stable everywhere but at 120 kg, where the poles lie on the axis.
    const study = damped('0.5*(m - 120)^2', { nominal: 60, low: 50, high: 200 });
    const { largestPayload, bands, smallestPayload } = runStudy({ ...study, searchUpTo: 400 });
    expect(largestPayload).toMatchObject({ failsAt: null, undecided: true, proof: 'proved' });
    expect(largestPayload?.provedTo).toBeGreaterThan(119.99);
    expect(largestPayload?.provedTo).toBeLessThanOrEqual(120);
    expect(largestPayload?.openShare).toBeGreaterThan(0);
    expect(bands).toMatchObject({ verdict: 'undecided', proof: 'proved' });
    expect(smallestPayload).toMatchObject({ failsAt: null });
  });
});

describe('a mass matrix that is singular in the wider range only', () => {
  const machine = {
    coordinates: ['q1', 'q2'],
    mass: [
      [2, 'm'],
      ['m', 8],
    ],
    damping: [
      [1, 0],
      [0, 1],
    ],
    stiffness: [
      [3, -1],
      [-1, 2],
    ],
  };
  // Derived: det M = 16 − m², and below it M, damping and stiffness are positive definite.
  const { largestPayload, bandStretch, bands } = runStudy({
    machine,
    parameters: [{ id: 'm', nominal: 1, low: 0.5, high: 2 }],
    payload: 'm',
    searchUpTo: 20,
  });

  it('limits the payload by a pole that leaves through infinity', () => {
    expectLargest(largestPayload, 4, 1);
    expect(largestPayload).toMatchObject({
      requirement: 'stability',
      frequency: null,
      reason: 'a pole leaves through infinity',
    });
  });

  it('limits the band stretch in the same way, and the bands hold', () => {
    expectLargest(bandStretch, 3);
    expect(bandStretch).toMatchObject({
      requirement: 'stability',
      frequency: null,
      reason: 'a pole leaves through infinity',
    });
    expect(bands).toEqual({ verdict: 'holds', proof: 'proved' });
  });

  it('counts as stability under a stricter requirement too', () => {
    // Derived: the fast pole that goes to −∞ meets any decay rate; the slow ones keep well above 0.01 1/s.
    const stricter = runStudy({
      machine,
      parameters: [{ id: 'm', nominal: 1, low: 0.5, high: 2 }],
      payload: 'm',
      searchUpTo: 20,
      requirements: [{ measure: 'decayRate', atLeast: 0.01 }],
    });
    expectLargest(stricter.largestPayload, 4, 1);
    expect(stricter.largestPayload).toMatchObject({ requirement: 'stability', frequency: null });
  });
});

describe('failing where the searches start', () => {
  const machine = companionMachine([1, 'a2', 'a1', 'K']);
  const exact = [
    { id: 'a2', nominal: 2 },
    { id: 'a1', nominal: 3 },
  ];

  it('at the nominal point leaves nothing proved', () => {
    // Derived: stable if and only if 0 < K < a1·a2 = 6.
    const result = runStudy({
      machine,
      parameters: [...exact, { id: 'K', nominal: 7, low: 5, high: 8 }],
      payload: 'K',
    });
    expect(result.nominal).toMatchObject({ stable: false, gainMargin: null, modulusMargin: null });
    expect(result.largestPayload).toMatchObject({ provedTo: null, failsAt: 7, requirement: 'stability' });
    expect(result.smallestPayload).toMatchObject({ provedTo: null, failsAt: 7 });
    expect(result.bandStretch).toMatchObject({ provedTo: null, failsAt: 0, witness: { K: 7 } });
    expect(result.bands).toMatchObject({ verdict: 'fails', witness: { K: 8 } });
  });

  it('with a requirement below its limit at the nominal point leaves nothing proved', () => {
    const result = runStudy({
      machine,
      parameters: [...exact, { id: 'K', nominal: 3, low: 2, high: 4 }],
      payload: 'K',
      requirements: [{ measure: 'decayRate', atLeast: 5 }],
    });
    expect(result.nominal.stable).toBe(true);
    expect(result.largestPayload).toMatchObject({ provedTo: null, failsAt: 3, requirement: 'decayRate' });
    expect(result.bandStretch).toMatchObject({ provedTo: null, failsAt: 0, requirement: 'decayRate' });
  });

  it('in a corner of the other bands leaves no payload proved, though the bands can shrink', () => {
    // Derived: at a1 = 1.5, a2 = 1 the limit is K = 1.5, below the nominal 2; the stretch k has
    // (2 − k)(3 − 1.5k) = 2 + 0.5k.
    const result = runStudy({
      machine,
      parameters: [
        { id: 'a2', nominal: 2, low: 1, high: 3 },
        { id: 'a1', nominal: 3, low: 1.5, high: 4.5 },
        { id: 'K', nominal: 2, low: 1.5, high: 2.5 },
      ],
      payload: 'K',
    });
    expect(result.nominal.stable).toBe(true);
    expect(result.largestPayload).toMatchObject({ provedTo: null, failsAt: 2, requirement: 'stability' });
    expect(result.smallestPayload).toMatchObject({ provedTo: null, failsAt: 2 });
    expectLargest(result.bandStretch, (6.5 - Math.sqrt(6.5 * 6.5 - 4 * 1.5 * 4)) / 3);
    expect(result.bands.verdict).toBe('fails');
  });

  it('only in the midst of the other bands is found as well', () => {
    // Derived: with a2 = 1.5 (q − 1)² + 1/2 the limit a1·a2 is least inside the band of q, 1.5 < K there.
    const result = runStudy({
      machine: companionMachine([1, '1.5*(q - 1)^2 + 0.5', 3, 'K']),
      parameters: [
        { id: 'q', nominal: 0, low: -0.5, high: 2.5 },
        { id: 'K', nominal: 2, low: 1.9, high: 2.1 },
      ],
      payload: 'K',
    });
    expect(result.nominal.stable).toBe(true);
    expect(result.largestPayload).toMatchObject({ provedTo: null, failsAt: 2 });
    expect(result.bands.verdict).toBe('fails');
  });
});
