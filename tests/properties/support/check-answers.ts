import type { Result, UpwardAnswer, Witness } from '../../../shared/contracts';
import { stretchedBands } from './claimed-boxes';
import { type DirectPoint, directPoint, lawOf, noise, requirementsOf, slack } from './direct-requirements';
import { nominalValues, type StudyModel } from './study-model';

/** Gap allowed between what is proved and what fails. */
const GAP = 0.002 * (1 + 1e-9);

/** What is wrong with the answers of a result, seen from direct computation; one line for each fault. */
export function checkAnswers(model: StudyModel, result: Result): string[] {
  return new AnswerCheck(model, result).run();
}

class AnswerCheck {
  private readonly faults: string[] = [];
  private readonly nominal: DirectPoint | undefined;
  private readonly rate: number;

  constructor(
    private readonly model: StudyModel,
    private readonly result: Result,
  ) {
    this.nominal = directPoint(model, nominalValues(model));
    this.rate = Math.max(Math.abs(this.nominal?.decayRate ?? 1), 1e-9 * (this.nominal?.scale ?? 1));
  }

  run(): string[] {
    const { result } = this;
    this.checkNumbers();
    this.checkPayload('largestPayload', 1);
    this.checkPayload('smallestPayload', -1);
    this.checkStretch();
    this.checkVerdict();
    this.checkNominal();
    if (result.bands.proof !== 'proved') this.fault('bands', 'rational entries were only sampled');
    return this.faults;
  }

  private fault(answer: string, message: string): void {
    this.faults.push(`${answer}: ${message}`);
  }

  private checkNumbers(): void {
    const walk = (value: unknown, path: string): void => {
      if (typeof value === 'number' && !Number.isFinite(value)) this.fault(path, `is ${value}`);
      else if (typeof value === 'object' && value !== null) {
        for (const [key, inner] of Object.entries(value)) walk(inner, `${path}.${key}`);
      }
    };
    walk(this.result, 'result');
  }

  private checkPayload(key: 'largestPayload' | 'smallestPayload', sign: number): void {
    const { model, result } = this;
    const answer = result[key];
    if (answer === null || model.payload === undefined) return;
    const payload = model.parameters[model.payload];
    const end = 'searchedUpTo' in answer ? answer.searchedUpTo : answer.searchedDownTo;
    this.checkSides(
      key,
      answer,
      end,
      (a, b) => GAP * Math.max(Math.abs(a), Math.abs(b), Math.abs(payload.nominal)),
      sign,
    );
    if (answer.provedTo !== null && sign * (answer.provedTo - payload.nominal) < 0) {
      this.fault(key, `proved to ${answer.provedTo} on the wrong side of ${payload.nominal}`);
    }
    if (answer.witness === undefined || answer.failsAt === null) return;
    this.checkWitness(key, answer);
    const low = model.parameters.map((p) => p.low);
    const high = model.parameters.map((p) => p.high);
    low[model.payload] = high[model.payload] = answer.failsAt;
    this.checkInside(key, answer.witness, low, high);
  }

  private checkStretch(): void {
    const { bandStretch } = this.result;
    if (bandStretch === null) return;
    this.checkSides('bandStretch', bandStretch, bandStretch.searchedUpTo, (a, b) => GAP * Math.max(a, b), 1);
    if (bandStretch.witness === undefined || bandStretch.failsAt === null) return;
    this.checkWitness('bandStretch', bandStretch);
    const { low, high } = stretchedBands(this.model, bandStretch.failsAt);
    this.checkInside('bandStretch', bandStretch.witness, low, high);
  }

  private checkSides(
    key: string,
    {
      provedTo,
      failsAt,
      undecided,
      witness,
    }: Pick<UpwardAnswer, 'provedTo' | 'failsAt' | 'undecided' | 'witness'>,
    end: number,
    gap: (a: number, b: number) => number,
    sign: number,
  ): void {
    if (undecided) return;
    if (failsAt === null) {
      if (provedTo !== end) this.fault(key, `nothing fails, but proved to ${provedTo} of ${end}`);
      return;
    }
    if (witness === undefined) this.fault(key, 'fails without a witness');
    if (provedTo === null) return;
    if (!(sign * (failsAt - provedTo) > 0)) this.fault(key, `proved to ${provedTo}, fails at ${failsAt}`);
    if (Math.abs(failsAt - provedTo) > gap(failsAt, provedTo)) {
      this.fault(key, `gap between ${provedTo} and ${failsAt}`);
    }
  }

  private values(witness: Witness): Float64Array {
    return Float64Array.from(this.model.parameters, ({ id, nominal }) => witness[id] ?? nominal);
  }

  private checkInside(key: string, witness: Witness, low: ArrayLike<number>, high: ArrayLike<number>): void {
    const values = this.values(witness);
    this.model.parameters.forEach(({ id, nominal }, i) => {
      const room = 1e-12 * Math.max(Math.abs(nominal), Math.abs(values[i]));
      if (values[i] < low[i] - room || values[i] > high[i] + room) {
        this.fault(key, `witness ${id} = ${values[i]} outside [${low[i]}, ${high[i]}]`);
      }
    });
  }

