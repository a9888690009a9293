import type { TwoSided } from '../../shared/engine/contact/contact';
import type { Example } from './examples';
import { StudySearch } from './study-search';
import { finish, median, timed } from './timing';

const ROUNDS = 15;

interface Course {
  readonly boxes: number;
  /** ms of the first search in this process's life of that kind. */
  readonly first: number;
  /** ms, median of the further ones. */
  readonly warm: number;
}

function measure(searches: StudySearch, search: () => Generator<void, TwoSided>): Course {
  const before = searches.work.boxes;
  const first = timed(() => finish(search()));
  const boxes = searches.work.boxes - before;
  const times = Array.from({ length: ROUNDS }, () => timed(() => finish(search())));
  return { boxes, first, warm: median(times) };
}

/**
 * The contact search of every example, answer by answer: boxes, and milliseconds of the first call and of a warm one.
 * In a sampled search a box is a sample. The first example's first call is the first search of the process.
 */
export function benchContactSearch(print: (line: string) => void, examples: readonly Example[]): void {
  print('contact search: boxes, ms of the first call, ms warm (median)');
  print(`  ${''.padEnd(30)} bands   largest payload        smallest payload       band stretch`);
  for (const { name, study } of examples) {
    const searches = new StudySearch(study);
    const { search, space, searchedUpTo, searchedDownTo } = searches;
    if (search.nominalContact() !== undefined) {
      print(`  ${name.padEnd(30)} the nominal point fails: nothing to search`);
      continue;
    }
    const courses = [
      ...(space.payload < 0 ? [] : [searchedUpTo, searchedDownTo]).map((end) =>
        measure(searches, () => search.payload(end)),
      ),
      measure(searches, () => search.stretch()),
    ];
    const bands = study.parameters.filter(({ hasBand }) => hasBand).length;
    const cells = courses.map(
      ({ boxes, first, warm }) =>
        `${String(boxes).padStart(6)} ${first.toFixed(1).padStart(6)} ${warm.toFixed(1).padStart(6)}`,
    );
    const label = search.proved ? '' : '  (samples)';
    print(`  ${name.padEnd(30)} ${String(bands).padStart(5)} ${cells.join('   ')}${label}`);
  }
}
