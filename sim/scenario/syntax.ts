/** The YAML reader's complaints in the words of a user who is not a programmer. */
import type { ErrorCode } from 'yaml';

export interface SyntaxWords {
  readonly what: string;
  readonly mend: string;
  /** The rest of the file can still be read. */
  readonly mild?: boolean;
}

type Words = SyntaxWords | ((message: string, text: string, offset: number) => SyntaxWords);

const indent: SyntaxWords = {
  what: 'the indentation does not fit the lines above',
  mend: 'Start keys of one section in the same column',
};

const words: Partial<Record<ErrorCode, Words>> = {
  TAB_AS_INDENT: { what: 'a tab indents this line', mend: 'Indent with spaces' },
  DUPLICATE_KEY: (_message, text, offset) => ({
    what: `the key \`${keyAt(text, offset)}\` stands twice in the same section`,
    mend: 'Keep one of the two',
    mild: true,
  }),
  BAD_INDENT: (message) => {
    const bracket = /end with a ([\]}])/.exec(message)?.[1];
    return bracket
      ? { what: `a closing ${bracket} is missing`, mend: `Close what was opened with ${bracket}` }
      : indent;
  },
  MISSING_CHAR: missingCharacter,
  MULTILINE_IMPLICIT_KEY: (_message, text, offset) =>
    squeezedColon(lineAt(text, offset)) ?? {
      what: 'a key runs over several lines',
      mend: 'Write key: value on one line',
    },
  BLOCK_AS_IMPLICIT_KEY: (_message, text, offset) =>
    /:(\s|$)/.test(lineAt(text, offset))
      ? {
          what: 'a second colon stands on this line',
          mend: 'Give each key: value its own line, or put the text in quotes',
        }
      : {
          what: 'the next line is indented deeper than this one',
          mend: 'Start keys of one section in the same column',
        },
  BLOCK_IN_FLOW: {
    what: 'a comma or a closing bracket is missing inside { } or [ ]',
    mend: 'Separate the entries with commas, as in { warm: 0.3, ice: 0.6 }',
  },
  BAD_SCALAR_START: (_message, text, offset) => ({
    what: `a value cannot start with ${text[offset]}`,
    mend:
      text[offset] === '>'
        ? 'Write a range with both ends in place of a lower limit, or put a text in quotes'
        : 'Put the text in quotes',
  }),
  BAD_DQ_ESCAPE: { what: 'a backslash in a double-quoted text means nothing here', mend: "Use 'single quotes'" },
  MULTIPLE_DOCS: {
    what: 'the file holds several documents',
    mend: 'Keep one scenario a file, without --- or ... lines',
  },
  NON_STRING_KEY: { what: 'a key is a list or a section', mend: 'Write a plain word before the colon' },
  TAG_RESOLVE_FAILED: { what: 'a tag (a word with !) is not used here', mend: 'Delete the tag', mild: true },
  BAD_COLLECTION_TYPE: { what: 'a tag (a word with !) is not used here', mend: 'Delete the tag' },
  BAD_DIRECTIVE: { what: 'a line that starts with % is not used here', mend: 'Delete the line' },
  RESOURCE_EXHAUSTION: { what: 'the brackets are nested too deeply', mend: 'Close the brackets' },
  UNEXPECTED_TOKEN: unexpected,
};

const anythingElse: SyntaxWords = {
  what: 'this is neither YAML 1.2 nor JSON',
  mend: 'Write key: value, one a line',
};

/** What to tell a user for a reader's error at an offset of the text. */
export function syntaxProblem(code: ErrorCode, message: string, text: string, offset: number): SyntaxWords {
  const found = words[code] ?? anythingElse;
  return typeof found === 'function' ? found(message, text, offset) : found;
}

function missingCharacter(message: string, text: string, offset: number): SyntaxWords {
  if (/closing "/.test(message)) return { what: 'a closing " is missing', mend: 'Close the quoted text' };
  if (/closing '/.test(message)) return { what: "a closing ' is missing", mend: 'Close the quoted text' };
  const bracket = /Expected .*? end with ([\]}])/.exec(message)?.[1];
  if (bracket) return { what: `a closing ${bracket} is missing`, mend: `Close what was opened with ${bracket}` };
  if (/followed by map values/.test(message)) {
    const line = lineAt(text, offset);
    return squeezedColon(line) ?? { what: `\`${shorten(line)}\` has no colon`, mend: 'Write key: value' };
  }
  if (/Comments must be separated/.test(message)) {
    return { what: 'a # without a space before it', mend: 'Put a space before #, or quote the text' };
  }
  return { what: 'a comma, colon or space is missing', mend: 'Write { key: value, key: value } or [first, second]' };
}

function unexpected(message: string, text: string, offset: number): SyntaxWords {
  const sign = text[offset] ?? '';
  if (/block-seq-ind/.test(message)) {
    return { what: 'a list starts on the line of its key', mend: 'Put each "- item" on its own line, or write [a, b]' };
  }
  if (/flow-(map|seq)-end/.test(message)) {
    return { what: `${sign} closes nothing`, mend: `Delete ${sign}, or open the bracket before it` };
  }
  if (/Unexpected ,/.test(message)) return { what: 'a comma too many', mend: 'Delete the comma' };
  return anythingElse;
}

function lineAt(text: string, offset: number): string {
  return text.slice(offset).split(/\r?\n/, 1)[0]!.trim();
}

/** `key:value` without the space that YAML wants; null when the line is something else. */
export function squeezedColon(line: string): SyntaxWords | null {
  const parts = /^([\w$-]+):(\S.*)$/.exec(line);
  if (!parts) return null;
  return { what: `a space is missing after \`${parts[1]}:\``, mend: `Write \`${parts[1]}: ${shorten(parts[2]!)}\`` };
}

function keyAt(text: string, offset: number): string {
  return shorten(/^("[^"\n]*"|'[^'\n]*'|[^:\n]*)/.exec(text.slice(offset, offset + 200))?.[0].trim() ?? '');
}

/** A user's text for a message: one line, not too long. */
export function shorten(text: string, most = 40): string {
  const line = text.replace(/\s+/g, ' ').trim();
  return line.length > most ? `${line.slice(0, most - 1)}…` : line;
}
