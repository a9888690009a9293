import { describe, expect, it } from 'vitest';
import { createPreviewSlots, type PreviewSlots } from './preview-slots';

const never = () => new AbortController().signal;

/** A computation that ends by its signal only. */
function endless(signal: AbortSignal): Promise<never> {
  return new Promise((_resolve, reject) => {
    signal.addEventListener('abort', () => reject(signal.reason as Error));
  });
}

describe('preview slots', () => {
  const drag = (slots: PreviewSlots, personId: string, supersedes?: string) =>
    slots.hold({ personId, supersedes, signal: never() }, endless);
  const quick = (slots: PreviewSlots, personId: string, supersedes?: string) =>
    slots.hold({ personId, supersedes, signal: never() }, () => Promise.resolve('answer'));

  it('end the older preview of a stream', async () => {
    const slots = createPreviewSlots();
    const older = drag(slots, 'anna', 'map');
    expect(await quick(slots, 'anna', 'map')).toBe('answer');
    await expect(older).rejects.toMatchObject({ code: 'preview-superseded' });
  });

  it('leave other streams, other people and previews without a stream alone', async () => {
    const slots = createPreviewSlots();
    let ended = 0;
    const count = (preview: Promise<unknown>) => {
      preview.catch(() => {
        ended += 1;
      });
    };
    count(drag(slots, 'anna', 'answers'));
    count(drag(slots, 'anna'));
    count(drag(slots, 'bert', 'map'));
    const older = drag(slots, 'anna', 'map');
    await quick(slots, 'anna', 'map');
    await expect(older).rejects.toThrow();
    expect(ended).toBe(0);
  });

  it('do not end a preview that is over', async () => {
    const slots = createPreviewSlots();
    let given: AbortSignal | undefined;
    const first = slots.hold({ personId: 'anna', supersedes: 'map', signal: never() }, (signal) => {
      given = signal;
      return Promise.resolve(1);
    });
    expect(await first).toBe(1);
    await quick(slots, 'anna', 'map');
    expect(given?.aborted).toBe(false);
  });

  it('bound how many one person computes at a time', async () => {
    const slots = createPreviewSlots();
    const leaving = new AbortController();
    const open = Array.from({ length: 4 }, () =>
      slots.hold({ personId: 'anna', supersedes: undefined, signal: leaving.signal }, endless),
    );
    await expect(quick(slots, 'anna')).rejects.toMatchObject({ code: 'too-many-at-once', status: 429 });
    expect(await quick(slots, 'bert')).toBe('answer');
    leaving.abort();
    const outcomes = await Promise.allSettled(open);
    expect(outcomes.map(({ status }) => status)).toEqual(Array(4).fill('rejected'));
    expect(await quick(slots, 'anna')).toBe('answer');
  });

  it('end what nobody waits for, also where it was left before it began', async () => {
    const slots = createPreviewSlots();
    const begun: string[] = [];
    const leave = AbortSignal.abort();
    const early = slots.hold({ personId: 'anna', supersedes: undefined, signal: leave }, () => {
      begun.push('early');
      return Promise.resolve('answer');
    });
    await expect(early).rejects.toMatchObject({ code: 'unavailable' });
    expect(begun).toEqual([]);
  });

  it('end what takes too long', async () => {
    const slots = createPreviewSlots({ longestMs: 1 });
    await expect(drag(slots, 'anna')).rejects.toMatchObject({ code: 'preview-too-long' });
  });
});
