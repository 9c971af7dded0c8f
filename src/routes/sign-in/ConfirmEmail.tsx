/** Where the link of the mail leads that confirms an address. */
import { Link, useSearchParams } from 'react-router-dom';
import { describeFault, useConfirmEmail } from '../../api/index.ts';
import { ActButton, ActLink } from '../../components/Button.tsx';
import { FormFault } from '../../components/Field.tsx';
import { paths } from '../paths.ts';
import { SignInPage } from './SignInPage.tsx';

export function Component() {
  const [search] = useSearchParams();
  const token = search.get('token') ?? '';
  const confirm = useConfirmEmail();

  if (confirm.isSuccess) {
    return (
      <SignInPage title="The address is confirmed">
        <p role="status" className="text-body text-ink-2 mb-18">
          You can sign in now.
        </p>
        <ActLink to={paths.signIn}>Sign in</ActLink>
      </SignInPage>
    );
  }
  return (
    <SignInPage title="Confirm your address">
      <FormFault>{confirm.isError ? describeFault(confirm.error) : undefined}</FormFault>
      {token === '' ? (
        <p className="text-body text-ink-2">
          The link is not complete. Copy it whole from the mail, or{' '}
          <Link to={paths.register}>register once more</Link>.
        </p>
      ) : (
        // A press of a button, not opening the link: programs that look at mail open links too.
        <ActButton onClick={() => confirm.mutate(token)} disabled={confirm.isPending}>
          {confirm.isPending ? 'Confirming' : 'Confirm that the address is mine'}
        </ActButton>
      )}
    </SignInPage>
  );
}
