import { availableEffort } from './attack-effort';
import { attackMachine } from './attack-machine';
import { AttackStatistics } from './attack-statistics';
import { randomStudy } from './random-study';

/** What an attack on a series of machines found, one line for each fault: seed, claim, point. */
export interface AttackReport {
  readonly faults: readonly string[];
  readonly statistics: AttackStatistics;
}

/** Attacks the machines of a share of the seeds: those whose remainder by `parts` is `part`. */
export function attackShare(part: number, parts: number): AttackReport {
  const { firstSeed, machines, ...effort } = availableEffort();
  const faults: string[] = [];
  const statistics = new AttackStatistics();
  for (let seed = firstSeed; seed < firstSeed + machines; seed++) {
    if (seed % parts !== part) continue;
    const model = randomStudy(seed);
    const outcome = attackMachine(model, seed, effort);
    statistics.add(model, outcome.result);
    faults.push(...outcome.faults.map((fault) => `seed ${seed}: ${fault}`));
    const worst = [...outcome.failures].sort((a, b) => a.slack - b.slack)[0];
    if (worst !== undefined) {
      faults.push(
        `seed ${seed}: ${worst.claim} claims a failing point, ${worst.requirement.measure} ${worst.slack} at ${worst.values.join(', ')}`,
      );
    }
  }
  return { faults, statistics };
}
