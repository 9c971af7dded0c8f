/** The Formulation section: the editor, the parameters, and the consequences in the margin. */
import './formulation.css';
import { useDeferredValue, useEffect, useState } from 'react';
import type { Draft } from '../../../shared/contracts/models.ts';
import { format } from '../../../shared/language/index.ts';
import { useDraft } from '../../api/index.ts';
import {
  ActButton,
  Fault,
  Loading,
  QuietButton,
  Sheet,
  Tools,
  TwoColumns,
  say,
} from '../../components/index.ts';
import { useModelContext } from '../../routes/model/modelContext.ts';
import { useLiveDerivation } from '../../workers/useLiveDerivation.ts';
import { ConsequencesMargin } from './ConsequencesMargin.tsx';
import { CONSEQUENCES } from './consequences.ts';
import { DraftConflict } from './DraftConflict.tsx';
import { DraftStatusLine } from './DraftStatusLine.tsx';
import { FormulationEditor } from './FormulationEditor.tsx';
import { FreezeDialog } from './FreezeDialog.tsx';
import { ParameterTable } from './ParameterTable.tsx';
import { useDraftKeeper } from './useDraftKeeper.ts';
import { writeValue } from './writeValue.ts';

export function Formulation() {
  const { model } = useModelContext();
  const { data: draft, error, isPending, refetch } = useDraft(model.id);
  // Who comes back to this page sees what others have saved meanwhile.
  useEffect(() => {
    const look = (): void => {
      if (document.visibilityState === 'visible') void refetch();
    };
    look();
    document.addEventListener('visibilitychange', look);
    return () => document.removeEventListener('visibilitychange', look);
  }, [refetch]);
  if (isPending) return <Loading what="the formulation" />;
  if (!draft) return <Fault fault={error} onRetry={() => void refetch()} />;
  return <Desk key={model.id} draft={draft} />;
}

function Desk({ draft }: { readonly draft: Draft }) {
  const { model } = useModelContext();
  const [{ text, status }, keeper] = useDraftKeeper(model.id, draft);
  const live = useLiveDerivation(text, CONSEQUENCES);
  const diagnostics = useDeferredValue(live.source === text ? live.diagnostics : []);
  const [isFreezing, setIsFreezing] = useState(false);
  const number = (model.latestVersion?.number ?? 0) + 1;
  const isFaulty =
    live.source === text && live.diagnostics.some(({ severity }) => severity === 'error');
  const edit = (next: string): void => {
    if (model.mayEdit) keeper.edit(next);
  };

  return (
    <TwoColumns>
      <Sheet>
        <Tools>
          {model.mayEdit ? (
            <DraftStatusLine status={status} />
          ) : (
            <span>the draft; as a {model.role} you read it</span>
          )}
          <span className="flex-1" />
          {model.mayEdit && (
            <>
              <QuietButton
                onClick={() => {
                  const tidy = format(text);
                  if (tidy === text) {
                    say('The text is tidy already.');
                    return;
                  }
                  keeper.edit(tidy);
                  say('The text is tidied.', () => keeper.edit(text));
                }}
              >
                Tidy
              </QuietButton>
              <ActButton
                className="desk:w-auto w-full text-center"
                disabled={text.trim() === ''}
                onClick={() => {
                  if (isFaulty)
                    say('A version must be sound: mend the lines that are marked first.');
                  else setIsFreezing(true);
                }}
              >
                Freeze as version {number}
              </ActButton>
            </>
          )}
        </Tools>
        {status.kind === 'conflict' && (
          <DraftConflict
            mine={text}
            theirs={status.theirs}
            onSettle={(settled) => keeper.settle(settled)}
          />
        )}
        <FormulationEditor
          source={text}
          diagnostics={diagnostics}
          isReadOnly={!model.mayEdit}
          onChange={edit}
        />
        {live.derivation && (
          <ParameterTable
            quantities={live.derivation.quantities}
            mayEdit={model.mayEdit && !live.isStale && live.source === text}
            onWrite={(quantity, written) => edit(writeValue(text, quantity, written))}
          />
        )}
      </Sheet>
      <ConsequencesMargin live={live} />
      {isFreezing && (
        <FreezeDialog
          model={model}
          number={number}
          keeper={keeper}
          onClose={() => setIsFreezing(false)}
        />
      )}
    </TwoColumns>
  );
}
