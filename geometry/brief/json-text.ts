// JSON text → value, with line and column of what is wrong. Unlike the language's own reader it refuses a key that
// stands twice, bounds the depth, makes records without a prototype, and never quotes the text in a fault.

import { type Fault, refuse } from '../errors.ts';

/** Largest input that is read at all, in bytes of UTF-8. */
export const LARGEST_INPUT_BYTES = 1_000_000;
/** Nothing that is read here is nested deeper than five. */
const DEEPEST = 32;

const NUMBER = /-?(?:0|[1-9][0-9]*)(?:\.[0-9]+)?(?:[eE][+-]?[0-9]+)?/y;
// A string as RFC 8259 section 7 has it: no raw control characters, only the known escapes.
const STRING = /"(?:[^"\\\u0000-\u001f]|\\(?:["\\/bfnrt]|u[0-9a-fA-F]{4}))*"/y;
const WORD = /true|false|null/y;
const BLANK = /[ \t\n\r]*/y;

/** Reads JSON (RFC 8259).
 *  Throws: EngineError "json.syntax", "json.duplicateKey" or "json.depth", with line and column in the problem */
export function readJson(text: string, file: string): unknown {
  let at = 0;

  function fail(code: string, problem: string, position: number, path = ''): never {
    const before = text.slice(0, position).split(/\r\n|\r|\n/);
    const where = `line ${before.length}, column ${before.at(-1)!.length + 1}`;
    const fault: Fault = {
      code,
      file,
      path,
      value: '',
      problem: `${problem} at ${where}`,
      allowed: 'JSON is taken here',
    };
    refuse(fault);
  }
  function take(pattern: RegExp): string | null {
    pattern.lastIndex = at;
    const found = pattern.exec(text);
    if (found === null) return null;
    at += found[0].length;
    return found[0];
  }
  function blank(): void {
    take(BLANK);
  }
  function expected(what: string): never {
    fail('json.syntax', at >= text.length ? `the text ends where ${what} is expected` : `${what} is expected`, at);
  }
  function record(depth: number): unknown {
    const result: Record<string, unknown> = Object.create(null);
    at++;
    blank();
    if (text[at] === '}') {
      at++;
      return result;
    }
    for (;;) {
      const start = at;
      const raw = take(STRING);
      if (raw === null) expected('a key in double quotes');
      const key = JSON.parse(raw) as string;
      if (key in result) fail('json.duplicateKey', 'a key stands for the second time', start);
      blank();
      if (text[at] !== ':') expected('":"');
      at++;
      result[key] = value(depth + 1);
      if (text[at] === ',') at++;
      else if (text[at] === '}') {
        at++;
        return result;
      } else expected('"," or "}"');
      blank();
    }
  }
  function list(depth: number): unknown {
    const result: unknown[] = [];
    at++;
    blank();
    if (text[at] === ']') {
      at++;
      return result;
    }
    for (;;) {
      result.push(value(depth + 1));
      if (text[at] === ',') at++;
      else if (text[at] === ']') {
        at++;
        return result;
      } else expected('"," or "]"');
    }
  }
  function value(depth: number): unknown {
    if (depth > DEEPEST) fail('json.depth', `the text is nested deeper than ${DEEPEST}`, at);
    blank();
    const result = single(depth);
    blank();
    return result;
  }
  function single(depth: number): unknown {
    const first = text[at];
    if (first === '{') return record(depth);
    if (first === '[') return list(depth);
    const raw = take(first === '"' ? STRING : first !== undefined && /[-0-9]/.test(first) ? NUMBER : WORD);
    if (raw === null) expected('a value');
    return JSON.parse(raw);
  }

  // A byte-order mark is no part of the text.
  if (text.startsWith('\ufeff')) at = 1;
  const result = value(0);
  if (at < text.length) expected('the end of the text');
  return result;
}
