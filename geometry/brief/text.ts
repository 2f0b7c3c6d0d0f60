// What of a user's text may stand in a field, and how a value is shown in a fault.

/** Control characters, line and paragraph separators, and the marks that turn the direction of reading around. */
const FORBIDDEN = /[\u0000-\u001f\u007f-\u009f\u061c\u200e\u200f\u2028-\u202e\u2066-\u2069\ufeff\ufffe\uffff]/;
const FORBIDDEN_ALL = new RegExp(FORBIDDEN.source, 'g');
/** Half of a surrogate pair without the other half. */
const LONE_SURROGATE = /[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/;
const LONE_SURROGATE_ALL = new RegExp(LONE_SURROGATE.source, 'g');

/** Longest piece of a value that a fault shows. */
const LONGEST_SHOWN = 60;

/** Whether a text holds something that ends lines, hides text or makes it read as something else. */
export function holdsControlCharacters(text: string): boolean {
  return FORBIDDEN.test(text) || LONE_SURROGATE.test(text);
}

/** Number of characters (code points). */
export function characterCount(text: string): number {
  return [...text].length;
}

const escaped = (character: string): string => `\\u${character.charCodeAt(0).toString(16).padStart(4, '0')}`;

/** A text made fit to stand in a message: what does not print as its escape, the rest shortened. */
export function shownText(text: string): string {
  const head = text.length > LONGEST_SHOWN ? `${text.slice(0, LONGEST_SHOWN - 1)}…` : text;
  return head.replace(FORBIDDEN_ALL, escaped).replace(LONE_SURROGATE_ALL, escaped);
}

/** Any JSON value, made fit to stand in a message. */
export function shownValue(value: unknown): string {
  if (value === undefined) return '';
  if (typeof value === 'string') return shownText(value);
  if (Array.isArray(value)) return 'a list';
  if (typeof value === 'object' && value !== null) return 'a record';
  return shownText(String(value));
}
