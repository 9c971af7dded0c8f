/** Asking for a link by which to set another password. */
import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { Link } from 'react-router-dom';
import { passwordResetRequestSchema } from '../../../shared/contracts/people.ts';
import { useRequestPasswordReset } from '../../api/index.ts';
import { ActButton } from '../../components/Button.tsx';
import { Field, FormFault } from '../../components/Field.tsx';
import { paths } from '../paths.ts';
import { showFaults } from '../formFaults.ts';
import { SignInPage } from './SignInPage.tsx';

export function Component() {
  const requestReset = useRequestPasswordReset();
  const [formFault, setFormFault] = useState<string>();
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(passwordResetRequestSchema),
    defaultValues: { email: '' },
  });

  const submit = handleSubmit(async ({ email }) => {
    setFormFault(undefined);
    try {
      await requestReset.mutateAsync(email);
    } catch (fault) {
      setFormFault(showFaults(fault, ['email'], setError));
    }
  });

  if (requestReset.isSuccess) {
    return (
      <SignInPage title="Look into your mail">
        <p role="status" className="text-body text-ink-2">
          If somebody is registered with that address, a link by which to set another password is on
          its way to it.
        </p>
        <p className="text-note mt-18">
          <Link to={paths.signIn}>Back to signing in</Link>
        </p>
      </SignInPage>
    );
  }
  return (
    <SignInPage title="Forgotten password">
      <form onSubmit={(event) => void submit(event)} noValidate>
        <FormFault>{formFault}</FormFault>
        <Field
          label="E-mail"
          type="email"
          autoComplete="email"
          help="The address with which you registered."
          fault={formState.errors.email?.message}
          {...register('email')}
        />
        <ActButton type="submit" disabled={formState.isSubmitting}>
          Send the link
        </ActButton>
      </form>
      <p className="text-note mt-18">
        <Link to={paths.signIn}>Back to signing in</Link>
      </p>
    </SignInPage>
  );
}
