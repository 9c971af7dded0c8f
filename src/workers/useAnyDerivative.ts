/** The answer to a question for a derivative, as it comes from the worker. */
import { useEffect, useState } from 'react';
import type { DerivativeAnswer, DerivativeQuestion } from './anyDerivative.ts';
import type { DerivativeRequest, DerivativeResponse } from './derivative.worker.ts';

const LONGEST_MS = 10_000;

/** Undefined while it is being worked out; what takes too long is ended with its worker. */
export function useAnyDerivative(
  source: string,
  question: DerivativeQuestion,
): DerivativeAnswer | undefined {
  const key = JSON.stringify(question);
  const [answered, setAnswered] = useState<{ key: string; answer: DerivativeAnswer }>();

  useEffect(() => {
    const worker = new Worker(new URL('./derivative.worker.ts', import.meta.url), {
      type: 'module',
    });
    const end = (why: string): void => {
      worker.terminate();
      setAnswered({ key, answer: { kind: 'none', why } });
    };
    const timer = setTimeout(
      () => end(`It was given up after ${LONGEST_MS / 1000} s.`),
      LONGEST_MS,
    );
    worker.onmessage = ({ data }: MessageEvent<DerivativeResponse>) => {
      clearTimeout(timer);
      worker.terminate();
      setAnswered({ key, answer: data.answer });
    };
    worker.onerror = () => end('The derivation broke off by a mistake of ours.');
    worker.postMessage({
      id: 1,
      source,
      question: JSON.parse(key) as DerivativeQuestion,
    } satisfies DerivativeRequest);
    return () => {
      clearTimeout(timer);
      worker.terminate();
    };
  }, [source, key]);

  return answered?.key === key ? answered.answer : undefined;
}
