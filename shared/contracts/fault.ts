/** Something that makes a study unusable, and where: `control.kp`, `machine.mass[0][1]`; `study` for the whole file. */
export interface Fault {
  readonly path: string;
  readonly message: string;
}

/** Something a person should know about a study that can be used nevertheless. */
export interface Warning {
  readonly path: string;
  readonly message: string;
}

/** A study cannot be used. Carries every fault that was found, not only the first. */
export class StudyFaultError extends Error {
  readonly faults: readonly Fault[];

  constructor(faults: readonly Fault[]) {
    super(faults.map(({ path, message }) => `${path}: ${message}`).join('\n'));
    this.name = 'StudyFaultError';
    this.faults = faults;
  }
}
