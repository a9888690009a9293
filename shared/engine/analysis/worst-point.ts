import type { Contact } from '../contact/contact';
import { bandsFamily } from '../contact/search-family';
import type { SearchSpace } from './search-variables';

/**
 * From a failing point inside the bands, the worst one that a descent over the ends of the bands reaches: the value
 * of the requirement is least there. The failing point itself where nothing certified is worse.
 */
export function worstPoint(
  contact: Contact,
  space: SearchSpace,
  snap: (point: Float64Array) => void,
): Contact {
  const family = bandsFamily(space.variables);
  const { problem } = contact;
  const coordinates = new Float64Array(family.variables);
  const point = contact.point.slice();
  family.coordinatesOf(point, coordinates);
  let least = problem.value(point);
  for (let improved = true; improved;) {
    improved = false;
    for (const variable of family.free) {
      for (const end of [-1, 1]) {
        const before = coordinates[variable];
        if (before === end) continue;
        coordinates[variable] = end;
        family.placePoint(0, coordinates, point);
        const value = problem.value(point);
        if (value < least - 1e-9 * Math.abs(least)) {
          least = value;
          improved = true;
        } else {
          coordinates[variable] = before;
        }
      }
    }
  }
  family.placePoint(0, coordinates, point);
  snap(point);
  return problem.failsCertainly(point) === undefined ? contact : { ...contact, point };
}
