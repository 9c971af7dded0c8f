/** Monaco with the formulation language, growing with its text, faults explained under their lines. */
import Editor from '@monaco-editor/react';
import type * as Monaco from 'monaco-editor/editor/editor.api';
import { useEffect, useRef, useState } from 'react';
import type { Diagnostic } from '../../../shared/language/diagnostic.ts';
import { applyEditorTheme, EDITOR_THEME } from './editorTheme.ts';
import { FaultZones } from './faultZones.ts';
import type { FormulationEditorProps } from './FormulationEditor.tsx';
import { LANGUAGE } from './massieuLanguage.ts';
import { monaco } from './monacoSetup.ts';

const OPTIONS: Monaco.editor.IStandaloneEditorConstructionOptions = {
  automaticLayout: true,
  minimap: { enabled: false },
  fontFamily: "'JetBrains Mono', monospace",
  fontSize: 15,
  lineHeight: 28,
  fontLigatures: "'liga' off, 'calt' off, 'zero' on",
  // Together 38 px, as wide as the numbers of quoted sources.
  lineNumbersMinChars: 2,
  lineDecorationsWidth: 20,
  glyphMargin: false,
  folding: false,
  renderLineHighlight: 'none',
  overviewRulerLanes: 0,
  overviewRulerBorder: false,
  hideCursorInOverviewRuler: true,
  scrollBeyondLastLine: false,
  wordWrap: 'on',
  wrappingIndent: 'indent',
  padding: { top: 4, bottom: 8 },
  scrollbar: { vertical: 'hidden', horizontal: 'auto', alwaysConsumeMouseWheel: false },
  guides: { indentation: false },
  occurrencesHighlight: 'singleFile',
  selectionHighlight: false,
  renderWhitespace: 'none',
  renderFinalNewline: 'on',
  contextmenu: false,
  tabSize: 2,
  fixedOverflowWidgets: true,
  // The language itself knows its names and refuses characters that it does not know.
  unicodeHighlight: { ambiguousCharacters: false, invisibleCharacters: false },
  wordBasedSuggestions: 'off',
  links: false,
  suggest: { showIcons: false, showStatusBar: false },
  // Enter ends a line, whatever is suggested; Tab takes a suggestion.
  acceptSuggestionOnEnter: 'off',
  hover: { delay: 250 },
  ariaLabel: 'Formulation. Press Control M to let Tab move on.',
  accessibilitySupport: 'auto',
};

const FEWEST_LINES = 8;

export default function RichEditor({
  source,
  diagnostics,
  isReadOnly,
  onChange,
}: FormulationEditorProps) {
  const editor = useRef<Monaco.editor.IStandaloneCodeEditor>(null);
  const zones = useRef<FaultZones>(null);
  const washed = useRef<Monaco.editor.IEditorDecorationsCollection>(null);
  const [height, setHeight] = useState(FEWEST_LINES * 28);

  useEffect(() => {
    applyEditorTheme(monaco);
    const observer = new MutationObserver(() => applyEditorTheme(monaco));
    observer.observe(document.documentElement, { attributeFilter: ['data-theme'] });
    return () => observer.disconnect();
  }, []);

  const show = (found: readonly Diagnostic[]): void => {
    const model = editor.current?.getModel();
    if (!model) return;
    monaco.editor.setModelMarkers(
      model,
      LANGUAGE,
      found.map((one) => markerOf(model, one)),
    );
    const faults = found.filter(({ severity }) => severity === 'error');
    washed.current?.set(
      [...new Set(faults.map(({ line }) => line))].map((line) => ({
        range: new monaco.Range(line, 1, line, 1),
        options: { isWholeLine: true, className: 'fault-line', marginClassName: 'fault-margin' },
      })),
    );
    zones.current?.show(faults);
  };
  useEffect(() => show(diagnostics), [diagnostics]);

  return (
    <div data-editor>
      <Editor
        height={height}
        language={LANGUAGE}
        theme={EDITOR_THEME}
        value={source}
        loading={null}
        options={{ ...OPTIONS, readOnly: isReadOnly }}
        onChange={(text) => onChange(text ?? '')}
        onMount={(mounted) => {
          editor.current = mounted;
          zones.current = new FaultZones(mounted);
          washed.current = mounted.createDecorationsCollection();
          const fit = (): void =>
            setHeight(Math.max(FEWEST_LINES * 28, Math.ceil(mounted.getContentHeight())));
          mounted.onDidContentSizeChange(fit);
          fit();
          applyEditorTheme(monaco);
          show(diagnostics);
        }}
      />
    </div>
  );
}

function markerOf(model: Monaco.editor.ITextModel, one: Diagnostic): Monaco.editor.IMarkerData {
  const start = model.getPositionAt(one.span.start);
  const end = model.getPositionAt(Math.max(one.span.end, one.span.start + 1));
  return {
    severity:
      one.severity === 'error'
        ? monaco.MarkerSeverity.Error
        : one.severity === 'warning'
          ? monaco.MarkerSeverity.Warning
          : monaco.MarkerSeverity.Info,
    message: one.hint === '' ? one.message : `${one.message} ${one.hint}`,
    startLineNumber: start.lineNumber,
    startColumn: start.column,
    endLineNumber: end.lineNumber,
    endColumn: end.column,
  };
}
