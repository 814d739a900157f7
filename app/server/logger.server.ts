import pino from 'pino';
import { env } from './env.server.ts';

/** The one logger: a JSON line each, to standard error, so that command output stays clean. */
export const logger = pino(
  {
    level: env.LOG_LEVEL,
    base: undefined,
    timestamp: pino.stdTimeFunctions.isoTime,
    redact: ['req.headers.cookie', 'req.headers.authorization'],
  },
  pino.destination({ fd: 2, sync: false }),
);
