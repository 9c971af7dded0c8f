/** Models in a table: title, latest version, its state, when it was changed. */
import { Link } from 'react-router-dom';
import type { ModelSummary } from '../../shared/contracts/models.ts';
import { paths } from '../routes/paths.ts';
import { DataTable } from './DataTable.tsx';
import type { Column } from './DataTable.tsx';
import { DerivationState } from './DerivationState.tsx';
import { RelativeTime } from './RelativeTime.tsx';

const MODEL: Column<ModelSummary> = {
  key: 'title',
  head: 'model',
  value: ({ title }) => title,
  cell: ({ id, title }) => (
    <Link to={paths.model(id)} className="text-body text-ink decoration-rule font-serif">
      {title}
    </Link>
  ),
};

const NOTEBOOK: Column<ModelSummary> = {
  key: 'notebook',
  head: 'notebook',
  value: ({ notebook }) => notebook.title,
  cell: ({ notebook }) => (
    <Link to={paths.notebook(notebook.id)} className="text-ink-2 decoration-rule">
      {notebook.title}
    </Link>
  ),
  isMinor: true,
};

const REST: readonly Column<ModelSummary>[] = [
  {
    key: 'version',
    head: 'version',
    isNumeric: true,
    value: ({ latestVersion }) => latestVersion?.number ?? null,
    cell: ({ latestVersion }) => latestVersion?.number ?? <span className="text-ink-3">draft</span>,
  },
  {
    key: 'state',
    head: 'state',
    value: ({ latestVersion }) =>
      latestVersion
        ? `${latestVersion.derivation.state} ${latestVersion.derivation.verification ?? ''}`.trim()
        : 'draft',
    cell: ({ latestVersion }) =>
      latestVersion ? (
        <DerivationState derivation={latestVersion.derivation} />
      ) : (
        <span className="text-ink-3">not frozen yet</span>
      ),
  },
  {
    key: 'changed',
    head: 'changed',
    value: ({ updatedAt }) => updatedAt,
    cell: ({ updatedAt }) => <RelativeTime at={updatedAt} />,
    isMinor: true,
  },
];

export function ModelTable({
  caption,
  models,
  withNotebook = false,
}: {
  readonly caption: string;
  readonly models: readonly ModelSummary[];
  readonly withNotebook?: boolean;
}) {
  return (
    <DataTable
      caption={caption}
      columns={withNotebook ? [MODEL, NOTEBOOK, ...REST] : [MODEL, ...REST]}
      rows={models}
      rowKey={({ id }) => id}
      fileName="models"
    />
  );
}
