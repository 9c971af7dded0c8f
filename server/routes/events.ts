/** The stream of server-sent events of a model. */
import { Router } from 'express';
import type { Database } from '../database.ts';
import { personOf } from '../middleware/authentication.ts';
import type { DerivationHub } from '../queue/derivationHub.ts';
import { accessModel } from '../services/access.ts';

const HEARTBEAT_MS = 15_000;
const RETRY_MS = 2_000;

export function eventRoutes(database: Database, hub: DerivationHub): Router {
  const router = Router();

  router.get('/models/:modelId/events', async (request, response) => {
    const person = personOf(request);
    const access = () => accessModel(database, person.id, request.params.modelId, 'read the group');
    const { model } = await access();
    response.writeHead(200, {
      'content-type': 'text/event-stream',
      'cache-control': 'no-cache, no-transform',
      connection: 'keep-alive',
      'x-accel-buffering': 'no',
    });
    response.write(`retry: ${RETRY_MS}\n\n`);
    const after = /^\d{1,18}$/.exec(request.get('last-event-id') ?? '')?.[0];

    let leave: (() => void) | undefined;
    const heartbeat = setInterval(() => {
      response.write(': still here\n\n');
      // Somebody who has been taken out of the group meanwhile hears nothing more.
      access().catch(() => response.end());
    }, HEARTBEAT_MS);
    response.on('close', () => {
      clearInterval(heartbeat);
      leave?.();
    });
    try {
      leave = await hub.follow(model.id, after, {
        tell({ id, data }) {
          response.write(`event: derivation\nid: ${id}\ndata: ${JSON.stringify(data)}\n\n`);
        },
        end: () => response.end(),
      });
    } catch (error) {
      request.log.error({ err: error }, 'the events of a model could not be followed');
      response.end();
    }
    // The browser may have gone while the first events were read.
    if (response.closed) leave?.();
  });

  return router;
}
