/** Headers that tell the browser what a page of ours may do. */
import type { RequestHandler } from 'express';
import helmet from 'helmet';
import type { Config } from '../config.ts';

/**
 * Scripts, fonts and connections come from this origin alone; styles may stand in attributes, which
 * KaTeX and the editor need. Development adds what hot reload needs.
 */
export function security(config: Config, forDevelopment: boolean): RequestHandler {
  const isSecure = config.publicUrl.startsWith('https:');
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'", "'wasm-unsafe-eval'", ...(forDevelopment ? ["'unsafe-inline'"] : [])],
        styleSrc: ["'self'", "'unsafe-inline'"],
        workerSrc: ["'self'", ...(forDevelopment ? ['blob:'] : [])],
        imgSrc: ["'self'", 'data:'],
        fontSrc: ["'self'"],
        connectSrc: ["'self'", ...(forDevelopment ? ['ws:'] : [])],
        objectSrc: ["'none'"],
        baseUri: ["'self'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
      },
    },
    strictTransportSecurity: isSecure,
    crossOriginEmbedderPolicy: false,
    referrerPolicy: { policy: 'same-origin' },
  });
}
