/** The desk, groups and notebooks. */
import { Router } from 'express';
import {
  createGroupSchema,
  createModelSchema,
  createNotebookSchema,
  eventsPageSchema,
  updateNotebookSchema,
} from '../../shared/contracts/models.ts';
import type { Database } from '../database.ts';
import { personOf } from '../middleware/authentication.ts';
import {
  createGroup,
  createNotebook,
  listEvents,
  listGroups,
  readDesk,
  readGroup,
  readNotebook,
  updateNotebook,
} from '../services/groups.ts';
import { createModel, readModel } from '../services/models.ts';

export function groupRoutes(database: Database): Router {
  const router = Router();

  router.get('/desk', async (request, response) => {
    response.json(await readDesk(database, personOf(request).id));
  });

  router.get('/groups', async (request, response) => {
    response.json(await listGroups(database, personOf(request).id));
  });

  router.post('/groups', async (request, response) => {
    const { id } = personOf(request);
    const groupId = await createGroup(database, id, createGroupSchema.parse(request.body));
    response.status(201).json(await readGroup(database, id, groupId));
  });

  router.get('/groups/:groupId', async (request, response) => {
    response.json(await readGroup(database, personOf(request).id, request.params.groupId));
  });

  router.get('/groups/:groupId/events', async (request, response) => {
    const { id } = personOf(request);
    const { before } = eventsPageSchema.parse(request.query);
    response.json(await listEvents(database, id, request.params.groupId, before));
  });

  router.post('/groups/:groupId/notebooks', async (request, response) => {
    const { id } = personOf(request);
    const body = createNotebookSchema.parse(request.body);
    const notebookId = await createNotebook(database, id, request.params.groupId, body);
    response.status(201).json(await readNotebook(database, id, notebookId));
  });

  router.get('/notebooks/:notebookId', async (request, response) => {
    response.json(await readNotebook(database, personOf(request).id, request.params.notebookId));
  });

  router.patch('/notebooks/:notebookId', async (request, response) => {
    const change = updateNotebookSchema.parse(request.body);
    response.json(
      await updateNotebook(database, personOf(request).id, request.params.notebookId, change),
    );
  });

  router.post('/notebooks/:notebookId/models', async (request, response) => {
    const { id } = personOf(request);
    const body = createModelSchema.parse(request.body);
    const modelId = await createModel(database, id, request.params.notebookId, body);
    response.status(201).json(await readModel(database, id, modelId));
  });

  return router;
}
