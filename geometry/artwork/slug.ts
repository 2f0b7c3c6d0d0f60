// The stem of every file name, from a title that may hold anything.

const LONGEST = 48;
/** Names that some systems keep for devices. */
const RESERVED = /^(con|prn|aux|nul|com[0-9]|lpt[0-9])$/;

/** a–z, 0–9 and single hyphens, at most 48; empty or reserved becomes "board". */
export function slugOf(title: string): string {
  const slug = title
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+/, '')
    .slice(0, LONGEST)
    .replace(/-+$/, '');
  return slug === '' || RESERVED.test(slug) ? 'board' : slug;
}
