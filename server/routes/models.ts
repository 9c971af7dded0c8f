/** Models, drafts, versions and their derivations. */
import { Router } from 'express';
import {
  freezeSchema,
  keptTextsPageSchema,
  renameModelSchema,
  saveDraftSchema,
  versionsPageSchema,
} from '../../shared/contracts/models.ts';
import type { Database } from '../database.ts';
import { personOf } from '../middleware/authentication.ts';
import { listKeptTexts, readDraft, saveDraft } from '../services/drafts.ts';
import { readModel, renameModel } from '../services/models.ts';
import {
  cancelDerivation,
  deriveAgain,
  freeze,
  listVersions,
  readVersion,
} from '../services/versions.ts';

export function modelRoutes(database: Database): Router {
  const router = Router();

  router.get('/models/:modelId', async (request, response) => {
    response.json(await readModel(database, personOf(request).id, request.params.modelId));
  });

  router.patch('/models/:modelId', async (request, response) => {
    const { title } = renameModelSchema.parse(request.body);
    response.json(await renameModel(database, personOf(request).id, request.params.modelId, title));
  });

  router.get('/models/:modelId/draft', async (request, response) => {
    response.json(await readDraft(database, personOf(request).id, request.params.modelId));
  });

  router.put('/models/:modelId/draft', async (request, response) => {
    const body = saveDraftSchema.parse(request.body);
    response.json(await saveDraft(database, personOf(request).id, request.params.modelId, body));
  });

  router.get('/models/:modelId/draft/kept', async (request, response) => {
    const { before } = keptTextsPageSchema.parse(request.query);
    const { modelId } = request.params;
    response.json(await listKeptTexts(database, personOf(request).id, modelId, before));
  });

  router.get('/models/:modelId/versions', async (request, response) => {
    const { before } = versionsPageSchema.parse(request.query);
    const { modelId } = request.params;
    response.json(await listVersions(database, personOf(request).id, modelId, before));
  });

  router.post('/models/:modelId/versions', async (request, response) => {
    const body = freezeSchema.parse(request.body);
    response
      .status(201)
      .json(await freeze(database, personOf(request).id, request.params.modelId, body));
  });

  router.get('/models/:modelId/versions/:number', async (request, response) => {
    const { modelId, number } = request.params;
    response.json(await readVersion(database, personOf(request).id, modelId, Number(number)));
  });

  router.post(
    '/models/:modelId/versions/:number/derivation/cancellation',
    async (request, response) => {
      const { modelId, number } = request.params;
      response
        .status(202)
        .json(await cancelDerivation(database, personOf(request).id, modelId, Number(number)));
    },
  );

  router.post('/models/:modelId/versions/:number/derivation', async (request, response) => {
    const { modelId, number } = request.params;
    response
      .status(202)
      .json(await deriveAgain(database, personOf(request).id, modelId, Number(number)));
  });

  return router;
}
