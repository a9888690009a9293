import { describe, expect, it } from 'vitest';
import { drawingOf } from '.';
import { templates } from '../templates';

describe('drawings of the templates', () => {
  it.each(templates.map((template) => [template.id, template] as const))(
    'shows every parameter of %s that has a place in the machine',
    (id, template) => {
      const shown = drawingOf(id).items.flatMap((item) => ('symbol' in item ? [item.symbol] : []));
      // The inertia of a vehicle seen from above has no place of its own.
      const missing = template.parameters.filter(({ symbol }) => symbol !== 'J₀' && !shown.includes(symbol));
      expect(missing).toEqual([]);
    },
  );
});
