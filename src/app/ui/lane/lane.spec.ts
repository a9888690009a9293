import { render, screen } from '@testing-library/angular';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { Lane, type LaneChange } from './lane';
import { LaneHarness } from './lane.harness';

const PAYLOAD = {
  label: 'payload',
  symbol: 'm',
  unit: 'kg',
  track: { low: 0, high: 960 },
  low: 40,
  high: 480,
  nominal: 300,
  minimum: 0,
  editable: true,
};

async function lane(inputs: Record<string, unknown> = {}) {
  const changes: LaneChange[] = [];
  await render(Lane, {
    inputs: { ...PAYLOAD, ...inputs },
    on: { bandChange: (change) => changes.push(change) },
  });
  return { changes, harness: LaneHarness.named(document, 'Payload') };
}

describe('Lane', () => {
  it('draws band, nominal and limit mark on its track', async () => {
    const { harness } = await lane({ mark: 576 });
    expect(harness.drawnAt('nominal')).toBeCloseTo(31.25);
    expect(harness.drawnAt('mark')).toBeCloseTo(60);
    expect(harness.drawnAt('band')).toBeCloseTo(4.1667, 3);
    expect(harness.bandLength).toBeCloseTo(45.8333, 3);
  });

  it('draws no mark that lies off the track, and one at its start', async () => {
    const { harness } = await lane({ mark: 2000, nominal: 0, low: 0 });
    expect(harness.drawnAt('mark')).toBeUndefined();
    expect(harness.drawnAt('nominal')).toBe(0);
  });

  it('follows a drag and stops at the nominal', async () => {
    // The track is 480 CSS pixels where nothing is laid out: 2 kg each.
    const { harness, changes } = await lane();
    harness.handle('high').drag([10, 0], [-400, 0]);
    expect(changes).toEqual([
      { edge: 'high', value: 500, final: false },
      { edge: 'high', value: 300, final: false },
      { edge: 'high', value: 300, final: true },
    ]);
  });

  it('stops at the ends of the track and at the limits', async () => {
    const { harness, changes } = await lane({ minimum: 20 });
    harness.handle('low').press('Home');
    harness.handle('high').press('End');
    expect(changes.filter(({ final }) => final)).toEqual([
      { edge: 'low', value: 20, final: true },
      { edge: 'high', value: 960, final: true },
    ]);
  });

  it('shows what the hand reached before anyone answers', async () => {
    const { harness } = await lane();
    const high = harness.handle('high');
    high.grip();
    high.dragOn(60, 0);
    await expect.poll(() => high.value).toBe(600);
    expect(harness.bandLength).toBeCloseTo(58.3333, 3);
  });

  it('steps by keys', async () => {
    const { harness, changes } = await lane();
    harness.handle('low').press('ArrowRight');
    expect(changes.at(-1)).toEqual({ edge: 'low', value: 45, final: true });
  });

  it('takes an exact figure, beyond the track too', async () => {
    const user = userEvent.setup();
    const { changes } = await lane();
    await user.click(screen.getByRole('button', { name: /^Payload, high end: 480\skg/ }));
    const field = await screen.findByRole('textbox', { name: 'Payload, high end' });
    await user.clear(field);
    await user.type(field, '1200,5 kg{Enter}');
    expect(changes).toEqual([{ edge: 'high', value: 1200.5, final: true }]);
    expect(await screen.findByRole('button', { name: /^Payload, high end/ })).toBe(document.activeElement);
  });

  it('explains a figure that it cannot take, and keeps none', async () => {
    const user = userEvent.setup();
    const { changes } = await lane();
    await user.click(screen.getByRole('button', { name: /^Payload, low end/ }));
    const field = await screen.findByRole('textbox', { name: 'Payload, low end' });
    await user.clear(field);
    await user.type(field, '350{Enter}');
    const fault = await screen.findByRole('alert');
    expect(fault.textContent).toBe('Payload, low end must not be above 300\u2009kg.');
    expect(field.getAttribute('aria-describedby')).toBe(fault.id);
    await user.keyboard('{Escape}');
    expect(await screen.findByRole('button', { name: /^Payload, low end: 40/ })).toBeTruthy();
    expect(changes).toEqual([]);
  });

  it('does not round a value that was only looked at', async () => {
    const user = userEvent.setup();
    const { changes } = await lane({ high: 480.123456789 });
    await user.click(screen.getByRole('button', { name: /^Payload, high end/ }));
    await screen.findByRole('textbox', { name: 'Payload, high end' });
    await user.keyboard('{Enter}');
    await screen.findByRole('button', { name: /^Payload, high end/ });
    expect(changes).toEqual([]);
  });

  it('has a handle only where the band has an end', async () => {
    await lane({ low: null });
    expect(screen.getAllByRole('slider').map((slider) => slider.getAttribute('aria-label'))).toEqual([
      'Payload, high end',
    ]);
  });

  it('cannot be changed where it may only be read, and says its band', async () => {
    await lane({ editable: false });
    expect(screen.queryAllByRole('slider')).toEqual([]);
    expect(screen.queryAllByRole('button')).toEqual([]);
    expect(screen.getByText(/^40 to 480\skg$/)).toBeTruthy();
  });

  it('shows the figure of its note apart', async () => {
    await lane({ note: '+88 kg\nband halved' });
    expect(screen.getByText('+88 kg').classList).toContain('first');
    expect(screen.getByText('band halved').classList).not.toContain('first');
  });
});
