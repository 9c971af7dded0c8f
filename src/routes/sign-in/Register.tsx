/** Registering with e-mail and password; the address is confirmed by a link in a mail. */
import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { Link } from 'react-router-dom';
import { registrationSchema } from '../../../shared/contracts/people.ts';
import { useRegister } from '../../api/index.ts';
import { ActButton } from '../../components/Button.tsx';
import { Field, FormFault } from '../../components/Field.tsx';
import { paths } from '../paths.ts';
import { showFaults } from '../formFaults.ts';
import { SignInPage } from './SignInPage.tsx';

export function Component() {
  const registerPerson = useRegister();
  const [formFault, setFormFault] = useState<string>();
  const [sentTo, setSentTo] = useState<string>();
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(registrationSchema),
    defaultValues: { name: '', email: '', password: '' },
  });

  const submit = handleSubmit(async (values) => {
    setFormFault(undefined);
    try {
      await registerPerson.mutateAsync(values);
      setSentTo(values.email);
    } catch (fault) {
      setFormFault(showFaults(fault, ['name', 'email', 'password'], setError));
    }
  });

  if (sentTo !== undefined) {
    return (
      <SignInPage title="Look into your mail">
        <p role="status" className="text-body text-ink-2">
          A link is on its way to <b className="text-ink break-words">{sentTo}</b>. It confirms that
          the address is yours; after that you can <Link to={paths.signIn}>sign in</Link>.
        </p>
      </SignInPage>
    );
  }

  return (
    <SignInPage title="Register">
      <form onSubmit={(event) => void submit(event)} noValidate>
        <FormFault>{formFault}</FormFault>
        <Field
          label="Name"
          autoComplete="name"
          help="As it stands beside what you freeze."
          fault={formState.errors.name?.message}
          {...register('name')}
        />
        <Field
          label="E-mail"
          type="email"
          autoComplete="email"
          fault={formState.errors.email?.message}
          {...register('email')}
        />
        <Field
          label="Password"
          type="password"
          autoComplete="new-password"
          help="At least 12 characters; a sentence is easier to keep than a riddle."
          fault={formState.errors.password?.message}
          {...register('password')}
        />
        <ActButton type="submit" disabled={formState.isSubmitting}>
          {formState.isSubmitting ? 'Registering' : 'Register'}
        </ActButton>
      </form>
      <p className="text-note mt-18">
        <Link to={paths.signIn}>Sign in instead</Link>
      </p>
    </SignInPage>
  );
}
