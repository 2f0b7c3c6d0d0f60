// Who may import whom, and a checker that holds a file against it.

import { parseSync } from 'vite';

export interface Finding {
  readonly file: string;
  readonly line: number;
  readonly problem: string;
  readonly allowed: string;
}

/** Folders of the engine and the folders each may import, beside itself and what everything may import. */
const TABLE: Readonly<Record<string, readonly string[]>> = (() => {
  const table: Record<string, readonly string[]> = {
    numeric: [],
    shape: [],
    laminate: [],
    fabricator: [],
    brief: ['laminate', 'fabricator'],
    line: ['laminate'],
    patch: ['line', 'laminate', 'brief', 'shape', 'fabricator'],
    // The brief's title and the fabricator's mask and legend are drawn.
    artwork: ['patch', 'shape', 'brief', 'fabricator'],
    rules: ['artwork', 'shape', 'fabricator'],
    field: ['artwork', 'shape', 'laminate'],
    tolerance: ['patch', 'line', 'laminate', 'brief', 'rules', 'field', 'fabricator'],
    bench: ['patch', 'line', 'laminate', 'brief', 'field'],
    panel: ['artwork', 'rules', 'bench', 'tolerance', 'shape', 'fabricator'],
  };
  table.exports = Object.keys(table);
  table.design = Object.keys(table);
  return table;
})();

const EVERYWHERE = ['numeric', 'units.ts', 'errors.ts'];
/** Files at the engine's root that may import all of it. */
const ROOF = ['pipeline.ts', 'index.ts'];

/** Where each third-party package may enter the engine. */
const PACKAGES: Readonly<Record<string, readonly string[]>> = {
  makerjs: ['geometry/artwork/'],
  'clipper2-ts': ['geometry/shape/boolean.ts', 'geometry/shape/offset.ts'],
  'dxf-writer': ['geometry/exports/dxf.ts'],
  jszip: ['geometry/exports/package.ts'],
  zod: ['geometry/brief/'],
};

const MAIN_PACKAGES: Readonly<Record<string, readonly string[]>> = {
  electron: ['main/desktop.ts', 'main/preload.ts'],
  pdfkit: ['main/pdf.ts'],
};

const RENDERER_PACKAGES = ['react', 'react-dom', 'react-dom/client', 'uplot'];
const RENDERER_VALUES = ['geometry/units.ts', 'geometry/brief/fields.ts'];
const RENDERER_TYPES = ['geometry/index.ts', 'main/channels.ts'];

const BANNED = ['process', 'Buffer', 'require', 'document', 'window', 'fetch', 'globalThis'];

interface Node {
  readonly type: string;
  readonly start: number;
  readonly [key: string]: unknown;
}

interface Import {
  /** Undefined where it is worked out at run time. */
  readonly source: string | undefined;
  readonly typeOnly: boolean;
  readonly at: number;
}

function isNode(value: unknown): value is Node {
  return typeof value === 'object' && value !== null && typeof (value as { type?: unknown }).type === 'string';
}

function literal(value: unknown): string | undefined {
  const text = isNode(value) ? value.value : undefined;
  return typeof text === 'string' ? text : undefined;
}

/** Keys under which an identifier names a property and not a variable. */
function isName(parent: Node, key: string): boolean {
  if (parent.type === 'MemberExpression' && key === 'property') return parent.computed !== true;
  if (key === 'key' && parent.type !== 'TSMappedType') return parent.computed !== true;
  if (parent.type === 'ImportSpecifier' && key === 'imported') return true;
  if (parent.type === 'ExportSpecifier' && key === 'exported') return true;
  if (parent.type === 'TSQualifiedName' && key === 'right') return true;
  return parent.type === 'LabeledStatement' && key === 'label';
}

function walk(node: Node, visit: (node: Node, parent: Node | null, key: string) => void): void {
  const descend = (here: Node, parent: Node | null, key: string): void => {
    visit(here, parent, key);
    for (const [inner, value] of Object.entries(here)) {
      for (const child of Array.isArray(value) ? value : [value]) if (isNode(child)) descend(child, here, inner);
    }
  };
  descend(node, null, '');
}

function parse(file: string, text: string): Node {
  const { program, errors } = parseSync(file, text);
  if (errors.length > 0) throw new Error(`${file}: ${errors[0]!.message}`);
  return program as unknown as Node;
}

function importsOf(program: Node): readonly Import[] {
  const found: Import[] = [];
  walk(program, (node) => {
    const add = (source: string | undefined, typeOnly: boolean) => found.push({ source, typeOnly, at: node.start });
    if (node.type === 'ImportDeclaration') add(literal(node.source), node.importKind === 'type' || allTypes(node));
    else if (node.type === 'ExportNamedDeclaration' || node.type === 'ExportAllDeclaration') {
      if (isNode(node.source)) add(literal(node.source), node.exportKind === 'type' || allTypes(node));
    } else if (node.type === 'TSImportType') add(literal(node.source), true);
    else if (node.type === 'ImportExpression') add(literal(node.source), false);
    else if (node.type === 'TSExternalModuleReference') add(literal(node.expression), false);
  });
  return found;
}

