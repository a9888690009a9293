import type { PathPart } from './path';

/** How a text fails to be JSON: what is wrong, and the offset where. */
export interface JsonError {
  readonly message: string;
  readonly offset: number;
}

export interface JsonScan {
  readonly error?: JsonError;
  /** Paths of keys that stand a second time in the same object; JSON.parse would silently keep the last one. */
  readonly duplicateKeys: readonly (readonly PathPart[])[];
}

interface Frame {
  readonly isObject: boolean;
  readonly keys: Set<string>;
  /** The key or index of the entry being read. */
  at: PathPart;
}

type Expectation = 'value' | 'firstValue' | 'key' | 'firstKey' | 'colon' | 'comma' | 'nothing';

const NUMBER = /-?(?:0|[1-9][0-9]*)(?:\.[0-9]+)?(?:[eE][+-]?[0-9]+)?/y;
const WORD = /true|false|null/y;
const SPACE = /[ \t\n\r]*/y;

/**
 * Reads a text as JSON without building anything and without recursion: whether it is valid (RFC 8259), where it first
 * is not, how deep it nests, and which keys it repeats. Runs before JSON.parse, whose messages differ between engines
 * and which would recurse.
 */
export function scanJson(text: string, deepest: number): JsonScan {
  const stack: Frame[] = [];
  const duplicateKeys: PathPart[][] = [];
  let expected: Expectation = 'value';
  let offset = 0;
  const failed = (message: string): JsonScan => ({ error: { message, offset }, duplicateKeys });

  for (;;) {
    offset += matchLength(SPACE, text, offset);
    if (offset >= text.length) {
      return expected === 'nothing'
        ? { duplicateKeys }
        : failed(`the text ends where ${wanted(expected, stack)}`);
    }
    const character = text[offset];
    const frame = stack[stack.length - 1];
    switch (expected) {
      case 'nothing':
        return failed('nothing may follow after the end');
      case 'colon':
        if (character !== ':') return failed(wanted(expected, stack));
        offset += 1;
        expected = 'value';
        continue;
      case 'comma':
        if (character === (frame.isObject ? '}' : ']')) {
          offset += 1;
          stack.pop();
          expected = stack.length === 0 ? 'nothing' : 'comma';
        } else if (character === ',') {
          offset += 1;
          if (typeof frame.at === 'number') frame.at += 1;
          expected = frame.isObject ? 'key' : 'value';
        } else return failed(wanted(expected, stack));
        continue;
      case 'key':
      case 'firstKey': {
        if (character === '}' && expected === 'firstKey') {
          expected = 'comma';
          continue;
        }
        const end = character === '"' ? stringEnd(text, offset) : undefined;
        if (end === undefined) return failed(wanted(expected, stack));
        if (end < 0)
          return failed('this text in quotes is not closed or holds a character that must be escaped');
        frame.at = String(JSON.parse(text.slice(offset, end)));
        if (frame.keys.has(frame.at)) duplicateKeys.push(stack.map(({ at }) => at));
        frame.keys.add(frame.at);
        offset = end;
        expected = 'colon';
        continue;
      }
      case 'value':
      case 'firstValue': {
        if (character === ']' && expected === 'firstValue') {
          expected = 'comma';
          continue;
        }
        if (character === '{' || character === '[') {
          if (stack.length === deepest) return failed(`brackets must not nest deeper than ${deepest}`);
          const isObject = character === '{';
          stack.push({ isObject, keys: new Set(), at: isObject ? '' : 0 });
          offset += 1;
          expected = isObject ? 'firstKey' : 'firstValue';
          continue;
        }
        if (character === '"') {
          const end = stringEnd(text, offset);
          if (end < 0)
            return failed('this text in quotes is not closed or holds a character that must be escaped');
          offset = end;
        } else {
          const length = matchLength(NUMBER, text, offset) || matchLength(WORD, text, offset);
          if (length === 0) return failed(wanted(expected, stack));
          offset += length;
        }
        expected = stack.length === 0 ? 'nothing' : 'comma';
      }
    }
  }
}

function matchLength(sticky: RegExp, text: string, offset: number): number {
  sticky.lastIndex = offset;
  return sticky.exec(text)?.[0].length ?? 0;
}

/** Offset behind the closing quote of the string that opens at `offset`; −1 where it is not a JSON string. */
function stringEnd(text: string, offset: number): number {
  for (let at = offset + 1; at < text.length; at += 1) {
    const code = text.charCodeAt(at);
    if (code === 0x22) return at + 1;
    if (code < 0x20) return -1;
    if (code !== 0x5c) continue;
    at += 1;
    const escaped = text[at] ?? '';
    if (escaped === 'u') {
      if (!/^[0-9a-fA-F]{4}$/.test(text.slice(at + 1, at + 5))) return -1;
      at += 4;
    } else if (escaped === '' || !'"\\/bfnrt'.includes(escaped)) return -1;
  }
  return -1;
}

function wanted(expected: Expectation, stack: readonly Frame[]): string {
  const inObject = stack.length > 0 && stack[stack.length - 1].isObject;
  switch (expected) {
    case 'colon':
      return 'a colon should follow the key';
    case 'comma':
      return `a comma or ${inObject ? '}' : ']'} should follow`;
    case 'key':
      return 'a further key in double quotes should follow the comma';
    case 'firstKey':
      return 'a key in double quotes or } should follow';
    default:
      return 'a number, a text in double quotes, an object, a list, true, false or null should follow';
  }
}
