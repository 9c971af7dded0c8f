/** Freezing the draft as the next version, with a word on why. */
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { Model } from '../../../shared/contracts/models.ts';
import { describeFault, useFreeze } from '../../api/index.ts';
import { ActButton, Dialog, say } from '../../components/index.ts';
import type { DraftKeeper } from './draftKeeper.ts';

interface FreezeDialogProps {
  readonly model: Model;
  readonly number: number;
  readonly keeper: DraftKeeper;
  readonly onClose: () => void;
}

export function FreezeDialog({ model, number, keeper, onClose }: FreezeDialogProps) {
  const [note, setNote] = useState('');
  const [fault, setFault] = useState<string>();
  const freeze = useFreeze(model.id);
  const navigate = useNavigate();

  const submit = async (): Promise<void> => {
    setFault(undefined);
    const { status, revision } = await keeper.flush();
    if (status.kind !== 'saved') {
      setFault(
        'The draft could not be saved, so it cannot be frozen yet. Close this and look at the words above the text.',
      );
      return;
    }
    try {
      const version = await freeze.mutateAsync({ revision, note });
      onClose();
      say(`Version ${version.number} is frozen and is being derived.`);
      void navigate(`/models/${model.id}/properties?version=${version.number}`);
    } catch (problem) {
      setFault(describeFault(problem));
    }
  };

  return (
    <Dialog title={`Freeze as version ${number}`} onClose={onClose}>
      <form
        onSubmit={(event) => {
          event.preventDefault();
          void submit();
        }}
      >
        <p className="text-note text-ink-2">
          A version never changes again. It gets a number and a checksum, and every property is
          derived and verified beside it. You go on writing in the draft.
        </p>
        <label className="text-label text-ink-3 mt-14 block font-mono">
          What is new in it (may be left empty)
          <input
            value={note}
            maxLength={500}
            onChange={(event) => setNote(event.target.value)}
            className="border-ink-3 text-ink mt-4 block w-full border-b bg-transparent py-6"
          />
        </label>
        {fault !== undefined && (
          <p role="alert" className="text-note text-cinnabar mt-10">
            {fault}
          </p>
        )}
        <div className="mt-22">
          <ActButton type="submit" disabled={freeze.isPending}>
            {freeze.isPending ? 'Freezing' : `Freeze as version ${number}`}
          </ActButton>
        </div>
      </form>
    </Dialog>
  );
}
