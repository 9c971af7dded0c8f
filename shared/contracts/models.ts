/** Groups, notebooks, models, drafts and versions as the API speaks of them. */
import { z } from 'zod';
import { derivationSchema, diagnosticSchema, verificationSchema } from './derivation.ts';
import { roleSchema } from './people.ts';

/** The longest formulation in UTF-8 bytes. */
export const LARGEST_SOURCE = 65_536;

export const titleSchema = z
  .string()
  .trim()
  .min(1, 'Write a title.')
  .max(200, 'Use at most 200 characters.');
const timeSchema = z.iso.datetime();
const byPersonSchema = z.object({ id: z.string(), name: z.string() });

export const DERIVATION_STATES = [
  'queued',
  'deriving',
  'verifying',
  'complete',
  'failed',
  'cancelled',
] as const;
export const derivationStateSchema = z.enum(DERIVATION_STATES);
export type DerivationState = z.infer<typeof derivationStateSchema>;

export const derivationProgressSchema = z.object({
  state: derivationStateSchema,
  /** From 0 to 1 over the whole job. */
  progress: z.number(),
  /** What is being done: `deriving C_p`. */
  stage: z.string(),
  /** Why it failed, and the way out; null otherwise. */
  fault: z.string().nullable(),
  /** Overall outcome of the verification once complete. */
  verification: z.enum(['passed', 'failed', 'undecided']).nullable(),
  updatedAt: timeSchema,
});
export type DerivationProgress = z.infer<typeof derivationProgressSchema>;

export const versionSummarySchema = z.object({
  id: z.string(),
  number: z.number(),
  /** SHA-256 of the normalized source, 64 hexadecimal digits. */
  hash: z.string(),
  note: z.string(),
  frozenAt: timeSchema,
  frozenBy: byPersonSchema,
  derivation: derivationProgressSchema,
});
export type VersionSummary = z.infer<typeof versionSummarySchema>;

export const versionSchema = versionSummarySchema.extend({
  source: z.string(),
  /** Null until it is complete. */
  result: derivationSchema.nullable(),
  verification: verificationSchema.nullable(),
});
export type Version = z.infer<typeof versionSchema>;

export const modelSummarySchema = z.object({
  id: z.string(),
  title: z.string(),
  updatedAt: timeSchema,
  latestVersion: versionSummarySchema.nullable(),
  notebook: z.object({ id: z.string(), title: z.string() }),
  group: z.object({ id: z.string(), name: z.string() }),
});
export type ModelSummary = z.infer<typeof modelSummarySchema>;

export const modelSchema = modelSummarySchema.extend({
  /** The role of the person who asks. */
  role: roleSchema,
  /** Whether that role may edit and freeze. */
  mayEdit: z.boolean(),
  versionCount: z.number(),
});
export type Model = z.infer<typeof modelSchema>;

export const draftSchema = z.object({
  source: z.string(),
  /** Counts up with every save; a save names the revision that it builds on. */
  revision: z.number(),
  updatedAt: timeSchema,
  updatedBy: byPersonSchema,
});
export type Draft = z.infer<typeof draftSchema>;

/** PUT /api/models/:id/draft. The answer is the draft, or a `draft-conflict` with `current`. */
export const saveDraftSchema = z.object({
  source: z.string().max(LARGEST_SOURCE, 'A formulation has at most 64 KiB.'),
  basedOn: z.number().int().min(0),
});
export type SaveDraft = z.infer<typeof saveDraftSchema>;

/** GET /api/models/:id/draft/kept: what the draft has held, and texts that lost a race. */
export const keptTextSchema = z.object({
  id: z.string(),
  source: z.string(),
  /** The revision that the text became; null for one that lost a race. */
  revision: z.number().nullable(),
  basedOn: z.number(),
  keptAt: timeSchema,
  person: byPersonSchema,
});
export type KeptText = z.infer<typeof keptTextSchema>;
export const keptTextsPageSchema = z.object({ before: timeSchema.optional() });