/** Whether every name of an import or export is marked as a type. */
function allTypes(node: Node): boolean {
  const specifiers = (node.specifiers as readonly Node[] | undefined) ?? [];
  return (
    specifiers.length > 0 &&
    specifiers.every((specifier) => specifier.importKind === 'type' || specifier.exportKind === 'type')
  );
}

/** A path within the repository, from a relative import. */
function resolved(file: string, source: string): string {
  const parts = file.split('/').slice(0, -1);
  for (const part of source.split('/')) {
    if (part === '..') parts.pop();
    else if (part !== '.') parts.push(part);
  }
  return parts.join('/');
}

function packageOf(source: string): string {
  return source
    .split('/')
    .slice(0, source.startsWith('@') ? 2 : 1)
    .join('/');
}

/** What a package import breaks: what is allowed instead, or undefined where it is in order. */
function packageObjection(file: string, source: string): string | undefined {
  const inFolder = (places: readonly string[] | undefined): string | undefined => {
    if (places?.some((place) => file === place || (place.endsWith('/') && file.startsWith(place)))) return undefined;
    return places === undefined ? 'this package has no place here' : `allowed in ${places.join(', ')}`;
  };
  if (file.startsWith('geometry/')) {
    if (source.startsWith('node:')) return 'the engine knows no Node';
    return inFolder(PACKAGES[packageOf(source)]);
  }
  if (file.startsWith('main/'))
    return source.startsWith('node:') ? undefined : inFolder(MAIN_PACKAGES[packageOf(source)]);
  return RENDERER_PACKAGES.includes(source) ? undefined : `allowed are ${RENDERER_PACKAGES.join(', ')}`;
}

function engineObjection(file: string, target: string): string | undefined {
  const [, from, ...inner] = file.split('/');
  const [root, to] = target.split('/');
  if (root !== 'geometry') return 'the engine imports nothing but itself';
  if (inner.length === 0) {
    return ROOF.includes(from!) || EVERYWHERE.includes(to!) ? undefined : `allowed are ${EVERYWHERE.join(', ')}`;
  }
  const folders = TABLE[from!];
  if (folders === undefined) return `no row for ${from} in the table`;
  const allowed = [...folders, ...EVERYWHERE];
  return to === from || allowed.includes(to!) ? undefined : `${from} may import ${allowed.join(', ')}`;
}

function mainObjection(target: string): string | undefined {
  if (target.startsWith('main/') || target === 'geometry/index.ts' || target === 'package.json') return undefined;
  return 'main may import main, geometry/index.ts and package.json';
}

function rendererObjection(target: string, typeOnly: boolean): string | undefined {
  if (target.startsWith('renderer/') || RENDERER_VALUES.includes(target)) return undefined;
  if (typeOnly && RENDERER_TYPES.includes(target)) return undefined;
  return `values from ${RENDERER_VALUES.join(', ')}; types from ${RENDERER_TYPES.join(', ')}`;
}

function importObjection(file: string, { source, typeOnly }: Import): string | undefined {
  if (source === undefined) return file === 'main/launch.mjs' ? undefined : 'an import names its file in plain text';
  if (!source.startsWith('.')) return packageObjection(file, source);
  const target = resolved(file, source);
  if (file.startsWith('geometry/')) return engineObjection(file, target);
  return file.startsWith('main/') ? mainObjection(target) : rendererObjection(target, typeOnly);
}

/** Everything about one file that the table does not allow.
 *  @param file  path from the repository's root, with "/" */
export function checkFile(file: string, text: string): readonly Finding[] {
  const program = parse(file, text);
  const lineOf = (at: number): number => text.slice(0, at).split('\n').length;
  const findings: Finding[] = [];
  for (const found of importsOf(program)) {
    const allowed = importObjection(file, found);
    if (allowed !== undefined) {
      findings.push({
        file,
        line: lineOf(found.at),
        problem: `imports ${found.source ?? 'what is worked out'}`,
        allowed,
      });
    }
  }
  // Declarations tell the compiler what other people's modules hold; they use nothing.
  if (file.startsWith('geometry/') && !file.endsWith('.d.ts')) {
    walk(program, (node, parent, key) => {
      if (node.type !== 'Identifier' || !BANNED.includes(node.name as string)) return;
      if (parent !== null && isName(parent, key)) return;
      const problem = `uses the name ${node.name}`;
      findings.push({ file, line: lineOf(node.start), problem, allowed: 'the engine knows neither Node nor the page' });
    });
  }
  return findings;
}

/** Files of the repository that a file imports, types included. */
export function importedFiles(file: string, text: string): readonly string[] {
  return importsOf(parse(file, text)).flatMap(({ source }) =>
    source?.startsWith('.') ? [resolved(file, source)] : [],
  );
}

/** One circle of imports, or undefined. */
export function findCycle(graph: ReadonlyMap<string, readonly string[]>): readonly string[] | undefined {
  const done = new Set<string>();
  const path: string[] = [];
  const search = (file: string): readonly string[] | undefined => {
    if (path.includes(file)) return [...path.slice(path.indexOf(file)), file];
    if (done.has(file)) return undefined;
    path.push(file);
    for (const next of graph.get(file) ?? []) {
      const circle = search(next);
      if (circle !== undefined) return circle;
    }
    path.pop();
    done.add(file);
    return undefined;
  };
  for (const file of graph.keys()) {
    const circle = search(file);
    if (circle !== undefined) return circle;
  }
  return undefined;
}
