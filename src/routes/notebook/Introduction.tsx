/** The introduction of a notebook, which those who may write can change where it stands. */
import { useState } from 'react';
import { describeFault, useUpdateNotebook } from '../../api/index.ts';
import { ActButton, Prose, QuietButton, TextField, say } from '../../components/index.ts';

interface IntroductionProps {
  readonly notebookId: string;
  readonly text: string;
  readonly mayWrite: boolean;
}

export function Introduction({ notebookId, text, mayWrite }: IntroductionProps) {
  const [edited, setEdited] = useState<string>();
  const update = useUpdateNotebook(notebookId);

  if (edited === undefined) {
    return (
      <section aria-label="Introduction" className="mb-22">
        {text.trim() === '' ? (
          <p className="text-note text-ink-3">No introduction has been written yet.</p>
        ) : (
          <Prose>{text}</Prose>
        )}
        {mayWrite && (
          <QuietButton className="mt-8" onClick={() => setEdited(text)}>
            {text.trim() === '' ? 'Write the introduction' : 'Change the introduction'}
          </QuietButton>
        )}
      </section>
    );
  }

  const save = () =>
    update.mutate(
      { introduction: edited },
      {
        onSuccess: () => {
          setEdited(undefined);
          say('The introduction is saved.', () =>
            update.mutate(
              { introduction: text },
              { onError: (fault) => say(describeFault(fault)) },
            ),
          );
        },
      },
    );
  return (
    <section aria-label="Introduction" className="mb-22">
      <TextField
        label="Introduction"
        help="Paragraphs, ## headings and - lists; mathematics between dollar signs, $p V = N k T$, on a line of its own between two."
        fault={update.error ? describeFault(update.error) : undefined}
        value={edited}
        onChange={(event) => setEdited(event.target.value)}
        className="min-h-[260px]"
      />
      <div className="flex gap-10">
        <ActButton onClick={save} disabled={update.isPending}>
          Save the introduction
        </ActButton>
        <QuietButton onClick={() => setEdited(undefined)}>Leave it as it was</QuietButton>
      </div>
    </section>
  );
}
