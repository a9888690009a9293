import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { readStudy, type Study } from '../../../shared/contracts';
import { packageRoot } from '../../platform/package-root';

/** A study file, or the same machine with other bands. */
export interface ScenarioStudy {
  /** File under examples/, without its ending. */
  readonly study: string;
  /** Name of the study, where it is not the file's. */
  readonly label?: string;
  /** Ends of bands that differ from the file's, by parameter. */
  readonly bands?: Readonly<Record<string, { readonly low?: number; readonly high?: number }>>;
}

/** @throws StudyFaultError, or an Error that names a parameter which the study does not have */
export function scenarioStudy({ study: file, label, bands = {} }: ScenarioStudy): Study {
  const { study } = readStudy(readFileSync(join(packageRoot, 'examples', `${file}.json`), 'utf8'));
  const ids = study.parameters.map(({ id }) => id);
  const stray = Object.keys(bands).find((id) => !ids.includes(id));
  if (stray !== undefined) throw new Error(`examples/${file}.json has no parameter ${stray}`);
  const parameters = study.parameters.map((parameter) => ({ ...parameter, ...bands[parameter.id] }));
  return { ...study, name: label ?? study.name, parameters };
}
