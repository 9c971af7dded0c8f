/**
 * The editor of the front door and of narrow screens: a plain text field under a coloured copy of its text. The copy
 * wraps exactly as the field does, since both have the same face, size and padding.
 */
import type { Diagnostic } from '../../../shared/language/diagnostic.ts';
import { Fragment } from 'react';
import { classes } from '../../components/classes.ts';
import { sourceLines } from '../../components/sourceParts.ts';
import { markFaults } from './markFaults.ts';

interface SpecimenEditorProps {
  readonly source: string;
  readonly diagnostics: readonly Diagnostic[];
  readonly isReadOnly?: boolean;
  readonly onChange: (source: string) => void;
}

/** What decides where a line wraps; the two paddings below differ by the room for the focus ring. */
const TEXT =
  'font-mono text-[14px] leading-[1.85] break-words whitespace-pre-wrap desk:text-[15px]';

/** The source with the edits of a repair made. */
function mend(source: string, repair: Diagnostic['repairs'][number]): string {
  return [...repair.edits]
    .sort((a, b) => b.span.start - a.span.start)
    .reduce(
      (text, { span, text: replacement }) =>
        text.slice(0, span.start) + replacement + text.slice(span.end),
      source,
    );
}

export function SpecimenEditor({
  source,
  diagnostics,
  isReadOnly = false,
  onChange,
}: SpecimenEditorProps) {
  const lines = markFaults(sourceLines(source), diagnostics);
  const faults = diagnostics.filter(({ severity }) => severity !== 'information');
  const faultyLines = new Set(
    diagnostics.filter(({ severity }) => severity === 'error').map(({ line }) => line),
  );
  return (
    <div>
      <div className="relative">
        <div className="absolute -inset-x-8 -inset-y-6">
          <textarea
            aria-label="Formulation"
            aria-describedby="specimen-faults"
            spellCheck={false}
            readOnly={isReadOnly}
            autoCapitalize="off"
            autoComplete="off"
            autoCorrect="off"
            value={source}
            onChange={(event) => onChange(event.target.value)}
            className={classes(
              TEXT,
              'caret-ink desk:pl-46 h-full w-full resize-none overflow-hidden rounded bg-transparent py-6 pr-8 pl-34 text-transparent',
            )}
          />
        </div>
        <div aria-hidden="true" className="text-ink pointer-events-none relative">
          {lines.map((parts, index) => (
            <div
              key={index}
              className={classes(
                TEXT,
                'desk:pl-38 relative pl-26',
                faultyLines.has(index + 1) && 'fault-line',
              )}
            >
              <span className="text-label text-ink-3 absolute left-0 leading-[2.1]">
                {index + 1}
              </span>
              {parts.map((part, at) =>
                part.kind === 'plain' && !part.mark ? (
                  <Fragment key={at}>{part.text}</Fragment>
                ) : (
                  <span
                    key={at}
                    className={classes(
                      part.kind !== 'plain' && `source-${part.kind}`,
                      part.mark && `source-${part.mark}`,
                    )}
                  >
                    {part.text}
                  </span>
                ),
              )}
              {/* An empty line keeps its height. */}
              {'\u200b'}
            </div>
          ))}
        </div>
      </div>
      <ul id="specimen-faults" aria-live="polite" className="mt-14">
        {faults.slice(0, 3).map((fault) => (
          <li
            key={`${fault.code}${fault.span.start}`}
            className={classes(
              'text-note my-6 px-12 py-6',
              fault.severity === 'error'
                ? 'bg-cinnabar-wash text-ink'
                : 'border-ochre text-ink-2 border-l-2',
            )}
          >
            <b className={fault.severity === 'error' ? 'text-cinnabar' : 'text-ochre'}>
              Line {fault.line}.
            </b>{' '}
            {fault.message} {fault.hint}
            {(isReadOnly ? [] : fault.repairs).map((repair) => (
              <button
                key={repair.title}
                type="button"
                onClick={() => onChange(mend(source, repair))}
                className="border-cinnabar text-label text-cinnabar ml-8 min-h-28 rounded border px-8"
              >
                {repair.title}
              </button>
            ))}
          </li>
        ))}
      </ul>
    </div>
  );
}
