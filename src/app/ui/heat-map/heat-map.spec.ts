import { render, screen, waitFor } from '@testing-library/angular';
import { describe, expect, it } from 'vitest';
import { HeatMap } from './heat-map';
import { HeatMapHarness } from './heat-map.harness';
import type { BandChange, MapGrid, MapPoint } from './map-grid';

/** The value falls with the payload and rises with the stiffness; one cell is unknown. */
const MAP: MapGrid = {
  x: [0, 225, 450, 675, 900],
  y: [60, 120, 180, 240],
  values: [
    [2.0, 1.2, 0.8, 0.4, null],
    [2.2, 1.5, 1.1, 0.7, 0.3],
    [2.4, 1.8, 1.3, 1.1, 0.8],
    [2.6, 2.1, 1.6, 1.3, 1.1],
  ],
};
const BAND = { xLow: 40, xHigh: 480, yLow: 120, yHigh: 185 };
const INPUTS = {
  map: MAP,
  limit: 1,
  xAxis: { label: 'payload', unit: 'kg' },
  yAxis: { label: 'belt stiffness', unit: 'kN/m' },
  nominal: { x: 300, y: 150 },
  band: BAND,
  editable: true,
};

async function heatMap(inputs: Record<string, unknown> = {}) {
  const changes: BandChange[] = [];
  const hovered: (MapPoint | null)[] = [];
  const pins: MapPoint[] = [];
  const { fixture, rerender } = await render(HeatMap, {
    inputs: { ...INPUTS, ...inputs },
    on: {
      bandChange: (change) => changes.push(change),
      hover: (point) => hovered.push(point),
      pin: (point) => pins.push(point),
    },
  });
  await fixture.whenStable();
  const harness = new HeatMapHarness(fixture.nativeElement as HTMLElement);
  return { harness, changes, hovered, pins, fixture, rerender };
}

const NAMES = [
  'Payload, low end',
  'Payload, high end',
  'Belt stiffness, low end',
  'Belt stiffness, high end',
];

