import { formatPath, ROOT_PATH, StudyFaultError, type Fault, type PathPart } from '../../contracts';

/** More faults than this are counted, not listed. */
const MOST_FAULTS = 100;

/** Collects the faults of a study, each once, in the order in which they are found. */
export class FaultList {
  private readonly found = new Map<string, Fault>();

  get count(): number {
    return this.found.size;
  }

  add(path: readonly PathPart[], message: string): void {
    const fault = { path: formatPath(path), message };
    this.found.set(`${fault.path}: ${message}`, fault);
  }

  /** Whether something at this path has a fault already. */
  has(path: readonly PathPart[]): boolean {
    const text = formatPath(path);
    return [...this.found.values()].some((fault) => fault.path === text);
  }

  addAll(faults: readonly Fault[]): void {
    for (const fault of faults) this.found.set(`${fault.path}: ${fault.message}`, fault);
  }

  /** @throws StudyFaultError with all faults, if there are any */
  refuse(): void {
    if (this.found.size === 0) return;
    const faults = [...this.found.values()];
    if (faults.length <= MOST_FAULTS) throw new StudyFaultError(faults);
    const rest = { path: ROOT_PATH, message: `has ${faults.length - MOST_FAULTS} more faults` };
    throw new StudyFaultError([...faults.slice(0, MOST_FAULTS), rest]);
  }
}
