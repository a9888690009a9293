import { readStudyValue, StudyFaultError, type MapAnswer } from '../../../../shared/contracts';
import { composeStudy, MapCourse } from '../../../../shared/engine';
import type { LiveGrid } from '../live-answer';

/** Most nodes along an axis of the first picture. */
const COARSE = 25;

/**
 * The map of one study, a coarse picture first. A step is a node.
 *
 * @throws StudyFaultError, ExpansionLimitError
 */
export function* mapCourse(
  value: unknown,
  { columns, rows }: LiveGrid,
  tell: (map: MapAnswer) => void,
): Generator<void, void> {
  const composed = composeStudy(readStudyValue(value).study);
  const { map } = composed;
  if (map === undefined) {
    throw new StudyFaultError([{ path: 'map', message: 'is missing; give the parameters of both axes' }]);
  }
  const course = new MapCourse(composed);
  if (columns > COARSE || rows > COARSE) {
    const coarse = { columns: Math.min(columns, COARSE), rows: Math.min(rows, COARSE) };
    tell(yield* course.sweep({ ...map, ...coarse }));
  }
  tell(yield* course.sweep({ ...map, columns, rows }));
}
