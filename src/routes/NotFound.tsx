/** Nothing is at this address, or nothing that the reader may see. */
import { useSession } from '../api/session.ts';
import { ActLink } from '../components/Button.tsx';
import { Room } from '../components/Room.tsx';
import { paths } from './paths.ts';

export function NotFoundRoom() {
  const isSignedIn = Boolean(useSession().data?.person);
  return (
    <Room windowTitle="Not found" title="Nothing stands here">
      <p className="max-w-text text-body text-ink-2">
        The address may be mistyped, what stood here may have moved, or it belongs to a group of
        which you are not a member.
      </p>
      <div className="mt-22">
        {isSignedIn ? (
          <ActLink to={paths.desk}>Go to the desk</ActLink>
        ) : (
          <ActLink to={paths.front}>Go to the front door</ActLink>
        )}
      </div>
    </Room>
  );
}

export { NotFoundRoom as Component };
