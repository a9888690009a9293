import { describe, expect, it } from 'vitest';
import { beginHistory, did, redone, undone } from './history';

const act = (what: string, at = 0) => ({ what, at });

describe('a history', () => {
  it('goes back to where it began, and forth again', () => {
    const history = did(did(beginHistory('a'), 'b', act('to b')), 'c', act('to c'));
    const back = undone(undone(history));
    expect(back).toMatchObject({ present: 'a', past: [], future: [{ what: 'to b' }, { what: 'to c' }] });
    expect(redone(redone(back))).toMatchObject({ present: 'c', what: 'to c', future: [] });
  });

  it('stays as it is where there is nothing to undo or to do again', () => {
    const history = beginHistory('a');
    expect(undone(history)).toBe(history);
    expect(redone(history)).toBe(history);
  });

  it('forgets what was undone once something else is done', () => {
    const history = did(undone(did(beginHistory('a'), 'b', act('to b'))), 'c', act('to c'));
    expect(history).toMatchObject({ present: 'c', future: [] });
  });

  it('undoes a drag as one step, however long the hand rests', () => {
    let history = did(beginHistory(0), 1, { what: 'move', gesture: 'k', open: true, at: 0 });
    history = did(history, 2, { what: 'move', gesture: 'k', open: true, at: 60_000 });
    history = did(history, 3, { what: 'move', gesture: 'k', at: 120_000 });
    expect(undone(history).present).toBe(0);
  });

  it('joins the same small step done again at once, and not a later one', () => {
    let history = did(beginHistory(0), 1, { what: 'step', gesture: 'k', at: 0 });
    history = did(history, 2, { what: 'step', gesture: 'k', at: 500 });
    history = did(history, 3, { what: 'step', gesture: 'k', at: 2000 });
    expect(undone(history).present).toBe(2);
    expect(undone(undone(history)).present).toBe(0);
  });

  it('keeps steps of other gestures apart', () => {
    let history = did(beginHistory(0), 1, { what: 'step', gesture: 'k', at: 0 });
    history = did(history, 2, { what: 'step', gesture: 'm', at: 1 });
    expect(undone(history).present).toBe(1);
  });

  it('begins a step anew after something was undone', () => {
    let history = did(beginHistory(0), 1, { what: 'step', gesture: 'k', at: 0 });
    history = did(undone(history), 2, { what: 'step', gesture: 'k', at: 1 });
    expect(undone(history).present).toBe(0);
  });
});
