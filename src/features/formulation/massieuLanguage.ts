/** The formulation language as the editor knows it: colours, brackets, completion, hover. */
import type * as Monaco from 'monaco-editor/editor/editor.api';
import { completionsAt, hoverAt, type Span } from '../../../shared/language/index.ts';

export const LANGUAGE = 'massieu';

const KEYWORDS =
  /\b(?:ensemble|species|extent|field|response|constant|parameter|between|and|list|let|order|saddle|factorials|molar|report|claim|as|for|in|sum|product|integral|from|to|cases|otherwise)\b/;

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
    autoClosingPairs: [
      { open: '(', close: ')' },
      { open: '[', close: ']' },
      { open: '{', close: '}' },
      { open: '"', close: '"', notIn: ['string', 'comment'] },
    ],
    wordPattern: /[A-Za-z\u0370-\u03ff][\w\u0370-\u03ff]*/,
  });
  monaco.languages.setMonarchTokensProvider(LANGUAGE, {
    tokenizer: {
      root: [
        [/#.*$/, 'comment'],
        [/"[^"]*"?/, 'text'],
        [/\[[^\]]*\]?/, 'unit'],
        [KEYWORDS, 'keyword'],
        [/[A-Za-z\u0370-\u03ff][\w\u0370-\u03ff]*/, ''],
      ],
    },
  });
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
