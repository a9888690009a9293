import { readStudy, StudyFaultError } from '../../../shared/contracts';
import { composeStudy, MapCourse } from '../../../shared/engine';
import type { MapGrid } from '../engine-task';
import type { RunControl } from '../run-control';
import { driveCourse } from './course';
import { finestUntil } from './finest-grid';

/**
 * The map of a study's text alone, as JSON.
 *
 * @throws StudyFaultError, Stopped
 */
export function mapStudy(text: string, grid: MapGrid, control: RunControl): string {
  const { study } = readStudy(text);
  const composed = composeStudy(study);
  const { map } = composed;
  if (map === undefined) {
    throw new StudyFaultError([{ path: 'map', message: 'is missing; give the parameters of both axes' }]);
  }
  const course = new MapCourse(composed);
  const compute = ({ columns, rows }: { columns: number; rows: number }) =>
    driveCourse(
      course.sweep({ ...map, columns, rows }),
      control,
      (steps) => steps / (grid.columns * grid.rows),
    );
  const { until } = grid;
  const answer = until === undefined ? compute(grid) : finestUntil(grid, until, Date.now, compute);
  return JSON.stringify(answer);
}
