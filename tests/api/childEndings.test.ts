/** How the process of one derivation may end, without queue and database. */
import { describe, expect, it, vi } from 'vitest';
import { runChild, type Ending } from '../../worker/runChild.ts';
import { AT_FAULT, IDEAL_GAS } from './support/formulations.ts';
import { createHold } from './support/workers.ts';

vi.setConfig({ testTimeout: 120_000 });

const AMPLE = { seconds: 110, megabytes: 512 };

function end(
  source: string,
  limits: Partial<typeof AMPLE> = {},
  cancelled: AbortSignal = new AbortController().signal,
  heard: () => void = () => undefined,
): Promise<Ending> {
  return runChild(source, { ...AMPLE, ...limits }, cancelled, heard);
}

describe('the process of a derivation', () => {
  it('is ended where it needs more memory than it may, in words for the author', async () => {
    // Too little even for the program itself, so that the end does not hang on the formulation.
    const ending = await end(IDEAL_GAS, { megabytes: 16 });
    expect(ending).toMatchObject({
      kind: 'fault',
      message: expect.stringMatching(/more than 16 MiB of memory.*Split large expressions/),
    });
  });

  it('tells the line and the way out where the formulation is at fault', async () => {
    const ending = await end(AT_FAULT);
    expect(ending).toMatchObject({
      kind: 'fault',
      message: expect.stringMatching(/^Line 3: .*nothing/),
    });
  });

  it('is ended where it is cancelled, before it has begun and in the middle', async () => {
    expect(await end(IDEAL_GAS, {}, AbortSignal.abort())).toEqual({ kind: 'cancelled' });
    const hold = createHold();
    vi.stubEnv('MASSIEU_TEST_HOLD', hold.path);
    vi.stubEnv('NODE_ENV', 'test');
    try {
      const cancel = new AbortController();
      const ending = end(IDEAL_GAS, {}, cancel.signal, () => {
        cancel.abort();
      });
      expect(await ending).toEqual({ kind: 'cancelled' });
    } finally {
      vi.unstubAllEnvs();
      hold.close();
    }
  });

  it('gives the same bytes each time', async () => {
    const [one, other] = [await end(IDEAL_GAS), await end(IDEAL_GAS)];
    expect(one.kind).toBe('outcome');
    expect(other).toEqual(one);
  });
});
