/** The settings of a process, read once from its environment. */
import { z } from 'zod';

const flag = z.enum(['true', 'false']).transform((text) => text === 'true');

const schema = z.object({
  NODE_ENV: z.enum(['development', 'production', 'test']).default('production'),
  HOST: z.string().default('127.0.0.1'),
  PORT: z.coerce.number().int().min(0).max(65_535).default(8460),
  PUBLIC_URL: z.url().optional(),
  DATABASE_URL: z.string().regex(/^postgres(ql)?:\/\//, 'must start with postgres://'),
  REDIS_URL: z.string().regex(/^rediss?:\/\//, 'must start with redis://'),
  SESSION_SECRET: z.string().min(32, 'must have at least 32 characters'),
  GITHUB_CLIENT_ID: z.string().optional(),
  GITHUB_CLIENT_SECRET: z.string().optional(),
  GITHUB_AUTHORIZATION_URL: z.url().optional(),
  GITHUB_TOKEN_URL: z.url().optional(),
  GITHUB_USER_URL: z.url().optional(),
  GITHUB_EMAILS_URL: z.url().optional(),
  IDENTITY_PROVIDER_IS_LOCAL: flag.default(false),
  SMTP_URL: z.string().optional(),
  MAIL_FROM: z.string().default('Massieu <massieu@localhost>'),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'silent']).default('info'),
  /** Failed sign-ins, and likewise registrations and resets, within a quarter of an hour. */
  SIGN_IN_ATTEMPTS: z.coerce.number().int().min(1).default(20),
  /** How many proxies stand in front and may say who the client is. */
  TRUSTED_PROXIES: z.coerce.number().int().min(0).default(0),
  /** Name of the queue in Redis; tests that share a Redis choose their own. */
  QUEUE_NAME: z
    .string()
    .regex(/^[\w-]+$/)
    .default('derivations'),
  WORKER_CONCURRENCY: z.coerce.number().int().min(1).max(64).default(2),
  DERIVATION_SECONDS: z.coerce.number().min(0.1).default(120),
  DERIVATION_MEGABYTES: z.coerce.number().int().min(64).default(512),
  /** How long a job stays with a worker that no longer answers. */
  LOCK_MILLISECONDS: z.coerce.number().int().min(500).default(5_000),
});

export type Config = z.infer<typeof schema> & { readonly publicUrl: string };

/** A setting that is missing or wrong, said in words that name it. */
export class ConfigFault extends Error {
  override name = 'ConfigFault';
}

/** Reads the settings. Throws ConfigFault naming every setting at fault. */
export function readConfig(environment: NodeJS.ProcessEnv = process.env): Config {
  // A setting that is there but empty counts as not set.
  const settings = Object.entries(environment).filter(([, value]) => value !== '');
  const parsed = schema.safeParse(Object.fromEntries(settings));
  if (!parsed.success) {
    const lines = parsed.error.issues.map(({ path, message }) => `  ${path.join('.')}: ${message}`);
    throw new ConfigFault(
      `These settings of the environment are missing or wrong:\n${lines.join('\n')}\n` +
        'npm start sets them all by itself; the README tells how to set them by hand.',
    );
  }
  const config = parsed.data;
  const publicUrl = config.PUBLIC_URL ?? `http://${config.HOST}:${config.PORT}`;
  return { ...config, publicUrl: publicUrl.replace(/\/+$/, '') };
}
