/** A notebook: its introduction and its models. */
import { useState } from 'react';
import { useParams } from 'react-router-dom';
import { isProblem, useNotebook } from '../../api/index.ts';
import {
  ActButton,
  Empty,
  Fault,
  Loading,
  Margin,
  ModelTable,
  RelativeTime,
  Room,
  Sheet,
  SmallHeading,
  Stale,
  TwoColumns,
} from '../../components/index.ts';
import { NotFoundRoom } from '../NotFound.tsx';
import { paths } from '../paths.ts';
import { Introduction } from './Introduction.tsx';
import { NewModel } from './NewModel.tsx';

export function Component() {
  const { notebookId = '' } = useParams();
  const { data: notebook, error, isPending, refetch } = useNotebook(notebookId);
  const [isMaking, setMaking] = useState(false);
  if (isProblem(error, 'not-found')) return <NotFoundRoom />;

  const mayWrite = notebook !== undefined && notebook.role !== 'reader';
  const title = notebook?.title ?? 'Notebook';
  return (
    <Room
      windowTitle={title}
      place={notebook ? [{ label: notebook.group.name, to: paths.group(notebook.group.id) }] : []}
      title={title}
      state={
        notebook && (
          <>
            <span>
              {notebook.models.length === 1 ? '1 model' : `${notebook.models.length} models`}
            </span>
            <span>
              changed <RelativeTime at={notebook.updatedAt} />
            </span>
          </>
        )
      }
      action={mayWrite && <ActButton onClick={() => setMaking(true)}>Begin a model</ActButton>}
    >
      {isPending && <Loading what="the notebook" />}
      {error && !notebook && <Fault fault={error} onRetry={() => void refetch()} />}
      {isMaking && <NewModel notebookId={notebookId} onClose={() => setMaking(false)} />}
      {notebook && (
        <TwoColumns>
          <Sheet>
            {error && (
              <Stale>This is the notebook as last read; the server does not answer now.</Stale>
            )}
            <Introduction
              notebookId={notebookId}
              text={notebook.introduction}
              mayWrite={mayWrite}
            />
            {notebook.models.length === 0 ? (
              <Empty
                action={
                  mayWrite && <ActButton onClick={() => setMaking(true)}>Begin a model</ActButton>
                }
              >
                A model states one partition function, from which its properties follow. There is
                none in this notebook yet.
              </Empty>
            ) : (
              <ModelTable caption="Models" models={notebook.models} />
            )}
          </Sheet>
          <Margin label="About this notebook">
            <SmallHeading>Your part</SmallHeading>
            <p>
              {mayWrite
                ? `As ${notebook.role} of the group you may begin models, change drafts and freeze versions.`
                : 'As reader of the group you may look at everything and change nothing.'}
            </p>
          </Margin>
        </TwoColumns>
      )}
    </Room>
  );
}
