/** A room that could not be opened: a missing page, no connection, or a mistake of ours. */
import { isRouteErrorResponse, useRouteError } from 'react-router-dom';
import { isProblem } from '../api/problem.ts';
import { ActButton, QuietLink } from '../components/Button.tsx';
import { Room } from '../components/Room.tsx';
import { NotFoundRoom } from './NotFound.tsx';
import { paths } from './paths.ts';

/** Whether the fault is that a part of the application has not come over the network. */
function isMissingChunk(fault: unknown): boolean {
  return (
    fault instanceof TypeError && /dynamically imported module|module script/i.test(fault.message)
  );
}

export function RoomFault() {
  const fault = useRouteError();
  if (isProblem(fault, 'not-found') || (isRouteErrorResponse(fault) && fault.status === 404)) {
    return <NotFoundRoom />;
  }
  return (
    <Room windowTitle="Fault" title="This page could not be shown">
      <p className="max-w-text text-body text-ink-2">
        {isMissingChunk(fault)
          ? 'A part of the application did not arrive. The connection may be lost, or a newer edition is in place; loading the page again mends both.'
          : 'That is a mistake of ours, not of yours. What was saved is safe; loading the page again often helps.'}
      </p>
      {fault instanceof Error && !isMissingChunk(fault) && (
        <p className="text-label text-ink-3 mt-8 font-mono break-words">{fault.message}</p>
      )}
      <div className="mt-22 flex gap-10">
        <ActButton onClick={() => location.reload()}>Load the page again</ActButton>
        <QuietLink to={paths.desk}>Go to the desk</QuietLink>
      </div>
    </Room>
  );
}