export const draftConflictSchema = z.looseObject({ current: draftSchema });

/**
 * POST /api/models/:id/versions freezes the draft of the named revision. A formulation at fault
 * answers 422 `formulation-at-fault` with `diagnostics`.
 */
export const freezeSchema = z.object({
  revision: z.number().int().min(0),
  note: z.string().trim().max(500).default(''),
});
export type Freeze = z.input<typeof freezeSchema>;
export const formulationAtFaultSchema = z.looseObject({ diagnostics: z.array(diagnosticSchema) });

export const createModelSchema = z.object({
  title: titleSchema,
  source: z.string().max(LARGEST_SOURCE).default(''),
});
export const renameModelSchema = z.object({ title: titleSchema });

export const createNotebookSchema = z.object({
  title: titleSchema,
  introduction: z.string().max(20_000).default(''),
});
export const updateNotebookSchema = z.object({
  title: titleSchema.optional(),
  introduction: z.string().max(20_000).optional(),
});

export const notebookSummarySchema = z.object({
  id: z.string(),
  title: z.string(),
  introduction: z.string(),
  modelCount: z.number(),
  updatedAt: timeSchema,
});
export type NotebookSummary = z.infer<typeof notebookSummarySchema>;

export const notebookSchema = notebookSummarySchema.extend({
  group: z.object({ id: z.string(), name: z.string() }),
  role: roleSchema,
  models: z.array(modelSummarySchema),
});
export type Notebook = z.infer<typeof notebookSchema>;

/** An entry of the record: `I. Varnholt froze version 4 of …`. */
export const eventSchema = z.object({
  id: z.string(),
  at: timeSchema,
  person: byPersonSchema.nullable(),
  kind: z.enum([
    'group-created',
    'notebook-created',
    'model-created',
    'version-frozen',
    'derivation-complete',
    'derivation-failed',
    'derivation-cancelled',
  ]),
  modelId: z.string().nullable(),
  title: z.string(),
  versionNumber: z.number().nullable(),
});
export type RecordedEvent = z.infer<typeof eventSchema>;

/** GET /api/groups/:id/events, and the versions of a model: a page behind the one that is known. */
export const eventsPageSchema = z.object({
  before: z
    .string()
    .regex(/^\d{1,18}$/)
    .optional(),
});
export const versionsPageSchema = z.object({
  before: z.coerce.number().int().min(1).max(2_147_483_647).optional(),
});

export const createGroupSchema = z.object({
  name: titleSchema,
  about: z.string().trim().max(2000).default(''),
});

export const groupSchema = z.object({
  id: z.string(),
  name: z.string(),
  about: z.string(),
  role: roleSchema,
  notebooks: z.array(notebookSummarySchema),
  people: z.array(z.object({ id: z.string(), name: z.string(), role: roleSchema })),
  events: z.array(eventSchema),
});
export type Group = z.infer<typeof groupSchema>;

export const deskSchema = z.object({
  recentModels: z.array(modelSummarySchema),
  /** Derivations that run, wait or failed, of versions that this person froze. */
  jobs: z.array(
    z.object({
      model: z.object({ id: z.string(), title: z.string() }),
      version: versionSummarySchema,
    }),
  ),
  events: z.array(eventSchema),
  groups: z.array(
    z.object({
      id: z.string(),
      name: z.string(),
      role: roleSchema,
      notebooks: z.array(notebookSummarySchema),
    }),
  ),
});
export type Desk = z.infer<typeof deskSchema>;

/**
 * Server-sent events of GET /api/models/:id/events: `event: derivation`, `id:` the serial number
 * from the database, `data:` this.
 */
export const derivationEventSchema = z.object({
  versionId: z.string(),
  versionNumber: z.number(),
  derivation: derivationProgressSchema,
});
export type DerivationEvent = z.infer<typeof derivationEventSchema>;
