import { readStudyValue, StudyFaultError, type Fault, type Study } from '../../../../shared/contracts';

/** Faults by path, each message once: those that can be told without evaluating, and the engine's. */
export class StudyFaults {
  private readonly byPath = new Map<string, Set<string>>();

  constructor(study: Study, fromEngine: readonly Fault[]) {
    for (const { path, message } of [...readFaults(study), ...fromEngine]) {
      const messages = this.byPath.get(path);
      if (messages === undefined) this.byPath.set(path, new Set([message]));
      else messages.add(message);
    }
  }

  at(path: string): readonly string[] {
    return [...(this.byPath.get(path) ?? [])];
  }

  /** Whether a path or anything below it has a fault. */
  within(path: string): boolean {
    return [...this.byPath.keys()].some((key) => isWithin(key, path));
  }

  /** Faults in these parts of the study that no field stands for. */
  unclaimed(roots: readonly string[], claimed: ReadonlySet<string>): Fault[] {
    return [...this.byPath]
      .filter(([path]) => !claimed.has(path) && roots.some((root) => isWithin(path, root)))
      .flatMap(([path, messages]) => [...messages].map((message) => ({ path, message })));
  }
}

function isWithin(path: string, root: string): boolean {
  return path === root || path.startsWith(`${root}.`) || path.startsWith(`${root}[`);
}

function readFaults(study: Study): readonly Fault[] {
  try {
    readStudyValue(study);
    return [];
  } catch (error) {
    if (error instanceof StudyFaultError) return error.faults;
    throw error;
  }
}
