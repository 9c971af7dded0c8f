/** Signing in: by GitHub, or with e-mail and password. */
import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { Link, Navigate, useNavigate, useSearchParams } from 'react-router-dom';
import { signInSchema } from '../../../shared/contracts/people.ts';
import { isProblem, useSession, useSignIn } from '../../api/index.ts';
import { ActButton, quietClass } from '../../components/Button.tsx';
import { Field, FormFault } from '../../components/Field.tsx';
import { Note } from '../../components/Layout.tsx';
import { paths, safeNext } from '../paths.ts';
import { showFaults } from '../formFaults.ts';
import { SignInPage } from './SignInPage.tsx';

/** What the way back from the identity provider reports in `?problem=`. */
const PROVIDER_FAULTS: Record<string, string> = {
  'not-confirmed': 'GitHub did not confirm who you are. Nothing has been changed; try again.',
  'no-provider': 'Signing in with GitHub is not set up on this site. Use e-mail and password.',
};

export function Component() {
  const session = useSession();
  const [search] = useSearchParams();
  const next = safeNext(search.get('next'));
  const providerFault = search.get('problem');
  const navigate = useNavigate();
  const signIn = useSignIn();
  const [formFault, setFormFault] = useState<string>();
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(signInSchema),
    defaultValues: { email: '', password: '' },
  });

  if (session.data?.person && !signIn.isPending) return <Navigate to={next} replace />;

  const submit = handleSubmit(async (values) => {
    setFormFault(undefined);
    try {
      await signIn.mutateAsync(values);
      await navigate(next, { replace: true });
    } catch (fault) {
      setFormFault(
        isProblem(fault, 'email-not-confirmed')
          ? `${fault.message} The link was sent when you registered.`
          : showFaults(fault, ['email', 'password'], setError),
      );
    }
  });

  return (
    <SignInPage title="Sign in">
      {providerFault !== null && (
        <FormFault>
          {PROVIDER_FAULTS[providerFault] ?? 'The sign-in at GitHub did not come to an end.'}
        </FormFault>
      )}
      <a href={`/auth/github?next=${encodeURIComponent(next)}`} className={quietClass}>
        Sign in with GitHub
      </a>
      {session.data?.identityProviderIsLocal && (
        <Note tone="ochre">
          <b className="text-ochre">A local stand-in answers for GitHub</b> on this machine: it
          offers the invented people of the demonstration, and nothing leaves the machine.
        </Note>
      )}
      <h2 className="border-hair text-body mt-22 mb-14 border-t pt-18 font-[560]">
        With e-mail and password
      </h2>
      <form onSubmit={(event) => void submit(event)} noValidate>
        <FormFault>{formFault}</FormFault>
        <Field
          label="E-mail"
          type="email"
          autoComplete="username"
          fault={formState.errors.email?.message}
          {...register('email')}
        />
        <Field
          label="Password"
          type="password"
          autoComplete="current-password"
          fault={formState.errors.password?.message}
          {...register('password')}
        />
        <ActButton type="submit" disabled={formState.isSubmitting}>
          {formState.isSubmitting ? 'Signing in' : 'Sign in'}
        </ActButton>
      </form>
      <p className="text-note mt-18 flex flex-wrap gap-x-22 gap-y-8">
        <Link to={paths.register}>Register</Link>
        <Link to={paths.forgotten}>Forgotten password</Link>
      </p>
    </SignInPage>
  );
}
