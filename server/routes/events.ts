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
    const { model } = await accessModel(
      database,
      personOf(request).id,
      request.params.modelId,
      'read the group',
    );
    response.writeHead(200, {
      'content-type': 'text/event-stream',
      'cache-control': 'no-cache, no-transform',
      connection: 'keep-alive',
      'x-accel-buffering': 'no',
    });
    response.write(`retry: ${RETRY_MS}\n\n`);
    const after = /^\d{1,18}$/.test(request.get('last-event-id') ?? '')
      ? request.get('last-event-id')
      : undefined;
    const leave = await hub.follow(model.id, after, ({ id, data }) => {
      response.write(`event: derivation\nid: ${id}\ndata: ${JSON.stringify(data)}\n\n`);
    });
    const heartbeat = setInterval(() => response.write(': still here\n\n'), HEARTBEAT_MS);
    request.on('close', () => {
      clearInterval(heartbeat);
      leave();
    });
  });

  return router;
}
