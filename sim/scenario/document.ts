/** YAML 1.2 or JSON text → a tree with places, and every problem of syntax in plain words. */
import {
  type Alias,
  type Document,
  isAlias,
  isMap,
  isScalar,
  isSeq,
  LineCounter,
  type Pair,
  parseDocument,
  type Node as YamlNode,
} from 'yaml';
import { squeezedColon, syntaxProblem } from './syntax.ts';
import type { Branch, Entry, Leaf, Place, Tree } from './tree.ts';
import type { Problem } from './types.ts';

/** A scenario is a page of text; these bounds stop floods and alias bombs, no honest file. */
const mostCharacters = 1_000_000;
const mostNodes = 20_000;
const mostDepth = 24;
const mostBrackets = 100;
const mostIndent = 200;

export interface ReadDocument {
  /** Null when the syntax leaves nothing to go on with. */
  readonly root: Branch | null;
  readonly problems: readonly Problem[];
}

/** Reads the text of a scenario file. Throws nothing: what is wrong stands in `problems`. */
export function readDocument(text: string, file: string): ReadDocument {
  const problems: Problem[] = [];
  const report = (at: Place, key: string, what: string, mend: string) => {
    problems.push({ file, line: at.line, column: at.column, key, what, mend });
  };
  const top = { line: 1, column: 1 };
  if (text.length > mostCharacters) {
    report(top, 'scenario', `the file has ${text.length} characters`, 'A scenario has at most 1,000,000');
    return { root: null, problems };
  }
  if (nestsTooDeeply(text)) {
    report(
      top,
      'syntax',
      'brackets, lists or sections are nested too deeply',
      'Close the brackets; a scenario needs six levels',
    );
    return { root: null, problems };
  }
  const lines = new LineCounter();
  const document = parseDocument(text, {
    lineCounter: lines,
    strict: true,
    uniqueKeys: true,
    version: '1.2',
    prettyErrors: false,
    stringKeys: true,
    logLevel: 'error',
  });
  const fatal = reportSyntax(document, text, lines, report);
  if (fatal) return { root: null, problems };
  const root = plant(document, lines, report);
  if (root && root.kind !== 'branch') {
    const squeezed = root.kind === 'leaf' ? squeezedColon(root.text) : null;
    if (squeezed) report(root.at, 'syntax', squeezed.what, squeezed.mend);
    else report(root.at, 'scenario', `the file is ${root.kind === 'list' ? 'a list' : 'a single value'}`, mendRoot);
  }
  if (!root && !problems.length) report(top, 'scenario', 'the file is empty', mendRoot);
  return { root: root?.kind === 'branch' ? root : null, problems };
}

const mendRoot = 'Write keys and values such as star:, orbit:, planet:; a starter comes from the command new';

/** The reader recurses: text that would exhaust its stack is refused before (a crash there cannot be caught). */
function nestsTooDeeply(text: string): boolean {
  let depth = 0;
  let deepest = 0;
  for (const sign of text) {
    if (sign === '[' || sign === '{') deepest = Math.max(deepest, ++depth);
    else if ((sign === ']' || sign === '}') && depth > 0) depth--;
  }
  if (deepest > mostBrackets) return true;
  return text.split('\n').some((line) => /^ */.exec(line)![0].length > mostIndent || /^\s*(?:[-?:]\s+){24}/.test(line));
}

type Report = (at: Place, key: string, what: string, mend: string) => void;

/** One problem a line: later ones on a line follow from the first. True when no tree can be had. */
function reportSyntax(document: Document, text: string, lines: LineCounter, report: Report): boolean {
  const seen = new Set<number>();
  let fatal = false;
  for (const error of [...document.errors, ...document.warnings].sort((a, b) => a.pos[0] - b.pos[0])) {
    const { what, mend, mild } = syntaxProblem(error.code, error.message, text, error.pos[0]);
    const at = place(lines, error.pos[0]);
    fatal ||= !mild;
    if (!seen.has(at.line)) report(at, 'syntax', what, mend);
    seen.add(at.line);
  }
  const version = document.directives?.yaml;
  if (version?.explicit && version.version !== '1.2') {
    report({ line: 1, column: 1 }, 'syntax', `the file asks for YAML ${version.version}`, 'Remove the %YAML line');
    return true;
  }
  return fatal;
}

function place(lines: LineCounter, offset: number): Place {
  const { line, col } = lines.linePos(offset);
  return { line: Math.max(line, 1), column: Math.max(col, 1) };
}

/** Thrown inside `plant` alone, to leave the recursion where going on makes no sense. */
class Unreadable extends Error {}

function plant(document: Document, lines: LineCounter, report: Report): Tree | null {
  const anchors = new Map<Alias, YamlNode | undefined>();
  let nodes = 0;

  const grow = (node: YamlNode | null, path: readonly string[], fallback: Place, depth: number): Tree => {
    const at = node?.range ? place(lines, node.range[0]) : fallback;
    const key = path.slice(0, 6).join('.') || 'scenario';
    if (depth > mostDepth || ++nodes > mostNodes) {
      report(at, key, 'the values are nested too deeply or repeat too often', 'Write each value where it is used');
      throw new Unreadable();
    }
    if (isAlias(node)) return grow(target(node, key, at), path, at, depth + 1);
    if (node?.tag?.startsWith('tag:'))
      report(at, key, `the tag ${shortTag(node.tag)} is not used here`, 'Delete the tag');
    if (isMap(node)) return branch(node.items as Pair<YamlNode, YamlNode | null>[], path, at, depth);
    if (isSeq(node)) {
      const items = node.items.map((item, i) => grow(item as YamlNode | null, [...path, String(i)], at, depth + 1));
      return { kind: 'list', at, path, items };
    }
    return leaf(node, path, at);
  };

  const target = (alias: Alias, key: string, at: Place): YamlNode => {
    if (!anchors.has(alias)) anchors.set(alias, alias.resolve(document) as YamlNode | undefined);
    const found = anchors.get(alias);
    if (found) return found;
    report(at, key, `*${alias.source} points to nothing`, `Write &${alias.source} before an earlier value`);
    throw new Unreadable();
  };

  const branch = (pairs: Pair<YamlNode, YamlNode | null>[], path: readonly string[], at: Place, depth: number) => {
    const entries = new Map<string, Entry>();
    for (const pair of pairs) {
      const name = isScalar(pair.key) ? String(pair.key.value) : String(pair.key);
      const keyAt = pair.key?.range ? place(lines, pair.key.range[0]) : at;
      const tree = grow(pair.value, [...path, name], keyAt, depth + 1);
      if (!entries.has(name)) entries.set(name, { keyAt, tree }); // a key that stands twice was told: the first counts
    }
    return { kind: 'branch', at, path, entries } as const;
  };

  try {
    return document.contents ? grow(document.contents as YamlNode, [], { line: 1, column: 1 }, 0) : null;
  } catch (error) {
    if (error instanceof Unreadable) return null;
    throw error;
  }
}

function leaf(node: YamlNode | null, path: readonly string[], at: Place): Leaf {
  const value = isScalar(node) ? node.value : null;
  const quoted = isScalar(node) && node.type !== undefined && node.type !== 'PLAIN';
  const known = typeof value === 'string' || typeof value === 'number' || typeof value === 'boolean' ? value : null;
  const text = isScalar(node) && !quoted && node.source !== undefined ? node.source : String(known ?? '');
  return { kind: 'leaf', at, path, value: known, text, quoted };
}

function shortTag(tag: string): string {
  return tag.replace('tag:yaml.org,2002:', '!!');
}
