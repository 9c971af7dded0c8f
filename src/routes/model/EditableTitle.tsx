/** The title of a model, which those who may edit it can change where it stands. */
import { useEffect, useRef, useState } from 'react';
import { renameModelSchema } from '../../../shared/contracts/models.ts';
import type { Model } from '../../../shared/contracts/models.ts';
import { describeFault, useRenameModel } from '../../api/index.ts';
import { TextButton, say } from '../../components/index.ts';

export function EditableTitle({ model }: { readonly model: Model }) {
  const [edited, setEdited] = useState<string>();
  const [fault, setFault] = useState<string>();
  const opener = useRef<HTMLButtonElement>(null);
  const field = useRef<HTMLInputElement>(null);
  const rename = useRenameModel(model.id);
  const isEditing = edited !== undefined;
  useEffect(() => {
    if (isEditing) field.current?.select();
  }, [isEditing]);

  const close = () => {
    setEdited(undefined);
    setFault(undefined);
    requestAnimationFrame(() => opener.current?.focus());
  };
  const save = () => {
    const parsed = renameModelSchema.safeParse({ title: edited });
    if (!parsed.success) {
      setFault(parsed.error.issues[0]?.message ?? 'Write a title.');
      return;
    }
    if (parsed.data.title === model.title) {
      close();
      return;
    }
    rename.mutate(parsed.data.title, {
      onSuccess: () => {
        close();
        say('The title is changed.', () =>
          rename.mutate(model.title, { onError: (problem) => say(describeFault(problem)) }),
        );
      },
      onError: (problem) => setFault(describeFault(problem)),
    });
  };

  if (!model.mayEdit) return model.title;
  if (edited === undefined) {
    return (
      <>
        {model.title}{' '}
        <TextButton
          ref={opener}
          aria-label="Change the title"
          className="align-middle tracking-normal"
          onClick={() => setEdited(model.title)}
        >
          change
        </TextButton>
      </>
    );
  }
  return (
    <span className="block">
      <input
        ref={field}
        aria-label="Title of the model"
        aria-invalid={fault ? true : undefined}
        aria-describedby={fault ? 'title-fault' : undefined}
        value={edited}
        maxLength={200}
        onChange={(event) => setEdited(event.target.value)}
        onKeyDown={(event) => {
          if (event.key === 'Enter') save();
          if (event.key === 'Escape') close();
        }}
        className="border-ink-3 text-heading text-ink desk:text-title block w-full max-w-[760px] border-b bg-transparent py-4 font-serif font-[480]"
      />
      <span className="mt-4 flex flex-wrap items-baseline gap-10 tracking-normal">
        <TextButton onClick={save} disabled={rename.isPending}>
          Save the title
        </TextButton>
        <TextButton onClick={close}>Leave it as it was</TextButton>
        {fault && (
          <span id="title-fault" role="alert" className="text-note text-cinnabar font-serif">
            {fault}
          </span>
        )}
      </span>
    </span>
  );
}
