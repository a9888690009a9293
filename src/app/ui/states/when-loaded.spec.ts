import { ChangeDetectionStrategy, Component, computed, signal } from '@angular/core';
import { render, screen } from '@testing-library/angular';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import type { Failure, Loaded, LoadState } from './load-state';
import { WhenLoaded } from './when-loaded';

const state = signal<LoadState<string>>({ kind: 'idle' });
const reload = vi.fn();

@Component({
  imports: [WhenLoaded],
  template: `
    <p *appWhenLoaded="loaded; let text; let renewing = renewing" [class.renewing]="renewing">{{ text }}</p>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Page {
  protected readonly loaded: Loaded<string> = {
    state,
    value: computed(() => undefined),
    reload,
    replace: (value) => state.set({ kind: 'ready', value }),
  };
}

async function page(first: LoadState<string>): Promise<void> {
  state.set(first);
  reload.mockReset();
  await render(Page);
}

const unreachable: Failure = {
  kind: 'unreachable',
  title: 'The server does not answer',
  detail: 'Check the connection.',
};

describe('WhenLoaded', () => {
  it('says that it loads before there is a value', async () => {
    await page({ kind: 'loading', old: undefined });
    expect(screen.getByRole('status').textContent).toContain('Loading');
    state.set({ kind: 'ready', value: '571 kg' });
    expect(await screen.findByText('571 kg')).toBeTruthy();
    expect(screen.queryByRole('status')).toBeNull();
  });

  it('keeps the old value, greyed, while a newer one is under way', async () => {
    await page({ kind: 'ready', value: '571 kg' });
    const shown = screen.getByText('571 kg');
    state.set({ kind: 'loading', old: '571 kg' });
    await vi.waitFor(() => expect(shown.className).toContain('renewing'));
    state.set({ kind: 'ready', value: '604 kg' });
    expect(await screen.findByText('604 kg')).toBe(shown);
    expect(shown.className).not.toContain('renewing');
  });

  it('says what failed and tries again', async () => {
    await page({ kind: 'failed', old: undefined, failure: unreachable });
    expect(screen.getByRole('alert').textContent).toContain('The server does not answer');
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(reload).toHaveBeenCalledOnce();
  });

  it('offers no second try of what is forbidden', async () => {
    await page({
      kind: 'failed',
      old: undefined,
      failure: { kind: 'forbidden', title: 'You may not see this product', detail: 'Ask for a role.' },
    });
    expect(screen.getByRole('heading', { name: 'You may not see this product' })).toBeTruthy();
    expect(screen.queryByRole('button')).toBeNull();
  });
});
