/** Beginning a model in a notebook: from a blank sheet or from the specimen. */
import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import { renameModelSchema } from '../../../shared/contracts/models.ts';
import { useCreateModel } from '../../api/index.ts';
import { ActButton, Dialog, Field, FormFault, Segmented } from '../../components/index.ts';
import { showFaults } from '../formFaults.ts';
import { paths } from '../paths.ts';
import { SPECIMEN } from '../front/specimenSource.ts';

const BEGINNINGS = [
  { value: 'blank', label: 'a blank sheet' },
  { value: 'specimen', label: 'a hard core with attraction' },
] as const;
type Beginning = (typeof BEGINNINGS)[number]['value'];

function sourceOf(beginning: Beginning, title: string): string {
  if (beginning === 'specimen') return `# ${title}\n${SPECIMEN}\n`;
  return `# ${title}\nensemble canonical\n\n`;
}

export function NewModel({
  notebookId,
  onClose,
}: {
  readonly notebookId: string;
  readonly onClose: () => void;
}) {
  const create = useCreateModel(notebookId);
  const navigate = useNavigate();
  const [beginning, setBeginning] = useState<Beginning>('blank');
  const [formFault, setFormFault] = useState<string>();
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(renameModelSchema),
    defaultValues: { title: '' },
  });
  const submit = handleSubmit(async ({ title }) => {
    setFormFault(undefined);
    try {
      const model = await create.mutateAsync({ title, source: sourceOf(beginning, title) });
      await navigate(paths.model(model.id));
    } catch (fault) {
      setFormFault(showFaults(fault, ['title'], setError));
    }
  });
  return (
    <Dialog title="Begin a model" onClose={onClose}>
      <form onSubmit={(event) => void submit(event)} noValidate>
        <FormFault>{formFault}</FormFault>
        <Field label="Title" fault={formState.errors.title?.message} {...register('title')} />
        <p className="text-label text-ink-2 mb-4 font-mono">Begin from</p>
        <div className="mb-18">
          <Segmented
            label="Begin from"
            options={BEGINNINGS}
            value={beginning}
            onChange={setBeginning}
          />
        </div>
        <ActButton type="submit" disabled={formState.isSubmitting}>
          Begin the model
        </ActButton>
      </form>
    </Dialog>
  );
}
