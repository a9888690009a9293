// What a thread of the pool runs: the engine, asked from the server's main thread.

import { StudyFaultError } from '../../../shared/contracts';
import { ENGINE_VERSION } from '../../../shared/engine';
import { ExpansionLimitError } from '../../../shared/expressions';
import type { EngineOrder, EngineReply, EngineTask } from '../engine-task';
import { RunControl } from '../run-control';
import { analyseStudy } from './analyse-study';
import { Stopped } from './course';
import { mapStudy } from './map-study';

function compute(task: EngineTask, control: RunControl): EngineReply {
  switch (task.kind) {
    case 'version':
      return { kind: 'version', version: ENGINE_VERSION };
    case 'analysis':
      return { kind: 'analysis', answer: analyseStudy(task.study, task.map, control) };
    case 'map':
      return { kind: 'map', text: mapStudy(task.study, task.grid, control) };
  }
}

export default function answer({ task, control: buffer }: EngineOrder): EngineReply {
  const control = new RunControl(buffer);
  // It may have waited for a free thread longer than anybody waited for it.
  if (control.isAskedToStop) return { kind: 'stopped' };
  try {
    return compute(task, control);
  } catch (error) {
    if (error instanceof Stopped) return { kind: 'stopped' };
    if (error instanceof StudyFaultError) return { kind: 'faults', faults: error.faults };
    if (error instanceof ExpansionLimitError) {
      const message = `is too large to expand exactly: ${error.message}`;
      return { kind: 'faults', faults: [{ path: 'machine', message }] };
    }
    throw error;
  }
}
