import type { Result } from '../../../shared/contracts';
import type { StudyModel } from './study-model';

const ANSWERS = ['largestPayload', 'smallestPayload', 'bandStretch'] as const;

/** What a series of machines was made of and how its answers came out. */
export class AttackStatistics {
  readonly machines: { boxes: number; milliseconds: number }[] = [];
  readonly orders = new Set<number>();
  readonly tolerances = new Set<number>();
  readonly measures = new Set<string>();
  readonly laws = new Set<string>();
  readonly forms = new Set<string>();
  answers = 0;
  twoSided = 0;
  undecided = 0;

  add(model: StudyModel, result: Result): void {
    this.machines.push(result.work);
    this.orders.add(result.nominal.poles.length);
    this.tolerances.add(model.parameters.filter(({ low, high }) => low < high).length);
    for (const { measure } of model.requirements) this.measures.add(measure);
    for (const { law } of model.laws) this.laws.add(law);
    const { machine } = model;
    this.forms.add(machine.order === 2 ? 'second order' : machine.descriptor ? 'descriptor' : 'first order');
    for (const key of ANSWERS) {
      const answer = result[key];
      if (answer === null) continue;
      this.answers++;
      if (answer.undecided) this.undecided++;
      else if (answer.failsAt !== null && answer.provedTo !== null) this.twoSided++;
    }
  }

  get undecidedShare(): number {
    return this.undecided / this.answers;
  }

  /** One line for people. */
  get summary(): string {
    const boxes = sorted(this.machines.map((machine) => machine.boxes));
    const times = sorted(this.machines.map(({ milliseconds }) => milliseconds));
    const middle = boxes.length >> 1;
    return (
      `${boxes.length} machines, ${this.answers} answers: ${this.twoSided} two-sided, ${this.undecided} undecided; ` +
      `boxes median ${boxes[middle]}, most ${boxes[boxes.length - 1]}; ` +
      `ms median ${times[middle].toFixed(1)}, most ${times[times.length - 1].toFixed(0)}`
    );
  }
}

const sorted = (values: number[]): number[] => [...values].sort((a, b) => a - b);
