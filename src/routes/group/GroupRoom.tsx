/** A group: its notebooks, its people and their roles, its record. */
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import type { Group } from '../../../shared/contracts/models.ts';
import { isProblem, useGroup } from '../../api/index.ts';
import {
  ActButton,
  Empty,
  EventList,
  Fault,
  Loading,
  Margin,
  RelativeTime,
  Room,
  Sheet,
  SmallHeading,
  Stale,
  TwoColumns,
} from '../../components/index.ts';
import { NotFoundRoom } from '../NotFound.tsx';
import { paths } from '../paths.ts';
import { NewNotebook } from './NewNotebook.tsx';

/** The beginning of an introduction, without its mathematics, as a line under the title. */
function firstSentence(introduction: string): string {
  const [paragraph = ''] = introduction.split(/\n\s*\n/);
  const text = paragraph
    .replace(/[$#*`]/g, '')
    .replace(/\s+/g, ' ')
    .trim();
  return text.length > 180 ? `${text.slice(0, 178).replace(/\s\S*$/, '')} …` : text;
}

function Notebooks({ group }: { readonly group: Group }) {
  return (
    <ul>
      {group.notebooks.map((notebook) => (
        <li key={notebook.id} className="border-hair border-b py-14 first:pt-0 last:border-0">
          <div className="flex flex-wrap items-baseline gap-x-14">
            <h3 className="text-lede">
              <Link to={paths.notebook(notebook.id)} className="text-ink decoration-rule">
                {notebook.title}
              </Link>
            </h3>
            <span className="text-label text-ink-3 desk:ml-auto font-mono">
              {notebook.modelCount === 1 ? '1 model' : `${notebook.modelCount} models`} · changed{' '}
              <RelativeTime at={notebook.updatedAt} />
            </span>
          </div>
          <p className="max-w-text text-note text-ink-2">{firstSentence(notebook.introduction)}</p>
        </li>
      ))}
    </ul>
  );
}

export function Component() {
  const { groupId = '' } = useParams();
  const { data: group, error, isPending, refetch } = useGroup(groupId);
  const [isMaking, setMaking] = useState(false);
  if (isProblem(error, 'not-found')) return <NotFoundRoom />;

  const mayWrite = group && group.role !== 'reader';
  const title = group?.name ?? 'Group';
  return (
    <Room
      windowTitle={title}
      title={title}
      state={group && <span>your role: {group.role}</span>}
      action={mayWrite && <ActButton onClick={() => setMaking(true)}>Open a notebook</ActButton>}
    >
      {isPending && <Loading what="the group" />}
      {error && !group && <Fault fault={error} onRetry={() => void refetch()} />}
      {isMaking && <NewNotebook groupId={groupId} onClose={() => setMaking(false)} />}
      {group && (
        <TwoColumns>
          <Sheet>
            {error && (
              <Stale>This is the group as last read; the server does not answer now.</Stale>
            )}
            {group.about && <p className="max-w-text text-body text-ink-2 mb-22">{group.about}</p>}
            <SmallHeading>Notebooks</SmallHeading>
            {group.notebooks.length === 0 ? (
              <Empty>A notebook holds the models of one question. There is none yet.</Empty>
            ) : (
              <Notebooks group={group} />
            )}
          </Sheet>
          <Margin label="People and record">
            <SmallHeading>People</SmallHeading>
            <ul className="mb-22">
              {group.people.map((person) => (
                <li
                  key={person.id}
                  className="border-hair flex items-baseline gap-14 border-b py-6"
                >
                  <span className="text-ink min-w-0 break-words">{person.name}</span>
                  <span className="text-label text-ink-3 ml-auto font-mono">{person.role}</span>
                </li>
              ))}
            </ul>
            <SmallHeading>Record</SmallHeading>
            <EventList events={group.events} />
          </Margin>
        </TwoColumns>
      )}
    </Room>
  );
}
