/** The record: who did what, and when. */
import { Link } from 'react-router-dom';
import type { RecordedEvent } from '../../shared/contracts/models.ts';
import { paths } from '../routes/paths.ts';
import { RelativeTime } from './RelativeTime.tsx';

/** What happened, without who and to what: `froze version 4 of`. */
function describeEvent({ kind, versionNumber }: RecordedEvent): string {
  const version = versionNumber === null ? 'a version' : `version ${versionNumber}`;
  switch (kind) {
    case 'group-created':
      return 'opened the group';
    case 'notebook-created':
      return 'opened the notebook';
    case 'model-created':
      return 'began the model';
    case 'version-frozen':
      return `froze ${version} of`;
    case 'derivation-complete':
      return `${version} is derived of`;
    case 'derivation-failed':
      return `the derivation failed for ${version} of`;
    case 'derivation-cancelled':
      return `cancelled the derivation of ${version} of`;
  }
}

/** The address of what the event is about, where it has one of its own. */
function eventPath({ modelId, versionNumber }: RecordedEvent): string | undefined {
  if (modelId === null) return undefined;
  return versionNumber === null ? paths.model(modelId) : paths.version(modelId, versionNumber);
}

/** Who did it; a derivation comes to its end by itself. */
function actorOf({ kind, person }: RecordedEvent): string | undefined {
  if (kind === 'derivation-complete' || kind === 'derivation-failed') return undefined;
  return person?.name;
}

function capitalize(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

export function EventList({ events }: { readonly events: readonly RecordedEvent[] }) {
  if (events.length === 0) return <p className="text-note">Nothing has happened yet.</p>;
  return (
    <ol className="text-note">
      {events.map((event) => {
        const to = eventPath(event);
        const actor = actorOf(event);
        const happening = describeEvent(event);
        return (
          <li key={event.id} className="border-hair border-b py-8 last:border-0">
            {actor !== undefined && <span className="text-ink">{actor} </span>}
            {actor === undefined ? capitalize(happening) : happening}{' '}
            {to ? (
              <Link to={to}>{event.title}</Link>
            ) : (
              <span className="text-ink">{event.title}</span>
            )}
            <span className="text-label text-ink-3 block font-mono">
              <RelativeTime at={event.at} />
            </span>
          </li>
        );
      })}
    </ol>
  );
}
