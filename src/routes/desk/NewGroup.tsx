/** Opening a group of one's own. */
import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import { createGroupSchema } from '../../../shared/contracts/models.ts';
import { useCreateGroup } from '../../api/index.ts';
import {
  ActButton,
  Dialog,
  Field,
  FormFault,
  QuietButton,
  TextField,
} from '../../components/index.ts';
import { paths } from '../paths.ts';
import { showFaults } from '../formFaults.ts';

export function NewGroup() {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <QuietButton onClick={() => setOpen(true)}>Open a group</QuietButton>
      {isOpen && <NewGroupDialog onClose={() => setOpen(false)} />}
    </>
  );
}

function NewGroupDialog({ onClose }: { readonly onClose: () => void }) {
  const createGroup = useCreateGroup();
  const navigate = useNavigate();
  const [formFault, setFormFault] = useState<string>();
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(createGroupSchema),
    defaultValues: { name: '', about: '' },
  });
  const submit = handleSubmit(async (values) => {
    setFormFault(undefined);
    try {
      const group = await createGroup.mutateAsync(values);
      await navigate(paths.group(group.id));
    } catch (fault) {
      setFormFault(showFaults(fault, ['name', 'about'], setError));
    }
  });
  return (
    <Dialog title="Open a group" onClose={onClose}>
      <form onSubmit={(event) => void submit(event)} noValidate>
        <FormFault>{formFault}</FormFault>
        <Field label="Name" fault={formState.errors.name?.message} {...register('name')} />
        <TextField
          label="What the group works on"
          fault={formState.errors.about?.message}
          {...register('about')}
        />
        <ActButton type="submit" disabled={formState.isSubmitting}>
          Open the group
        </ActButton>
      </form>
    </Dialog>
  );
}
