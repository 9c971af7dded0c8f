/**
 * The editor of the front door: a plain text field under a coloured copy of its text. The copy
 * wraps exactly as the field does, since both have the same face, size and padding.
 */
import type { Diagnostic } from '../../../shared/language/diagnostic.ts';
import { Fragment } from 'react';
import { classes } from '../../components/classes.ts';
import { sourceLines } from '../../components/sourceParts.ts';
import { TextButton } from '../../components/Button.tsx';
import { markFaults } from './markFaults.ts';

interface SpecimenEditorProps {
  readonly source: string;
  readonly diagnostics: readonly Diagnostic[];
  readonly onChange: (source: string) => void;
}

const TEXT =
  'pl-26 font-mono text-[14px] leading-[1.85] break-words whitespace-pre-wrap desk:pl-38 desk:text-[15px]';

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

export function SpecimenEditor({ source, diagnostics, onChange }: SpecimenEditorProps) {
  const lines = markFaults(sourceLines(source), diagnostics);
  const faults = diagnostics.filter(({ severity }) => severity !== 'information');
  const faultyLines = new Set(
    diagnostics.filter(({ severity }) => severity === 'error').map(({ line }) => line),
  );
  return (
    <div>
      <div className="relative">
        <textarea
          aria-label="Formulation"
          aria-describedby="specimen-faults"
          spellCheck={false}
          autoCapitalize="off"
          autoComplete="off"
          autoCorrect="off"
          value={source}
          onChange={(event) => onChange(event.target.value)}
          className={classes(
            TEXT,
            'caret-ink absolute inset-0 h-full w-full resize-none overflow-hidden bg-transparent text-transparent -outline-offset-2',
          )}
        />
        <div aria-hidden="true" className="text-ink pointer-events-none relative">
          {lines.map((parts, index) => (
            <div
              key={index}
              className={classes(TEXT, 'relative', faultyLines.has(index + 1) && 'fault-line')}
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
      <ul id="specimen-faults" aria-live="polite" className="mt-8">
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
            {fault.repairs.map((repair) => (
              <TextButton
                key={repair.title}
                onClick={() => onChange(mend(source, repair))}
                className="border-cinnabar text-cinnabar ml-8 border no-underline"
              >
                {repair.title}
              </TextButton>
            ))}
          </li>
        ))}
      </ul>
    </div>
  );
}
