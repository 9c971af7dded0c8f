/**
 * The editor of a formulation: Monaco where there is room and a keyboard, a plain field under a
 * coloured copy until it has come and on narrow screens.
 */
import { lazy, Suspense, useSyncExternalStore } from 'react';
import type { Diagnostic } from '../../../shared/language/diagnostic.ts';
import { ErrorBoundary } from '../../components/index.ts';
import { SpecimenEditor } from '../../routes/front/SpecimenEditor.tsx';

const RichEditor = lazy(() => import('./RichEditor.tsx'));

export interface FormulationEditorProps {
  readonly source: string;
  readonly diagnostics: readonly Diagnostic[];
  /** Readers see the text and its faults, and cannot type. */
  readonly isReadOnly: boolean;
  readonly onChange: (source: string) => void;
}

const WIDE = '(min-width: 900px) and (pointer: fine)';

function subscribe(listener: () => void): () => void {
  const query = matchMedia(WIDE);
  query.addEventListener('change', listener);
  return () => query.removeEventListener('change', listener);
}

export function FormulationEditor(props: FormulationEditorProps) {
  const isWide = useSyncExternalStore(subscribe, () => matchMedia(WIDE).matches);
  const plain = <SpecimenEditor {...props} />;
  if (!isWide) return plain;
  return (
    <ErrorBoundary of="the editor">
      <Suspense fallback={plain}>
        <RichEditor {...props} />
      </Suspense>
    </ErrorBoundary>
  );
}
