/**
 * The outcome of a derivation as it is stored, sent and shown: plain JSON, the same in the live
 * worker of the browser, in the queue's worker and on the command line.
 */
import { z } from 'zod';

/** A formula in the spellings in which it is wanted; `tree` is the exact expression as JSON. */
export const formulaSchema = z.object({
  tex: z.string(),
  text: z.string(),
});
export type Formula = z.infer<typeof formulaSchema>;

export const derivationStepSchema = z.object({
  /** The rule by name: `definition`, `logarithm of a product`, `chain rule` … */
  rule: z.string(),
  /** The line of TeX that this step arrives at, left side included. */
  tex: z.string(),
});
export type DerivationStep = z.infer<typeof derivationStepSchema>;

export const contributionSchema = z.object({
  label: z.string(),
  tex: z.string(),
  text: z.string(),
  /** The exact expression, for evaluation. */
  tree: z.unknown(),
});
export type Contribution = z.infer<typeof contributionSchema>;

export const FORMS = ['molecular', 'per molecule', 'molar', 'reduced'] as const;
export const formNameSchema = z.enum(FORMS);
export type FormName = z.infer<typeof formNameSchema>;

export const propertyFormSchema = z.object({
  form: formNameSchema,
  symbolTex: z.string(),
  unit: z.string(),
  tex: z.string(),
  text: z.string(),
});
export type PropertyForm = z.infer<typeof propertyFormSchema>;

export const derivedPropertySchema = z.object({
  /** `p`, `C_V`, `mu_JT` … as in the language. */
  symbol: z.string(),
  symbolTex: z.string(),
  name: z.string(),
  /** Coherent SI unit, `J/K`; `1` for a number. */
  unit: z.string(),
  definitionTex: z.string(),
  /** The right side in molecular form. */
  tex: z.string(),
  text: z.string(),
  tree: z.unknown(),
  /** Forms other than molecular, where they apply. */
  forms: z.array(propertyFormSchema),
  /** Empty where the property is not linear in ln Q. */
  contributions: z.array(contributionSchema),
  steps: z.array(derivationStepSchema),
  /** Where it diverges, what was assumed …; shown in the margin. */
  notes: z.array(
    z.object({ kind: z.enum(['diverges', 'assumes']), text: z.string(), tex: z.string() }),
  ),
});
export type DerivedProperty = z.infer<typeof derivedPropertySchema>;

export const checkStatusSchema = z.enum(['passed', 'failed', 'undecided']);
export type CheckStatus = z.infer<typeof checkStatusSchema>;

export const claimResultSchema = z.object({
  title: z.string(),
  text: z.string(),
  status: checkStatusSchema,
  /** `by limit`, `symbolically`, `at 4096 states`, … */
  method: z.string(),
  detail: z.string(),
  line: z.number(),
});
export type ClaimResult = z.infer<typeof claimResultSchema>;

export const verificationCheckSchema = z.object({
  /** `second opinion`, `numerical derivative`, `identity` … */
  kind: z.string(),
  title: z.string(),
  status: checkStatusSchema,
  detail: z.string(),
});
export type VerificationCheck = z.infer<typeof verificationCheckSchema>;

export const propertyVerificationSchema = z.object({
  symbol: z.string(),
  status: checkStatusSchema,
  checks: z.array(verificationCheckSchema),
});
export type PropertyVerification = z.infer<typeof propertyVerificationSchema>;

export const diagnosticSchema = z.object({
  code: z.string(),
  severity: z.enum(['error', 'warning', 'information']),
  span: z.object({ start: z.number(), end: z.number() }),
  line: z.number(),
  column: z.number(),
  message: z.string(),
  hint: z.string(),
  repairs: z.array(
    z.object({
      title: z.string(),
      edits: z.array(
        z.object({ span: z.object({ start: z.number(), end: z.number() }), text: z.string() }),
      ),
    }),
  ),
});

/** A declared number as the parameter table shows it; values are in the written unit. */
export const declaredQuantitySchema = z.object({
  kind: z.enum(['constant', 'parameter']),
  name: z.string(),
  tex: z.string(),
  unit: z.string(),
  /** In the written unit. */
  value: z.number(),
  uncertainty: z.number().nullable(),
  lower: z.number().nullable(),
  upper: z.number().nullable(),
  /** Coherent SI units in one of the written unit. */
  unitFactor: z.number(),
  description: z.string(),
  valueSpan: z.object({ start: z.number(), end: z.number() }),
});
export type DeclaredQuantityView = z.infer<typeof declaredQuantitySchema>;

export const variableSchema = z.object({
  name: z.string(),
  tex: z.string(),
  role: z.string(),
  unit: z.string(),
  description: z.string(),
});

/** Everything that follows from a sound formulation, without verification. */
export const derivationSchema = z.object({
  title: z.string(),
  ensemble: z.string(),
  /** `\ln Q` and its right side. */
  lnPartitionFunction: z.object({
    symbolTex: z.string(),
    tex: z.string(),
    text: z.string(),
    tree: z.unknown(),
  }),
  variables: z.array(variableSchema),
  quantities: z.array(declaredQuantitySchema),
  /** Values in SI of all symbols that are no natural variable, for evaluation: name → value. */
  values: z.record(z.string(), z.number()),
  domain: z.array(z.object({ tex: z.string(), text: z.string() })),
  properties: z.array(derivedPropertySchema),
  claims: z.array(claimResultSchema),
  /** Properties of the catalogue that this model has no value of, with the reason as a sentence. */
  absent: z.array(z.object({ symbol: z.string(), reason: z.string() })).optional(),
});
export type Derivation = z.infer<typeof derivationSchema>;

export const verificationSchema = z.object({
  properties: z.array(propertyVerificationSchema),
  /** Checks of the model as a whole: homogeneity, limits. */
  general: z.array(verificationCheckSchema),
  status: checkStatusSchema,
});
export type Verification = z.infer<typeof verificationSchema>;
