import { render, screen } from '@testing-library/angular';
import { describe, expect, it } from 'vitest';
import { BandHandle, type HandleMove } from './band-handle';
import { BandHandleHarness } from './band-handle.harness';

async function handle(inputs: { along?: 'x' | 'y'; perPixel?: number; value?: number } = {}) {
  const moves: HandleMove[] = [];
  const { fixture } = await render(BandHandle, {
    inputs: {
      label: 'Payload, high end',
      value: 480,
      valueText: '480 kg',
      minimum: 300,
      maximum: 900,
      perPixel: 1.3,
      step: 5,
      ...inputs,
    },
    on: { move: (move) => moves.push(move) },
  });
  return { moves, harness: BandHandleHarness.named(document, 'Payload, high end'), fixture };
}

describe('BandHandle', () => {
  it('is a slider with its range in words and numbers', async () => {
    const { harness } = await handle();
    const slider = screen.getByRole('slider', { name: 'Payload, high end' });
    expect(slider).toBe(harness.element);
    expect(slider.getAttribute('aria-orientation')).toBe('horizontal');
    expect([harness.value, harness.range, harness.valueText]).toEqual([480, [300, 900], '480 kg']);
  });

  it('follows the pointer, in digits that a pixel can mean, and says when it is let go', async () => {
    const { harness, moves } = await handle();
    harness.drag([10, 0], [20, 40]);
    expect(moves).toEqual([
      { value: 493, final: false },
      { value: 506, final: false },
      { value: 506, final: true },
    ]);
  });

  it('stops at its ends', async () => {
    const { harness, moves } = await handle();
    harness.drag([5000, 0], [-5000, 0]);
    expect(moves.map(({ value }) => value)).toEqual([900, 300, 300]);
  });

  it('moves up and down where its axis runs up', async () => {
    const { harness, moves } = await handle({ along: 'y', perPixel: -2 });
    harness.drag([70, -10]);
    expect(moves.at(-1)).toEqual({ value: 500, final: true });
  });

  it('says nothing when it is only touched', async () => {
    const { harness, moves } = await handle();
    harness.drag([0, 0]);
    expect(moves).toEqual([]);
  });

  it('ends a drag that came back', async () => {
    const { harness, moves } = await handle();
    harness.drag([10, 0], [0, 0]);
    expect(moves.at(-1)).toEqual({ value: 480, final: true });
  });

  it('goes back to where it was on Escape', async () => {
    const { harness, moves } = await handle();
    harness.grip();
    harness.dragOn(10, 0);
    harness.press('Escape');
    harness.dragOn(30, 0);
    expect(moves).toEqual([
      { value: 493, final: false },
      { value: 480, final: true },
    ]);
  });

  it('steps with the arrows, one move while a key is held', async () => {
    const { harness, moves } = await handle();
    harness.press('ArrowRight', { times: 3 });
    expect(moves).toEqual([
      { value: 485, final: false },
      { value: 490, final: false },
      { value: 495, final: false },
      { value: 495, final: true },
    ]);
  });

  it('takes ten steps with Shift or the page keys, and goes to its ends', async () => {
    const { harness, moves } = await handle();
    harness.press('ArrowDown', { shift: true });
    harness.press('PageUp');
    harness.press('Home');
    harness.press('End');
    expect(moves.filter(({ final }) => final).map(({ value }) => value)).toEqual([430, 530, 300, 900]);
  });

  it('does not move past its end with the keys', async () => {
    const { harness, moves } = await handle({ value: 900 });
    harness.press('ArrowRight');
    expect(moves).toEqual([]);
  });

  it('leaves other keys to the page', async () => {
    const { harness } = await handle();
    const tab = new KeyboardEvent('keydown', { key: 'Tab', bubbles: true, cancelable: true });
    harness.element.dispatchEvent(tab);
    expect(tab.defaultPrevented).toBe(false);
  });
});
