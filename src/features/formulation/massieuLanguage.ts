/** The formulation language as the editor knows it: colours, brackets, completion, hover. */
import type * as Monaco from 'monaco-editor/editor/editor.api';
import { asciiName } from '../../../shared/language/greek.ts';
import { completionsAt, hoverAt, tokensOf, type Span } from '../../../shared/language/index.ts';

export const LANGUAGE = 'massieu';

let isRegistered = false;

/** Registers the language once. */
export function registerLanguage(monaco: typeof Monaco): void {
  if (isRegistered) return;
  isRegistered = true;
  monaco.languages.register({ id: LANGUAGE });
  monaco.languages.setLanguageConfiguration(LANGUAGE, {
    comments: { lineComment: '#' },
    brackets: [
      ['(', ')'],
      ['[', ']'],
      ['{', '}'],
    ],
    // A colour means something; brackets that match are shown where the cursor is.
    colorizedBracketPairs: [],
    autoClosingPairs: [
      { open: '(', close: ')' },
      { open: '[', close: ']' },
      { open: '{', close: '}' },
      { open: '"', close: '"', notIn: ['string', 'comment'] },
    ],
    wordPattern: /[A-Za-z\u0370-\u03ff][\w\u0370-\u03ff]*/,
  });
  monaco.languages.setTokensProvider(LANGUAGE, tokensProvider);
  monaco.languages.registerCompletionItemProvider(LANGUAGE, {
    triggerCharacters: ['['],
    provideCompletionItems(model, position) {
      const source = model.getValue();
      const offset = model.getOffsetAt(position);
      const completions = completionsAt(source, offset);
      return {
        suggestions: completions.map(({ label, text, span, kind, detail, description }) => ({
          label: { label, description: detail },
          insertText: text,
          kind: KINDS[kind]?.(monaco) ?? monaco.languages.CompletionItemKind.Text,
          documentation: description,
          range: rangeOf(model, span),
        })),
      };
    },
  });
  monaco.languages.registerDocumentHighlightProvider(LANGUAGE, {
    provideDocumentHighlights(model, position) {
      const source = model.getValue();
      return placesOf(source, model.getOffsetAt(position)).map((span) => ({
        range: rangeOf(model, span),
      }));
    },
  });
  monaco.languages.registerHoverProvider(LANGUAGE, {
    provideHover(model, position) {
      const found = hoverAt(model.getValue(), model.getOffsetAt(position));
      if (!found) return null;
      return {
        range: rangeOf(model, found.span),
        // Plain text: what an author wrote must not be read as Markdown.
        contents: [found.title, ...found.lines].map((line) => ({
          value: escapeMarkdown(line),
          isTrusted: false,
        })),
      };
    },
  });
}

/** Nothing carries over from one line to the next: texts, units and remarks end with their line. */
const NO_STATE: Monaco.languages.IState = { clone: () => NO_STATE, equals: () => true };

const tokensProvider: Monaco.languages.TokensProvider = {
  getInitialState: () => NO_STATE,
  tokenize(line) {
    const tokens: Monaco.languages.IToken[] = [];
    let end = 0;
    for (const { kind, span } of tokensOf(line)) {
      if (span.start > end) tokens.push({ startIndex: end, scopes: '' });
      tokens.push({ startIndex: span.start, scopes: COLOURED.has(kind) ? kind : '' });
      end = span.end;
    }
    if (end < line.length) tokens.push({ startIndex: end, scopes: '' });
    return { tokens, endState: NO_STATE };
  },
};

/** Where the name at an offset stands in the source, whichever way its Greek is typed. */
export function placesOf(source: string, offset: number): Span[] {
  const names = tokensOf(source).filter(({ kind }) => kind === 'name');
  const spelling = ({ start, end }: Span): string => asciiName(source.slice(start, end));
  const here = names.find(({ span }) => span.start <= offset && offset <= span.end);
  if (!here) return [];
  const wanted = spelling(here.span);
  return names.map(({ span }) => span).filter((span) => spelling(span) === wanted);
}

const COLOURED: ReadonlySet<string> = new Set(['keyword', 'unit', 'text', 'comment']);

function rangeOf(model: Monaco.editor.ITextModel, span: Span): Monaco.IRange {
  const start = model.getPositionAt(span.start);
  const end = model.getPositionAt(span.end);
  return {
    startLineNumber: start.lineNumber,
    startColumn: start.column,
    endLineNumber: end.lineNumber,
    endColumn: end.column,
  };
}

const KINDS: Readonly<
  Record<string, (monaco: typeof Monaco) => Monaco.languages.CompletionItemKind>
> = {
  statement: (monaco) => monaco.languages.CompletionItemKind.Keyword,
  function: (monaco) => monaco.languages.CompletionItemKind.Function,
  unit: (monaco) => monaco.languages.CompletionItemKind.Unit,
  name: (monaco) => monaco.languages.CompletionItemKind.Variable,
  keyword: (monaco) => monaco.languages.CompletionItemKind.Keyword,
};

function escapeMarkdown(text: string): string {
  return text.replace(/[\\`*_{}[\]<>()#+\-.!|~]/g, '\\$&');
}