  private checkWitness(
    key: string,
    answer: Pick<UpwardAnswer, 'requirement' | 'witness' | 'frequency' | 'reason'>,
  ): void {
    const { model, rate } = this;
    const point = directPoint(model, this.values(answer.witness ?? {}));
    const requirement = requirementsOf(model).filter(({ measure }) => measure === answer.requirement);
    if (requirement.length === 0) {
      this.fault(key, `names ${answer.requirement}, which is not required`);
      return;
    }
    const kept = slack(model, requirement[0], point, rate);
    if (!(kept <= noise(requirement[0], point, rate))) {
      this.fault(key, `the witness keeps ${answer.requirement} by ${kept}`);
    }
    if (answer.reason !== undefined) {
      if (answer.frequency !== null) this.fault(key, 'a pole at infinity has a frequency');
    } else if (typeof answer.frequency === 'number' && point !== undefined) {
      this.checkFrequency(
        key,
        answer.requirement ?? '',
        answer.frequency,
        point,
        lawOf(model, requirement[0]),
      );
    }
  }

  private checkFrequency(
    key: string,
    measure: string,
    frequency: number,
    point: DirectPoint,
    law: number,
  ): void {
    const { re, im } = point.closed;
    // With a pole at the origin rounding decides which pole looks worst.
    if (re.some((x, i) => Math.hypot(x, im[i]) < 1e-12 * point.scale)) return;
    const near = (value: number): boolean =>
      Math.abs(value - frequency) <= 1e-3 * Math.abs(frequency) + 1e-5 * point.scale;
    const scanner = point.scanner(law);
    let plausible: boolean;
    if (measure === 'dampingRatio') {
      plausible = re.some((x, i) => {
        const size = Math.hypot(x, im[i]);
        const ratio = size < 1e-12 * point.scale ? 0 : -x / size;
        return near(size) && ratio < point.dampingRatio + 1e-3;
      });
    } else if (measure === 'stability' || measure === 'decayRate' || scanner === undefined) {
      plausible = re.some((x, i) => near(Math.abs(im[i])) && -x < point.decayRate + 1e-3 * point.scale);
    } else {
      const [x, y] = scanner.returnDifference(frequency);
      const level = this.model.requirements.find((requirement) => requirement.measure === measure);
      const limit = level !== undefined && 'atLeast' in level ? level.atLeast : 0;
      if (measure === 'phaseMargin') plausible = Math.abs(Math.hypot(x - 1, y) - 1) < 1e-3;
      else if (measure === 'gainMargin') plausible = Math.abs(y) < 1e-3 * (1 + Math.abs(x));
      else plausible = Math.hypot(x, y) < limit * (1 + 1e-3);
    }
    if (!plausible) this.fault(key, `${measure} is not lost at ${frequency} rad/s`);
  }

  private checkVerdict(): void {
    const { bands, bandStretch } = this.result;
    const { model } = this;
    if (bands.verdict === 'fails') {
      if (bands.witness === undefined) this.fault('bands', 'fails without a witness');
      else {
        this.checkWitness('bands', bands);
        this.checkInside(
          'bands',
          bands.witness,
          model.parameters.map((p) => p.low),
          model.parameters.map((p) => p.high),
        );
      }
    }
    if (bandStretch === null) return;
    const { provedTo, failsAt } = bandStretch;
    if (bands.verdict === 'holds' && failsAt !== null && failsAt < 1)
      this.fault('bands', 'holds, but the stretch fails below 1');
    if (bands.verdict === 'fails' && provedTo !== null && provedTo >= 1)
      this.fault('bands', 'fails, but is stretched to 1');
    if (bands.verdict === 'undecided' && ((failsAt ?? 2) <= 1 || (provedTo ?? 0) >= 1)) {
      this.fault('bands', 'undecided, but the stretch decides');
    }
  }

  private checkNominal(): void {
    const { nominal: direct, result } = this;
    const { nominal } = result;
    if (direct === undefined) return;
    const left = direct.closed.re.map((re, i) => ({ re, im: direct.closed.im[i] }));
    if (left.length !== nominal.poles.length)
      this.fault('nominal', `${nominal.poles.length} poles, not ${left.length}`);
    for (const pole of nominal.poles) {
      const distances = left.map(({ re, im }) => Math.hypot(re - pole.re, im - pole.im));
      const nearest = Math.min(...distances);
      if (!(nearest < 1e-6 * direct.scale))
        this.fault('nominal', `pole ${pole.re}, ${pole.im} is off by ${nearest}`);
      left.splice(distances.indexOf(nearest), 1);
    }
    const agree = (name: string, theirs: number | null, own: number, tolerance = 1e-5): void => {
      const value = theirs ?? Infinity;
      if (value === own || Math.abs(value - own) <= tolerance * Math.max(1e-3, Math.abs(own))) return;
      this.fault('nominal', `${name} ${theirs}, not ${own}`);
    };
    agree('decay rate', nominal.decayRate, direct.decayRate, 1e-5 + (1e-7 * direct.scale) / this.rate);
    if (direct.dampingRatio !== 0) agree('damping ratio', nominal.dampingRatio, direct.dampingRatio);
    const margins = direct.margins(0);
    if (this.model.laws.length === 0 || margins === undefined) return;
    agree('phase margin', nominal.phaseMargin, margins.phase);
    agree('modulus margin', nominal.modulusMargin, margins.modulus);
    agree('delay margin', nominal.delayMargin, margins.delay);
    const { up, down } = nominal.gainMargin ?? { up: null, down: null };
    if (!((up ?? 1e6) > 1e5 && margins.gainUp > 1e5)) agree('gain margin up', up, margins.gainUp);
    agree('gain margin down', down ?? 0, margins.gainDown);
  }
}
