import { describe, expect, it } from 'vitest';
import { mapSentence, type MapFacts } from './map-sentence';

const FACTS: MapFacts = {
  xAxis: { label: 'payload', unit: 'kg' },
  yAxis: { label: 'belt stiffness', unit: 'kN/m' },
  extent: { xLow: 0, xHigh: 900, yLow: 60, yHigh: 240 },
  counts: { all: 99, failing: 12, unknown: 1 },
  nominal: { x: 300, y: 150 },
  failing: { x: 572.3, y: 120 },
  band: { xLow: 40, xHigh: 480, yLow: null, yHigh: 185 },
  proved: 'proved to 571.2 kg',
};

describe('mapSentence', () => {
  it('says what the picture shows', () => {
    expect(mapSentence(FACTS).replace(/\u2009/g, ' ')).toBe(
      'Map with payload from 0 to 900 kg across and belt stiffness from 60 to 240 kN/m up. ' +
        '12 of 99 cells are below the limit, 1 is unknown. Nominal point at 300 kg and 150 kN/m. ' +
        'Failing point at 572.3 kg and 120 kN/m. Band: payload 40 to 480 kg, belt stiffness up to 185 kN/m. ' +
        'Proved to 571.2 kg.',
    );
  });

  it('leaves out what there is not', () => {
    const bare = {
      ...FACTS,
      counts: { all: 4, failing: 0, unknown: 0 },
      nominal: undefined,
      failing: undefined,
      band: undefined,
      proved: undefined,
    };
    expect(mapSentence(bare)).toMatch(/ up\. No cell is below the limit\.$/);
    expect(mapSentence({ ...bare, counts: { all: 4, failing: 4, unknown: 0 } })).toMatch(
      /All 4 cells are below the limit\.$/,
    );
  });
});
