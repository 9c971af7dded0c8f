import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type {
  DerivationRequest,
  DerivationResponse,
} from '../../../src/workers/derivationProtocol.ts';
import {
  LiveDeriver,
  LONGEST_MS,
  LONGEST_WITH_NEWER_MS,
  MOST_EXPRESSIONS,
} from '../../../src/workers/liveDeriver.ts';
import type { DerivationWorker } from '../../../src/workers/liveDeriver.ts';

class SlowWorker implements DerivationWorker {
  onmessage: DerivationWorker['onmessage'] = null;
  onerror: DerivationWorker['onerror'] = null;
  readonly asked: DerivationRequest[] = [];
  isTerminated = false;

  postMessage(request: DerivationRequest): void {
    this.asked.push(request);
  }

  terminate(): void {
    this.isTerminated = true;
  }

  answer(expressions = 100): void {
    const request = this.asked.at(-1);
    const data: DerivationResponse = {
      id: request?.id ?? 0,
      diagnostics: [],
      derivation: undefined,
      milliseconds: 1,
      expressions,
    };
    this.onmessage?.({ data } as MessageEvent<DerivationResponse>);
  }
}

function stage() {
  const workers: SlowWorker[] = [];
  const answered: string[] = [];
  const failed: string[] = [];
  const deriver = new LiveDeriver(
    () => {
      const worker = new SlowWorker();
      workers.push(worker);
      return worker;
    },
    {
      onResponse: (_, source) => answered.push(source),
      onFailure: (why, source) => failed.push(`${source}: ${why}`),
    },
  );
  return { deriver, workers, answered, failed };
}

beforeEach(() => vi.useFakeTimers());
afterEach(() => vi.useRealTimers());

describe('the live deriver', () => {
  it('skips what was typed in between and derives the newest', () => {
    const { deriver, workers, answered } = stage();
    for (const source of ['a', 'ab', 'abc']) deriver.derive(source);
    workers[0]?.answer();
    workers[0]?.answer();
    expect(workers[0]?.asked.map(({ source }) => source)).toEqual(['a', 'abc']);
    expect(answered).toEqual(['a', 'abc']);
  });

  it('ends a derivation without end and says so', () => {
    const { deriver, workers, failed } = stage();
    deriver.derive('heavy');
    vi.advanceTimersByTime(LONGEST_MS);
    expect(workers[0]?.isTerminated).toBe(true);
    expect(failed).toEqual(['heavy: The derivation was given up after 20 s.']);
    deriver.derive('light');
    workers[1]?.answer();
    expect(workers).toHaveLength(2);
  });

  it('gives a heavy one up sooner when a newer source waits', () => {
    const { deriver, workers, answered, failed } = stage();
    deriver.derive('heavy');
    deriver.derive('light');
    vi.advanceTimersByTime(LONGEST_WITH_NEWER_MS);
    workers[1]?.answer();
    expect(answered).toEqual(['light']);
    expect(failed).toEqual([]);
  });

  it('gives a worker that holds too much up for a fresh one, between two derivations', () => {
    const { deriver, workers, answered } = stage();
    deriver.derive('a');
    deriver.derive('ab');
    workers[0]?.answer(MOST_EXPRESSIONS + 1);
    expect(workers[0]?.isTerminated).toBe(true);
    workers[1]?.answer();
    expect(answered).toEqual(['a', 'ab']);
    expect(workers).toHaveLength(2);
  });

  it('reports nothing after it was closed', () => {
    const { deriver, workers, answered } = stage();
    deriver.derive('a');
    deriver.close();
    workers[0]?.answer();
    expect(answered).toEqual([]);
  });
});
