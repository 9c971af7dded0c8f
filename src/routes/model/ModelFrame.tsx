/** The frame of a model: running head with its title and state, its sections, the section shown. */
import { Outlet, useLocation, useParams } from 'react-router-dom';
import { isProblem, useDerivationEvents, useModel } from '../../api/index.ts';
import { ErrorBoundary, Fault, Loading, Room, Stale } from '../../components/index.ts';
import { NotFoundRoom } from '../NotFound.tsx';
import { paths } from '../paths.ts';
import { EditableTitle } from './EditableTitle.tsx';
import type { ModelContext } from './modelContext.ts';
import { ModelState } from './ModelState.tsx';

export function Component() {
  const { modelId = '' } = useParams();
  const { pathname } = useLocation();
  const { data: model, error, isPending, refetch } = useModel(modelId);
  if (isProblem(error, 'not-found')) return <NotFoundRoom />;
  if (!model) {
    return (
      <Room windowTitle="Model" title="Model">
        {isPending && <Loading what="the model" />}
        {error && <Fault fault={error} onRetry={() => void refetch()} />}
      </Room>
    );
  }

  const sections = [
    { label: 'Formulation', to: paths.model(modelId), isExact: true },
    { label: 'Properties', to: paths.properties(modelId) },
    { label: 'Versions', to: paths.versions(modelId) },
  ];
  const section = sections.findLast(({ to }) => pathname.startsWith(to));
  return (
    <Room
      windowTitle={section ? `${section.label} · ${model.title}` : model.title}
      place={[
        { label: model.group.name, to: paths.group(model.group.id) },
        { label: model.notebook.title, to: paths.notebook(model.notebook.id) },
      ]}
      title={<EditableTitle key={model.title} model={model} />}
      state={<ModelState model={model} />}
      sections={sections}
    >
      {error && <Stale>This is the model as last read; the server does not answer now.</Stale>}
      <Followed key={modelId} modelId={modelId}>
        {(stream) => (
          <ErrorBoundary key={pathname} of="this section">
            <Outlet context={{ model, stream } satisfies ModelContext} />
          </ErrorBoundary>
        )}
      </Followed>
    </Room>
  );
}

/** Follows the derivations of the model while its frame is shown. */
function Followed({
  modelId,
  children,
}: {
  readonly modelId: string;
  readonly children: (stream: ModelContext['stream']) => React.ReactNode;
}) {
  return children(useDerivationEvents(modelId));
}