describe('HeatMap', () => {
  it('says in a sentence what it shows', async () => {
    await heatMap({ failing: { x: 572.34, y: 120 }, provedTo: 571.28 });
    const picture = screen.getByRole('img');
    const sentence = picture.getAttribute('aria-label')?.replace(/\u2009/g, ' ');
    expect(sentence).toContain(
      'Map with payload from 0 to 900 kg across and belt stiffness from 60 to 240 kN/m up.',
    );
    expect(sentence).toContain('5 of 20 cells are below the limit, 1 is unknown.');
    expect(sentence).toContain('Failing point at 572.34 kg and 120 kN/m.');
    expect(sentence).toContain('Proved to 571.2 kg.');
  });

  it('has axes in the page’s own font', async () => {
    const { harness, fixture } = await heatMap();
    expect(harness.tickLabels('x')).toEqual([
      '0',
      '100',
      '200',
      '300',
      '400',
      '500',
      '600',
      '700',
      '800',
      '900',
    ]);
    expect(harness.tickLabels('y')).toContain('100');
    expect((fixture.nativeElement as HTMLElement).querySelectorAll('[font-family]')).toHaveLength(0);
  });

  it('has a handle on every edge, with a name, a value and its range', async () => {
    const { harness } = await heatMap();
    expect(harness.handles.map(({ name }) => name)).toEqual(NAMES);
    expect(screen.getAllByRole('slider')).toHaveLength(4);
    const [low, high] = harness.handles;
    expect([low.value, low.range, low.valueText]).toEqual([40, [0, 300], '40\u2009kg']);
    expect([high.value, high.range]).toEqual([480, [300, 900]]);
  });

  it('moves an edge with the pointer, live and then final', async () => {
    const { harness, changes } = await heatMap();
    const kilogramsPerPixel = 900 / harness.size[0];
    harness.handle(NAMES[1]).drag([30, 99], [60, 99]);
    expect(changes.map(({ edge, final }) => [edge, final])).toEqual([
      ['xHigh', false],
      ['xHigh', false],
      ['xHigh', true],
    ]);
    expect(Math.abs(changes[2].value - (480 + 60 * kilogramsPerPixel))).toBeLessThanOrEqual(1);
    expect(changes[2].value).toBe(changes[1].value);
  });

  it('moves an edge of the upright axis up with the hand', async () => {
    const { harness, changes } = await heatMap();
    const perPixel = 180 / harness.size[1];
    harness.handle(NAMES[3]).drag([0, -40]);
    expect(changes.at(-1)?.edge).toBe('yHigh');
    expect(Math.abs((changes.at(-1)?.value ?? 0) - (185 + 40 * perPixel))).toBeLessThan(0.5);
  });

  it('holds an edge to the map and to the nominal point', async () => {
    const { harness, changes } = await heatMap();
    harness.handle(NAMES[1]).drag([9000, 0], [-9000, 0]);
    harness.handle(NAMES[2]).drag([0, 9000], [0, -9000]);
    const values = changes.filter(({ final }) => !final).map(({ value }) => value);
    expect(values).toEqual([900, 300, 60, 150]);
  });

  it('holds an edge to its opposite where there is no nominal point', async () => {
    const { harness } = await heatMap({ nominal: undefined });
    expect(harness.handles.map(({ range }) => range)).toEqual([
      [0, 480],
      [40, 900],
      [60, 185],
      [120, 240],
    ]);
  });

  it('draws the band where the hand is before anyone answers', async () => {
    const { harness } = await heatMap();
    const handle = harness.handle(NAMES[1]);
    handle.grip();
    handle.dragOn(9000, 0);
    await waitFor(() => expect(handle.value).toBe(900));
    expect(harness.sentence).toContain('payload 40 to 900');
  });

  it('steps an edge with the keys', async () => {
    const { harness, changes } = await heatMap();
    harness.handle(NAMES[1]).press('ArrowLeft', { times: 2 });
    harness.handle(NAMES[3]).press('ArrowUp', { shift: true });
    expect(changes.filter(({ final }) => final)).toEqual([
      { edge: 'xHigh', value: 470, final: true },
      { edge: 'yHigh', value: 195, final: true },
    ]);
  });

  it('has no handle on an open edge', async () => {
    const { harness } = await heatMap({ band: { ...BAND, xLow: null, yHigh: null } });
    expect(harness.handles.map(({ name }) => name)).toEqual([NAMES[1], NAMES[2]]);
    expect(harness.drawn('band')).toBe(true);
  });

  it('has no handle and still its band where it may only be read', async () => {
    const { harness } = await heatMap({ editable: false });
    expect(screen.queryAllByRole('slider')).toEqual([]);
    expect(harness.drawn('band')).toBe(true);
  });

  it('explains cells without a value only where there are some', async () => {
    const { rerender } = await heatMap();
    expect(screen.getByText('unknown')).toBeTruthy();
    const values = MAP.values.map((row) => row.map((value) => value ?? 0.1));
    await rerender({ inputs: { ...INPUTS, map: { ...MAP, values } } });
    expect(screen.queryByText('unknown')).toBeNull();
  });

  it('reads the point under the pointer, and its end', async () => {
    const { harness, hovered } = await heatMap();
    const [width, height] = harness.size;
    harness.hover(width / 2, height / 4);
    harness.leave();
    expect(hovered[0]?.x).toBeCloseTo(450);
    expect(hovered[0]?.y).toBeCloseTo(195);
    expect(hovered[1]).toBeNull();
  });

  it('pins the point that is clicked, once for a double click and not after a drag', async () => {
    const { harness, pins } = await heatMap();
    const [width, height] = harness.size;
    harness.click(width, height);
    harness.doubleClick(0, 0);
    harness.drag([10, 10], [100, 10]);
    expect(pins).toEqual([
      { x: 900, y: 60 },
      { x: 0, y: 240 },
    ]);
  });

  it('zooms by the wheel about the pointer, within the map, and lets the page scroll at its end', async () => {
    const { harness, hovered, fixture } = await heatMap();
    const [width, height] = harness.size;
    expect(harness.wheel(0, height, 100)).toBe(true);
    expect(harness.wheel(0, height, -300)).toBe(false);
    await fixture.whenStable();
    harness.hover(width, height);
    expect(hovered.at(-1)?.x).toBeCloseTo(900 / 1.25 ** 3);
    expect(hovered.at(-1)?.y).toBeCloseTo(60);
    expect(harness.handles.map(({ name }) => name)).toContain(NAMES[0]);
    expect(harness.handles.map(({ name }) => name)).not.toContain(NAMES[1]);
  });

  it('pans when it is zoomed, zooms by two fingers, and a double click shows the whole again', async () => {
    const { harness, hovered, fixture } = await heatMap();
    const [width, height] = harness.size;
    const leftmost = () => {
      harness.hover(0, height);
      return hovered.at(-1)?.x;
    };
    harness.pinch([width / 2, height / 2], 100, 200);
    await fixture.whenStable();
    expect(leftmost()).toBeCloseTo(225, 0);
    harness.drag([100, 100], [100 + width / 4, 100]);
    expect(leftmost()).toBeCloseTo(112.5, 0);
    harness.doubleClick(10, 10);
    expect(leftmost()).toBe(0);
  });

  it('zooms by buttons too', async () => {
    const { fixture } = await heatMap();
    screen.getByRole('button', { name: 'Zoom in' }).click();
    await fixture.whenStable();
    screen.getByRole('button', { name: 'Whole map' }).click();
    await fixture.whenStable();
    expect(screen.queryByRole('button', { name: 'Whole map' })).toBeNull();
    expect(screen.getByRole<HTMLButtonElement>('button', { name: 'Zoom out' }).disabled).toBe(true);
  });

  it('leads a point by the keys, from the nominal point on, and pins it', async () => {
    const { harness, hovered, pins } = await heatMap();
    harness.press('ArrowRight');
    harness.press('ArrowUp', true);
    harness.press('Enter');
    harness.press('Escape');
    harness.press('Tab');
    expect(hovered.at(0)).toEqual({ x: 309, y: 150 });
    expect(pins).toEqual([{ x: 309, y: 168 }]);
    expect(hovered.at(-1)).toBeNull();
    expect(hovered).toHaveLength(3);
  });

  it('keeps its view for a finer map of the same range and drops it for another range', async () => {
    const { harness, rerender, fixture } = await heatMap();
    screen.getByRole('button', { name: 'Zoom in' }).click();
    await rerender({ inputs: { ...INPUTS, map: { ...MAP, values: MAP.values.map((row) => [...row]) } } });
    expect(screen.queryByRole('button', { name: 'Whole map' })).not.toBeNull();
    await rerender({ inputs: { ...INPUTS, map: { ...MAP, x: [0, 200, 400, 600, 800] } } });
    await fixture.whenStable();
    expect(screen.queryByRole('button', { name: 'Whole map' })).toBeNull();
    expect(harness.tickLabels('x').at(-1)).toBe('800');
  });

  it('marks nominal, failing and pinned point and the proved end', async () => {
    const { harness, rerender } = await heatMap();
    expect((['nominal', 'failing', 'pinned', 'proved'] as const).map((what) => harness.drawn(what))).toEqual([
      true,
      false,
      false,
      false,
    ]);
    const marks = { failing: { x: 572, y: 120 }, pinned: { x: 9, y: 99 }, provedTo: 571.28 };
    await rerender({ inputs: { ...INPUTS, ...marks, provedWords: 'proved for the approximated delay to' } });
    expect((['failing', 'pinned', 'proved'] as const).every((what) => harness.drawn(what))).toBe(true);
    expect(screen.getByText(/^proved for the approximated delay to 571\.2\skg$/)).toBeTruthy();
  });

  it('keeps the old picture, greyed, while a newer one is under way', async () => {
    const { harness, fixture } = await heatMap({ pending: true });
    expect(harness.greyed).toBe(true);
    expect((fixture.nativeElement as HTMLElement).getAttribute('aria-busy')).toBe('true');
    expect(harness.handles).toHaveLength(4);
  });

  it('says so while there is no map', async () => {
    const { harness, hovered, pins, rerender } = await heatMap({ map: undefined });
    expect(harness.sentence).toBe('There is no map yet.');
    harness.hover(5, 5);
    harness.click(5, 5);
    expect([hovered, pins, harness.handles, harness.tickLabels('x')]).toEqual([[], [], [], []]);
    await rerender({ inputs: { ...INPUTS, map: undefined, pending: true } });
    expect(harness.sentence).toBe('The map is being computed.');
  });
});
