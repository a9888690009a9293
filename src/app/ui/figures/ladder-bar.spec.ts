import { render, screen } from '@testing-library/angular';
import { describe, expect, it } from 'vitest';
import { LadderBar } from './ladder-bar';
import type { PayloadRanges } from './payload-ranges';

async function picture(ranges: PayloadRanges): Promise<HTMLElement> {
  await render(LadderBar, { inputs: { ranges, scaleEnd: 1000, label: 'Proved 0 to 570 kg' } });
  return screen.getByRole('img', { name: 'Proved 0 to 570 kg' });
}

describe('LadderBar', () => {
  it('fills the proved range and marks its end', async () => {
    const svg = await picture({
      rated: { low: 40, high: 480 },
      proved: { low: 0, high: 570 },
      failsAbove: 571,
    });
    expect(svg.querySelector('.proved')?.getAttribute('width')).toBe('57%');
    expect(svg.querySelector('.held')?.getAttribute('x')).toBe('4%');
    expect([...svg.querySelectorAll('.mark')].map((mark) => mark.getAttribute('x1'))).toEqual(['57%']);
  });

  it('hatches what fails apart from what is only open', async () => {
    const svg = await picture({ proved: { low: 100, high: 570 }, failsBelow: 99 });
    const fills = [...svg.querySelectorAll('rect[fill]')].map((part) => part.getAttribute('fill') ?? '');
    expect(fills).toHaveLength(2);
    expect(fills[0]).toContain('-fails');
    expect(fills[1]).toContain('-open');
  });

  it('has a dotted edge where the range is sampled', async () => {
    const svg = await picture({
      rated: { low: 0, high: 50 },
      proved: { low: 0, high: 56 },
      failsAbove: 57,
      sampled: true,
    });
    expect(svg.querySelectorAll('.sampled')).toHaveLength(2);
  });
});
