/** The editor in the colours of the page, read from its tokens so that they stand in one place. */
import type * as Monaco from 'monaco-editor/editor/editor.api';

const SHADES = [
  'sheet',
  'ink',
  'ink-2',
  'ink-3',
  'rule',
  'hair',
  'verdigris',
  'cinnabar',
  'ochre',
  'ultramarine',
  'ultramarine-wash',
  'verdigris-wash',
] as const;

export const EDITOR_THEME = 'massieu';

/** Defines and applies the theme anew; call it when the page's theme has changed. */
export function applyEditorTheme(monaco: typeof Monaco): void {
  const style = getComputedStyle(document.documentElement);
  const colour = Object.fromEntries(
    SHADES.map((name) => [name, style.getPropertyValue(`--${name}`).trim()]),
  ) as Record<(typeof SHADES)[number], string>;
  const isDark = document.documentElement.dataset['theme'] === 'dark';
  const plain = (name: (typeof SHADES)[number]): string => colour[name].replace('#', '');
  monaco.editor.defineTheme(EDITOR_THEME, {
    base: isDark ? 'vs-dark' : 'vs',
    inherit: false,
    rules: [
      { token: '', foreground: plain('ink'), background: plain('sheet') },
      // The style sheet makes this weight 500, which the editor has no name for.
      { token: 'keyword', foreground: plain('verdigris'), fontStyle: 'bold' },
      { token: 'unit', foreground: plain('ochre') },
      { token: 'text', foreground: plain('ink-3'), fontStyle: 'italic' },
      { token: 'comment', foreground: plain('ink-3'), fontStyle: 'italic' },
    ],
    colors: {
      'editor.background': colour.sheet,
      'editor.foreground': colour.ink,
      'editorLineNumber.foreground': colour['ink-3'],
      'editorLineNumber.activeForeground': colour['ink-2'],
      'editor.selectionBackground': colour['ultramarine-wash'],
      'editor.inactiveSelectionBackground': colour['ultramarine-wash'],
      'editor.wordHighlightBackground': colour['verdigris-wash'],
      'editorCursor.foreground': colour.ink,
      'editorBracketMatch.background': colour['verdigris-wash'],
      'editorBracketMatch.border': colour.verdigris,
      'editorError.foreground': colour.cinnabar,
      'editorWarning.foreground': colour.ochre,
      'editorWidget.background': colour.sheet,
      'editorWidget.foreground': colour.ink,
      'editorWidget.border': colour.rule,
      'editorSuggestWidget.background': colour.sheet,
      'editorSuggestWidget.border': colour.rule,
      'editorSuggestWidget.foreground': colour.ink,
      'editorSuggestWidget.highlightForeground': colour.ultramarine,
      'editorSuggestWidget.selectedBackground': colour['ultramarine-wash'],
      'editorSuggestWidget.selectedForeground': colour.ink,
      'editorSuggestWidget.focusHighlightForeground': colour.ultramarine,
      'editorHoverWidget.background': colour.sheet,
      'editorHoverWidget.foreground': colour.ink,
      'editorHoverWidget.border': colour.rule,
      'input.background': colour.sheet,
      'input.foreground': colour.ink,
      'input.border': colour['ink-3'],
      focusBorder: colour.ultramarine,
      'scrollbarSlider.background': colour.rule,
      'widget.shadow': `${colour.sheet}00`,
    },
  });
  monaco.editor.setTheme(EDITOR_THEME);
}
