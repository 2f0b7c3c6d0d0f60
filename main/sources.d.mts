// Types of sources.mjs, which the launcher runs as it is.

export function digestOfSources(root: string): string;
export function stampFile(root: string): string;
export function isFresh(root: string): boolean;
