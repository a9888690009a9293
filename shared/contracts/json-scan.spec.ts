import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { scanJson } from './json-scan';

function isJson(text: string): boolean {
  try {
    JSON.parse(text);
    return true;
  } catch {
    return false;
  }
}

describe('scanJson', () => {
  it('accepts what JSON.parse accepts', () => {
    fc.assert(
      fc.property(fc.json({ maxDepth: 6 }), fc.constantFrom(0, 1, 4), (text, indent) => {
        const written = JSON.stringify(JSON.parse(text), null, indent);
        expect(scanJson(written, 64).error).toBeUndefined();
      }),
    );
  });

  it('agrees with JSON.parse on texts with one character changed', () => {
    const characters = fc.constantFrom(...'{}[]",:0123456789.-+eE\\u \n\ttrufalsn\u0001'.split(''));
    fc.assert(
      fc.property(
        fc.json({ maxDepth: 3 }),
        fc.nat(),
        characters,
        fc.nat(1),
        (text, at, character, removed) => {
          const place = at % (text.length + 1);
          const changed = text.slice(0, place) + character + text.slice(place + removed);
          expect(scanJson(changed, 64).error === undefined).toBe(isJson(changed));
        },
      ),
      { numRuns: 5000 },
    );
  });

  it('agrees with JSON.parse on any short text of JSON characters', () => {
    const text = fc.string({ unit: fc.constantFrom(...'{}[]",:01.-e\\ntu '.split('')), maxLength: 8 });
    fc.assert(
      fc.property(text, (written) => {
        expect(scanJson(written, 64).error === undefined).toBe(isJson(written));
      }),
      { numRuns: 5000 },
    );
  });

  it('counts the depth of brackets', () => {
    expect(scanJson('[[[]]]', 3).error).toBeUndefined();
    expect(scanJson('[[[[]]]]', 3).error).toEqual({
      message: 'brackets must not nest deeper than 3',
      offset: 3,
    });
    expect(scanJson('["[[[["]', 1).error).toBeUndefined();
  });

  it('finds keys that stand twice, also when written with escapes', () => {
    expect(scanJson('{"a": [0, {"b": 1, "\\u0062": 2}], "a": 3}', 64).duplicateKeys).toEqual([
      ['a', 1, 'b'],
      ['a'],
    ]);
    expect(scanJson('[{"a": 1}, {"a": 2}]', 64).duplicateKeys).toEqual([]);
  });
});
