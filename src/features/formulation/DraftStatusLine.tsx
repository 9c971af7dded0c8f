/** How the draft is kept, in words: `draft saved 12 s ago`. */
import { RelativeTime } from '../../components/index.ts';
import type { DraftStatus } from './draftKeeper.ts';

export function DraftStatusLine({ status }: { readonly status: DraftStatus }) {
  return (
    <span role="status" aria-live="polite">
      {words(status)}
    </span>
  );
}

function words(status: DraftStatus) {
  switch (status.kind) {
    case 'saved':
      return (
        <>
          draft saved <RelativeTime at={status.at} />
        </>
      );
    case 'unsaved':
      return 'draft kept in this browser, to be saved';
    case 'saving':
      return 'saving the draft';
    case 'offline':
      return 'no connection: kept in this browser, saved when it returns';
    case 'refused':
      return <span className="text-cinnabar">not saved: {status.why}</span>;
    case 'conflict':
      return <span className="text-ochre">two texts: choose below</span>;
  }
}
