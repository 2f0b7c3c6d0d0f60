// Text that a user wrote, made safe for one line of any file; each format then adds its own escapes.

/** Control characters, line and paragraph separators, and the marks that turn the direction of reading around: they
 *  end lines, hide text or make it read as something else. */
const NOT_PRINTABLE = /[\u0000-\u001f\u007f-\u009f\u061c\u200e\u200f\u2028-\u202e\u2066-\u2069\ufeff]/g;
/** Half of a surrogate pair without the other half, and the two code points that no text may hold. */
const NOT_A_CHARACTER = /[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]|[\ufffe\uffff]/g;

/** One line of printable text: what cannot be printed becomes a space, what is no character U+FFFD. */
export function plainText(text: string): string {
  return text.replace(NOT_PRINTABLE, ' ').replace(NOT_A_CHARACTER, '\ufffd');
}

/** Breaks words into lines of at most `columns` characters; the first line starts with `lead`, the rest with as many
 *  blanks. A word longer than a line is cut. */
export function wrapColumns(text: string, columns: number, lead = ''): readonly string[] {
  const room = columns - lead.length;
  const lines = breakWords(text, (line) => [...line].length <= room);
  const indent = ' '.repeat(lead.length);
  return lines.map((line, index) => (index === 0 ? lead : indent) + line);
}

/** Breaks text at blanks, and within a word where it alone does not fit. */
export function breakWords(text: string, fits: (line: string) => boolean): readonly string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ').filter((part) => part !== '')) {
    const longer = line === '' ? word : `${line} ${word}`;
    if (fits(longer)) {
      line = longer;
      continue;
    }
    if (line !== '') lines.push(line);
    line = '';
    for (const character of word) {
      if (line !== '' && !fits(line + character)) {
        lines.push(line);
        line = '';
      }
      line += character;
    }
  }
  if (line !== '') lines.push(line);
  return lines;
}
