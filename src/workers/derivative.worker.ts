/** Works out partial derivatives that a reader asks for, off the page's main thread. */
import {
  answerDerivative,
  type DerivativeAnswer,
  type DerivativeQuestion,
} from './anyDerivative.ts';

export interface DerivativeRequest {
  readonly id: number;
  readonly source: string;
  readonly question: DerivativeQuestion;
}

export interface DerivativeResponse {
  readonly id: number;
  readonly answer: DerivativeAnswer;
}

self.addEventListener('message', ({ data }: MessageEvent<DerivativeRequest>) => {
  const answer = answerDerivative(data.source, data.question);
  self.postMessage({ id: data.id, answer } satisfies DerivativeResponse);
});
