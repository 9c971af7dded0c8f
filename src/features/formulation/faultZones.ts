/**
 * Explanations of faults in the flow, under the line at fault, with buttons for the repairs. A zone
 * of the editor makes the room; what is read and pressed lies above it, since zones take no focus.
 */
import type * as Monaco from 'monaco-editor/editor/editor.api';
import type { Diagnostic } from '../../../shared/language/diagnostic.ts';

interface Shown {
  readonly zoneId: string;
  readonly widget: Monaco.editor.IOverlayWidget;
}

/** As many explanations as can be read at once; the margin counts the rest. */
const MOST_SHOWN = 4;

export class FaultZones {
  readonly #editor: Monaco.editor.IStandaloneCodeEditor;
  #shown: Shown[] = [];
  #key = '';
  #serial = 0;

  constructor(editor: Monaco.editor.IStandaloneCodeEditor) {
    this.#editor = editor;
  }

  show(faults: readonly Diagnostic[]): void {
    const first = firstOfEachLine(faults).slice(0, MOST_SHOWN);
    const key = JSON.stringify(first);
    if (key === this.#key) return;
    this.#key = key;
    const elements = first.map((fault) => ({ fault, element: this.#explain(fault) }));
    this.#editor.changeViewZones((zones) => {
      for (const { zoneId, widget } of this.#shown) {
        zones.removeZone(zoneId);
        this.#editor.removeOverlayWidget(widget);
      }
      this.#shown = elements.map(({ fault, element }) => this.#place(zones, fault, element));
    });
  }

  #place(
    zones: Monaco.editor.IViewZoneChangeAccessor,
    fault: Diagnostic,
    element: HTMLElement,
  ): Shown {
    const id = `massieu.fault.${this.#serial++}`;
    const { contentLeft, contentWidth } = this.#editor.getLayoutInfo();
    element.style.left = `${contentLeft}px`;
    element.style.width = `${contentWidth - 12}px`;
    const widget: Monaco.editor.IOverlayWidget = {
      getId: () => id,
      getDomNode: () => element,
      getPosition: () => null,
    };
    this.#editor.addOverlayWidget(widget);
    const zoneId = zones.addZone({
      afterLineNumber: fault.line,
      heightInPx: element.offsetHeight + 8,
      domNode: document.createElement('div'),
      onDomNodeTop: (top) => {
        element.style.top = `${top + 2}px`;
      },
    });
    return { zoneId, widget };
  }

  #explain(fault: Diagnostic): HTMLElement {
    const element = document.createElement('div');
    element.className = 'fault-explanation';
    element.setAttribute('role', 'note');
    // The first clause says what is wrong, the rest why; repairs say what a hint would.
    const clause = /^[^,]{12,}?(?=, but )/.exec(fault.message)?.[0] ?? fault.message;
    const message = document.createElement('b');
    message.textContent = clause;
    element.append(message, fault.message.slice(clause.length));
    if (fault.hint !== '' && fault.repairs.length === 0) element.append(` ${fault.hint}`);
    for (const repair of fault.repairs) {
      const button = document.createElement('button');
      button.type = 'button';
      button.textContent = repair.title;
      button.addEventListener('click', () => this.#apply(repair));
      element.append(' ', button);
    }
    return element;
  }

  #apply(repair: Diagnostic['repairs'][number]): void {
    const model = this.#editor.getModel();
    if (!model) return;
    this.#editor.pushUndoStop();
    this.#editor.executeEdits(
      'repair',
      repair.edits.map(({ span, text }) => {
        const start = model.getPositionAt(span.start);
        const end = model.getPositionAt(span.end);
        return {
          range: {
            startLineNumber: start.lineNumber,
            startColumn: start.column,
            endLineNumber: end.lineNumber,
            endColumn: end.column,
          },
          text,
        };
      }),
    );
    this.#editor.pushUndoStop();
    this.#editor.focus();
  }
}

function firstOfEachLine(faults: readonly Diagnostic[]): Diagnostic[] {
  const byLine = new Map<number, Diagnostic>();
  for (const fault of faults) if (!byLine.has(fault.line)) byLine.set(fault.line, fault);
  return [...byLine.values()];
}
