/** The desk: what waits for a person, recent models, what happened in the groups. */
import { Link } from 'react-router-dom';
import type { Desk } from '../../../shared/contracts/models.ts';
import { failedJobs, runningJobs, useDesk } from '../../api/index.ts';
import {
  DerivationProgress,
  Empty,
  EventList,
  Fault,
  Loading,
  Margin,
  ModelTable,
  Room,
  Sheet,
  SmallHeading,
  Stale,
  TwoColumns,
} from '../../components/index.ts';
import { paths } from '../paths.ts';
import { NewGroup } from './NewGroup.tsx';

function Waiting({ desk }: { readonly desk: Desk }) {
  const jobs = [...failedJobs(desk), ...runningJobs(desk)];
  return (
    <section aria-labelledby="waiting">
      <SmallHeading>
        <span id="waiting">What waits</span>
      </SmallHeading>
      {jobs.length === 0 ? (
        <p className="text-note text-ink-2 pb-14">
          Nothing waits for you: every derivation of yours has come to its end.
        </p>
      ) : (
        <ul>
          {jobs.map(({ model, version }) => (
            <li key={version.id} className="border-hair border-t py-14">
              <p className="mb-8">
                <Link to={paths.version(model.id, version.number)} className="text-ink">
                  {model.title}
                </Link>{' '}
                <span className="text-label text-ink-3 font-mono">version {version.number}</span>
              </p>
              <DerivationProgress modelId={model.id} version={version} mayAct />
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}

function Groups({ desk }: { readonly desk: Desk }) {
  return (
    <section className="mb-22">
      <SmallHeading>Groups</SmallHeading>
      {desk.groups.length === 0 && (
        <p className="mb-8">You are in no group yet. Open one, or ask for an invitation.</p>
      )}
      <ul className="mb-14">
        {desk.groups.map((group) => (
          <li key={group.id} className="py-4">
            <Link to={paths.group(group.id)}>{group.name}</Link>{' '}
            <span className="text-label text-ink-3 font-mono">{group.role}</span>
            <ul className="pl-14">
              {group.notebooks.map((notebook) => (
                <li key={notebook.id} className="py-2">
                  <Link to={paths.notebook(notebook.id)} className="text-ink-2 decoration-rule">
                    {notebook.title}
                  </Link>
                </li>
              ))}
            </ul>
          </li>
        ))}
      </ul>
      <NewGroup />
    </section>
  );
}

export function Component() {
  const { data: desk, error, isPending, refetch } = useDesk();
  return (
    <Room windowTitle="Desk" title="Desk">
      {isPending && <Loading what="the desk" />}
      {error && !desk && <Fault fault={error} onRetry={() => void refetch()} />}
      {desk && (
        <TwoColumns>
          <Sheet>
            {error && <Stale>This is the desk as last read; the server does not answer now.</Stale>}
            <Waiting desk={desk} />
            {desk.recentModels.length === 0 ? (
              <Empty>
                Models that you work on are listed here. Open a notebook of one of your groups and
                begin one.
              </Empty>
            ) : (
              <ModelTable caption="Recent models" models={desk.recentModels} withNotebook />
            )}
          </Sheet>
          <Margin label="Groups and record">
            <Groups desk={desk} />
            <SmallHeading>What happened</SmallHeading>
            <EventList events={desk.events} />
          </Margin>
        </TwoColumns>
      )}
    </Room>
  );
}
