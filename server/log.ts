/** The structured log of a process; secrets never reach it. */
import { pino, type Logger, type LoggerOptions } from 'pino';
import type { Config } from './config.ts';

export type { Logger };

export function logOptions(level: string, name: string): LoggerOptions {
  return {
    name,
    level,
    redact: {
      paths: [
        'req.headers.cookie',
        'req.headers.authorization',
        'req.headers["x-csrf-token"]',
        'res.headers["set-cookie"]',
        '*.password',
        '*.token',
      ],
      censor: '[withheld]',
    },
  };
}

export function createLog(config: Pick<Config, 'LOG_LEVEL'>, name: string): Logger {
  return pino(logOptions(config.LOG_LEVEL, name));
}
