/** Where the link of the mail leads by which another password is set. */
import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { Link, useSearchParams } from 'react-router-dom';
import { passwordResetSchema } from '../../../shared/contracts/people.ts';
import { isProblem, useResetPassword } from '../../api/index.ts';
import { ActButton, ActLink } from '../../components/Button.tsx';
import { Field, FormFault } from '../../components/Field.tsx';
import { paths } from '../paths.ts';
import { showFaults } from '../formFaults.ts';
import { SignInPage } from './SignInPage.tsx';

export function Component() {
  const [search] = useSearchParams();
  const token = search.get('token') ?? '';
  const reset = useResetPassword(token);
  const [formFault, setFormFault] = useState<string>();
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(passwordResetSchema),
    defaultValues: { password: '' },
  });

  const submit = handleSubmit(async ({ password }) => {
    setFormFault(undefined);
    try {
      await reset.mutateAsync(password);
    } catch (fault) {
      setFormFault(showFaults(fault, ['password'], setError));
    }
  });

  if (reset.isSuccess) {
    return (
      <SignInPage title="The password is set">
        <p role="status" className="text-body text-ink-2 mb-18">
          From now on it is the only one that opens your desk.
        </p>
        <ActLink to={paths.signIn}>Sign in</ActLink>
      </SignInPage>
    );
  }
  return (
    <SignInPage title="Set another password">
      <form onSubmit={(event) => void submit(event)} noValidate>
        <FormFault>{formFault}</FormFault>
        {isProblem(reset.error, 'expired-link') && (
          <p className="text-note mb-18">
            <Link to={paths.forgotten}>Send another link</Link>
          </p>
        )}
        <Field
          label="New password"
          type="password"
          autoComplete="new-password"
          help="At least 12 characters."
          fault={formState.errors.password?.message}
          {...register('password')}
        />
        <ActButton type="submit" disabled={formState.isSubmitting}>
          Set the password
        </ActButton>
      </form>
    </SignInPage>
  );
}
