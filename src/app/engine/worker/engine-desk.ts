import type { EngineReply, EngineRequest } from '../engine-messages';
import { faultsOf } from './faults-of';
import { liveCourse } from './live-course';
import { mapCourse } from './map-course';

export interface DeskSurroundings {
  readonly reply: (reply: EngineReply) => void;
  /** Milliseconds. */
  readonly clock: () => number;
  /** Has `takeTurn` called once, after the messages that have come by then. */
  readonly askForTurn: () => void;
}

/** After so many milliseconds the messages that have come meanwhile are looked at. */
const TURN_MS = 4;

interface Task {
  readonly id: number;
  readonly course: Generator<void, void>;
  /** Whether something has been told already: first answers go before the rest of any other. */
  answered: boolean;
}

/** One live answer and one map at a time, each in short turns, so that a newer request is seen at once. */
export class EngineDesk {
  private live: Task | undefined;
  private map: Task | undefined;
  private isTurnAskedFor = false;

  constructor(private readonly surroundings: DeskSurroundings) {}

  receive(request: EngineRequest): void {
    const { id } = request;
    switch (request.kind) {
      case 'live': {
        this.supersede(this.live);
        const { reply, clock } = this.surroundings;
        const course = liveCourse(request.study, clock, (answer) => {
          task.answered = true;
          reply({ kind: 'live', id, answer });
        });
        const task: Task = { id, course, answered: false };
        this.live = task;
        break;
      }
      case 'map': {
        this.supersede(this.map);
        const { reply } = this.surroundings;
        const course = mapCourse(request.study, request.grid, (map) => {
          task.answered = true;
          reply({ kind: 'map', id, map });
        });
        const task: Task = { id, course, answered: false };
        this.map = task;
        break;
      }
      case 'cancel':
        this.forget(id);
        break;
    }
    this.continueLater();
  }

  /** Computes for a few milliseconds. */
  takeTurn(): void {
    this.isTurnAskedFor = false;
    const task = this.next();
    if (task === undefined) return;
    const { reply, clock } = this.surroundings;
    const end = clock() + TURN_MS;
    try {
      const { answered } = task;
      do {
        if (task.course.next().done === true) {
          this.forget(task.id);
          reply({ kind: 'done', id: task.id });
          break;
        }
        // What was told first may let another one go before it.
      } while (clock() < end && task.answered === answered);
    } catch (error) {
      this.forget(task.id);
      reply(replyTo(error, task.id));
    }
    this.continueLater();
  }

  /** First answers before the rest, live answers before maps. */
  private next(): Task | undefined {
    const { live, map } = this;
    return live !== undefined && live.answered && map !== undefined && !map.answered ? map : (live ?? map);
  }

  private supersede(task: Task | undefined): void {
    if (task !== undefined) this.surroundings.reply({ kind: 'done', id: task.id });
  }

  private forget(id: number): void {
    if (this.live?.id === id) this.live = undefined;
    if (this.map?.id === id) this.map = undefined;
  }

  private continueLater(): void {
    if (this.isTurnAskedFor || this.next() === undefined) return;
    this.isTurnAskedFor = true;
    this.surroundings.askForTurn();
  }
}

function replyTo(error: unknown, id: number): EngineReply {
  const faults = faultsOf(error);
  if (faults !== undefined) return { kind: 'faults', id, faults };
  return { kind: 'broken', id, message: error instanceof Error ? error.message : String(error) };
}
