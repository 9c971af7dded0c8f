/** Opening a notebook in a group. */
import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import { createNotebookSchema } from '../../../shared/contracts/models.ts';
import { useCreateNotebook } from '../../api/index.ts';
import { ActButton, Dialog, Field, FormFault, TextField } from '../../components/index.ts';
import { showFaults } from '../formFaults.ts';
import { paths } from '../paths.ts';

export function NewNotebook({
  groupId,
  onClose,
}: {
  readonly groupId: string;
  readonly onClose: () => void;
}) {
  const create = useCreateNotebook(groupId);
  const navigate = useNavigate();
  const [formFault, setFormFault] = useState<string>();
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(createNotebookSchema),
    defaultValues: { title: '', introduction: '' },
  });
  const submit = handleSubmit(async (values) => {
    setFormFault(undefined);
    try {
      const notebook = await create.mutateAsync(values);
      await navigate(paths.notebook(notebook.id));
    } catch (fault) {
      setFormFault(showFaults(fault, ['title', 'introduction'], setError));
    }
  });
  return (
    <Dialog title="Open a notebook" onClose={onClose}>
      <form onSubmit={(event) => void submit(event)} noValidate>
        <FormFault>{formFault}</FormFault>
        <Field label="Title" fault={formState.errors.title?.message} {...register('title')} />
        <TextField
          label="Introduction"
          help="Which question it is to answer. Mathematics stands between dollar signs: $p V = N k T$."
          fault={formState.errors.introduction?.message}
          {...register('introduction')}
        />
        <ActButton type="submit" disabled={formState.isSubmitting}>
          Open the notebook
        </ActButton>
      </form>
    </Dialog>
  );
}
