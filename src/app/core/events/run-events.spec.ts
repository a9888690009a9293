import { signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { RunEvent, SignedIn } from '../../../../shared/contracts/api';
import { Session } from '../session';
import { RunEvents } from './run-events';

/** The browser's side of the stream, driven by the test. */
class Stream extends EventTarget {
  static readonly CLOSED = 2;
  static opened: Stream[] = [];
  readyState = 1;
  onopen: (() => void) | null = null;
  onerror: (() => void) | null = null;
  readonly close = vi.fn();

  constructor(readonly url: string) {
    super();
    Stream.opened.push(this);
  }

  send(kind: string, data: unknown): void {
    this.dispatchEvent(new MessageEvent(kind, { data: JSON.stringify(data) }));
  }
}

const event: RunEvent = {
  id: '7',
  runId: '5f2b3a1e-7f7f-4a53-9d1b-0c5a2f4e9a01',
  scenarioId: '5f2b3a1e-7f7f-4a53-9d1b-0c5a2f4e9a02',
  kind: 'progress',
  progress: 0.5,
};
const person: SignedIn = {
  id: '5f2b3a1e-7f7f-4a53-9d1b-0c5a2f4e9a03',
  name: 'Ada Brandt',
  email: 'ada@hebewerk.example',
  role: 'member',
  mayCreateProducts: false,
};

function setUp() {
  const who = signal<SignedIn | null>(person);
  TestBed.configureTestingModule({ providers: [{ provide: Session, useValue: { person: who } }] });
  const events = TestBed.inject(RunEvents);
  const heard: RunEvent[] = [];
  events.events.subscribe((each) => heard.push(each));
  TestBed.tick();
  return { who, events, heard, stream: Stream.opened[0] };
}

beforeEach(() => {
  Stream.opened = [];
  vi.stubGlobal('EventSource', Stream);
  const request = (_name: string, _options: unknown, hold: () => Promise<void>): Promise<void> => hold();
  vi.stubGlobal('navigator', { locks: { request } });
});

afterEach(() => vi.unstubAllGlobals());

describe('RunEvents', () => {
  it('hears every kind of event under its name', () => {
    const { events, heard, stream } = setUp();
    expect(stream.url).toBe('/api/events');
    stream.onopen?.();
    expect(events.live()).toBe(true);
    stream.send('progress', event);
    stream.send('done', { ...event, id: '8', kind: 'done', progress: 1 });
    expect(heard.map(({ id }) => id)).toEqual(['7', '8']);
  });

  it('takes nothing that breaks the contract', () => {
    const { heard, stream } = setUp();
    stream.send('progress', { ...event, runId: 'none' });
    expect(heard).toEqual([]);
  });

  it('says when nothing may be heard', () => {
    const { events, stream } = setUp();
    stream.onopen?.();
    stream.onerror?.();
    expect(events.live()).toBe(false);
  });

  it('closes the connection when the person signs out', () => {
    const { who, events, stream } = setUp();
    stream.onopen?.();
    who.set(null);
    TestBed.tick();
    expect(stream.close).toHaveBeenCalledOnce();
    expect(events.live()).toBe(false);
  });
});
